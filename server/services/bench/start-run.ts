import { and, eq, inArray, max } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { revisionInWorkshop, schemeInWorkshop } from '#server/services/scheme/scheme-in-workshop'
import { bottlesByIds, bottlesInUse } from '#server/services/shelf/bottle-rows'
import { memberships, runBottles, runPainters, runs, workshops } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import { STEPS_FORM_NOW } from '#shared/bench/run-steps'
import type { RunListItem, RunStartInput } from '#shared/bench/run-view'
import { coatsOf } from '#shared/scheme/stack-order'
import type { SchemeBody } from '#shared/scheme/body'
import { bottleAtHand } from '#shared/shelf/bottle'
import { runInWorkshop } from './run-in-workshop'
import { runListItem } from './run-view'

/**
 * Starts a run of so many pieces from a published revision, under the workshop's next number. Every paint of the revision gets
 * a bottle: the one that was named, else the one at hand; whoever starts it paints, unless others are named.
 */
export async function startRun(ctx: Ctx, start: RunStartInput): Promise<RunListItem> {
  assertMay(ctx, 'run:record')
  const { schemeId, revision: number, pieces, names = [], room = null, bottleIds = [], painterIds = [], madeOf = null } = start
  return inTransaction(ctx, async (tx) => {
    const scheme = await schemeInWorkshop(tx, schemeId)
    if (scheme.headNumber === 0) throw new Problem({ code: 'scheme/never-published' })
    const revision = await revisionInWorkshop(tx, schemeId, number)
    const taken = await bottlesFor(tx, revision.body, bottleIds)
    const painters = await paintersFrom(tx, painterIds.length > 0 ? painterIds : [tx.personId])
    const [run] = await tx.db.insert(runs)
      .values({ workshopId: tx.workshopId, number: await nextNumber(tx), schemeId, revisionId: revision.id, pieces, names, room, madeOf, stepsForm: STEPS_FORM_NOW, startedBy: tx.personId })
      .returning({ id: runs.id })
    const own = { workshopId: tx.workshopId, runId: run!.id }
    await tx.db.insert(runPainters).values(painters.map(personId => ({ ...own, personId })))
    if (taken.length > 0) await tx.db.insert(runBottles).values(taken.map(bottle => ({ ...own, ...bottle })))
    return runListItem(await runInWorkshop(tx, run!.id), [], Date.now())
  })
}

/** One bottle for each paint that is laid: the named one, or the one at hand; none for a paint that has none. */
async function bottlesFor(tx: Ctx, body: SchemeBody, bottleIds: readonly string[]): Promise<{ paintId: string, bottleId: string }[]> {
  const paintIds = [...new Set(coatsOf(body.stack).flatMap(coat => coat.mix.parts.map(part => part.paintId)))]
  const named = await bottlesByIds(tx, bottleIds)
  if (named.length < new Set(bottleIds).size) throw new Problem({ code: 'bottle/not-found' })
  const inUse = await bottlesInUse(tx, paintIds)
  return paintIds.flatMap((paintId) => {
    const bottle = named.find(each => each.paintId === paintId) ?? bottleAtHand(inUse.filter(each => each.paintId === paintId))
    return bottle ? [{ paintId, bottleId: bottle.id }] : []
  })
}

/** Colleagues of the acting workshop, or people/not-found. */
async function paintersFrom(tx: Ctx, personIds: readonly string[]): Promise<string[]> {
  const wanted = [...new Set(personIds)]
  const found = await tx.db.select({ id: memberships.personId }).from(memberships)
    .where(and(eq(memberships.workshopId, tx.workshopId), inArray(memberships.personId, wanted)))
  if (found.length < wanted.length) throw new Problem({ code: 'people/not-found' })
  return wanted
}

/** The workshop is held until the transaction ends, so that runs started at once are numbered one after another, without a gap. */
async function nextNumber(tx: Ctx): Promise<number> {
  await tx.db.select({ id: workshops.id }).from(workshops).where(eq(workshops.id, tx.workshopId)).for('no key update')
  const [last] = await tx.db.select({ number: max(runs.number) }).from(runs).where(eq(runs.workshopId, tx.workshopId))
  return (last?.number ?? 0) + 1
}
