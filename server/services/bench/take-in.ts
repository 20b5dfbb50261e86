import { eq, and, inArray } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { putDraft } from '#server/services/scheme/save-draft'
import { holdScheme } from '#server/services/scheme/scheme-in-workshop'
import { paints } from '#server/db/tables'
import { differenceWords } from '#shared/bench/difference-words'
import { runDifferences, takeInEdits } from '#shared/bench/run-differences'
import { runState } from '#shared/bench/run-state'
import type { TakenIn } from '#shared/bench/run-report'
import { sameValue } from '#shared/scheme/canonical'
import { applyEdit } from '#shared/scheme/edits'
import { eventsOfRun } from './run-events'
import { planOfRow, runInWorkshop } from './run-in-workshop'

/**
 * Takes what the bench did into the scheme: its draft, as it is at `version`, gets the passes, thinning, paints and waits that
 * most good pieces of the run had. Everything else of the draft stays; a coat that is no longer in it is told. Nothing is
 * published, and the revision of the run stays what it was.
 */
export async function takeIn(ctx: Ctx, runId: string, version: number): Promise<TakenIn> {
  assertMay(ctx, 'scheme:change')
  return inTransaction(ctx, async (tx) => {
    const row = await runInWorkshop(tx, runId)
    const scheme = await holdScheme(tx, row.run.schemeId, version)
    const plan = planOfRow(row)
    const differences = runDifferences(plan, runState(await eventsOfRun(tx, runId)))
    const names = await paintNames(tx, differences.flatMap(each => each.what === 'paint' ? [each.from, each.to] : []))
    let body = scheme.draft
    const [taken, left]: [string[], string[]] = [[], []]
    for (const difference of differences) {
      const words = differenceWords(difference, id => names.get(id) ?? 'a paint')
      const edits = takeInEdits([difference], { body })
      const outcome = edits.length === 0 ? null : edits.reduce<ReturnType<typeof applyEdit>>((now, edit) => now.ok ? applyEdit(now.body, edit) : now, { ok: true, body })
      if (outcome?.ok) {
        body = outcome.body
        taken.push(words)
      }
      else left.push(`${words}. ${outcome?.because ?? 'That coat is no longer in the draft.'}`)
    }
    const saved = sameValue(scheme.draft, body) ? scheme : await putDraft(tx, scheme, body)
    return { schemeId: scheme.id, version: saved.version, taken, left }
  })
}

async function paintNames(tx: Ctx, ids: readonly string[]): Promise<Map<string, string>> {
  if (ids.length === 0) return new Map()
  const rows = await tx.db.select({ id: paints.id, name: paints.name }).from(paints).where(and(eq(paints.workshopId, tx.workshopId), inArray(paints.id, [...ids])))
  return new Map(rows.map(({ id, name }) => [id, name]))
}
