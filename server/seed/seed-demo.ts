import { CARD_WORDS, shareDemoCard } from './cards'
import { paintDemoWall } from './finishes'
import { openDemoWorkshop, type DemoSignIn } from './people'
import { hangDemo, photographDemo } from './pictures'
import { runDemo } from './runs'
import type { Database } from '#server/db/client'

/**
 * Sets up the demo workshop: one person for each role, a shelf, nine finishes with two revisions each,
 * two batches made and one on the bench, photos, and two shared cards.
 * Everything goes through the same services as a person's own work.
 */
export async function seedDemo(db: Database, tell: (step: string) => void): Promise<DemoSignIn[]> {
  tell('People of the demo workshop')
  const { ctxOf, signIns } = await openDemoWorkshop(db)
  tell('Shelf and finishes')
  const wall = await paintDemoWall(ctxOf.painter)
  tell('Runs')
  await runDemo(ctxOf.bench, wall, new Date())
  for (const [i, finish] of wall.entries()) {
    tell(`Photographing ${finish.plan.name}, ${i + 1} of ${wall.length}`)
    await hangDemo(ctxOf.painter, finish)
    await photographDemo(ctxOf.desk, finish, finish.plan.name in CARD_WORDS ? 2 : 1)
    await shareDemoCard(ctxOf.desk, finish)
  }
  return signIns
}
