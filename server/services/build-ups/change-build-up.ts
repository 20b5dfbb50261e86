import { and, eq, inArray } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { buildUps, paints } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { BuildUpChange, BuildUpDraft, BuildUpSequence, BuildUpView } from '#shared/scheme/build-up'
import { unlinked } from '#shared/scheme/build-up-lay'
import { sameValue } from '#shared/scheme/canonical'
import { usedPaintIds } from '#shared/scheme/used-materials'
import { buildUpView } from './build-up-view'

/** Saves a sequence of coats as a build-up of the workshop. */
export async function addBuildUp(ctx: Ctx, { name, sequence }: BuildUpDraft): Promise<BuildUpView> {
  assertMay(ctx, 'scheme:change')
  return inTransaction(ctx, async (tx) => {
    await paintsInWorkshop(tx, sequence)
    const [row] = await tx.db.insert(buildUps).values({ workshopId: tx.workshopId, name, sequence: bare(sequence) }).returning()
    return buildUpView(row!)
  })
}

/** Changes a build-up that is still at `version`. Other coats make another edition; schemes that were laid from it stay as they are until somebody takes it over. */
export async function changeBuildUp(ctx: Ctx, buildUpId: string, version: number, change: BuildUpChange): Promise<BuildUpView> {
  assertMay(ctx, 'scheme:change')
  return inTransaction(ctx, async (tx) => {
    const [row] = await tx.db.select().from(buildUps)
      .where(and(eq(buildUps.id, buildUpId), eq(buildUps.workshopId, tx.workshopId))).for('update')
    if (!row) throw new Problem({ code: 'build-up/not-found' })
    if (row.version !== version) throw new Problem({ code: 'build-up/changed-meanwhile' })
    const sequence = change.sequence ? bare(change.sequence) : row.sequence
    const isOther = !sameValue(sequence, row.sequence)
    if (isOther) await paintsInWorkshop(tx, sequence)
    const [changed] = await tx.db.update(buildUps).set({
      name: change.name ?? row.name, retired: change.retired ?? row.retired, sequence, edition: row.edition + (isOther ? 1 : 0), version: version + 1, changedAt: new Date(),
    }).where(and(eq(buildUps.id, buildUpId), eq(buildUps.workshopId, tx.workshopId))).returning()
    return buildUpView(changed!)
  })
}

/** A build-up is the origin itself: its coats are linked to nothing. */
function bare(sequence: BuildUpSequence): BuildUpSequence {
  return { ...sequence, stack: sequence.stack.map(item => item.act === 'coat' ? { act: 'coat', coat: unlinked(item.coat) } : item) }
}

async function paintsInWorkshop(tx: Ctx, sequence: BuildUpSequence): Promise<void> {
  const ids = usedPaintIds(sequence)
  const own = await tx.db.select({ id: paints.id }).from(paints).where(and(eq(paints.workshopId, tx.workshopId), inArray(paints.id, ids)))
  if (own.length < ids.length) throw new Problem({ code: 'paint/not-found' })
}
