import { eq } from 'drizzle-orm'
import { workshops } from '#server/db/tables/people'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { type WorkshopRow, settingsOf } from '#server/services/people/workshop-view'
import { Problem } from '#shared/errors/problem'
import type { WorkshopChange, WorkshopSettings } from '#shared/people/workshop'

/** The workshop one is in; another one, whoever asks, is not found. */
export async function getWorkshop(ctx: Ctx, workshopId: string): Promise<WorkshopRow> {
  assertMay(ctx, 'workshop:read')
  return inTransaction(ctx, tx => workshopHere(tx, workshopId))
}

/** Gives the workshop another name, other units, other planning values or another lamp; what is left out stays. */
export async function changeWorkshop(ctx: Ctx, workshopId: string, change: WorkshopChange): Promise<WorkshopRow> {
  assertMay(ctx, 'workshop:change')
  return inTransaction(ctx, async (tx) => {
    const workshop = await workshopHere(tx, workshopId)
    const { name = workshop.name, ...chosen } = change
    const settings: WorkshopSettings = { ...settingsOf(workshop), ...chosen }
    const [changed] = await tx.db.update(workshops).set({ name, settings })
      .where(eq(workshops.id, tx.workshopId)).returning()
    return changed ?? workshop
  })
}

/** Takes the demo workshop away with everything in it. A workshop that is not a demo stays. */
export async function removeDemo(ctx: Ctx, workshopId: string): Promise<void> {
  assertMay(ctx, 'workshop:remove-demo')
  await inTransaction(ctx, async (tx) => {
    const workshop = await workshopHere(tx, workshopId)
    if (!workshop.isDemo) throw new Problem({ code: 'workshop/not-demo' })
    await tx.db.delete(workshops).where(eq(workshops.id, tx.workshopId))
  })
}

async function workshopHere(tx: Ctx, workshopId: string): Promise<WorkshopRow> {
  const [workshop] = workshopId === tx.workshopId
    ? await tx.db.select().from(workshops).where(eq(workshops.id, tx.workshopId)).for('update')
    : []
  if (!workshop) throw new Problem({ code: 'workshop/not-found' })
  return workshop
}
