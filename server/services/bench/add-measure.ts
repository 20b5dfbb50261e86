import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { photos, runMeasures } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import { labFromPatch } from '#shared/bench/grey-card'
import type { RunMeasureDraft, RunMeasureView, ZoneMeasure } from '#shared/bench/run-measure'
import { ENGINE_VERSION } from '#shared/optics/engine-version'
import type { Look } from '#shared/picture/look'
import type { PaintKind } from '#shared/shelf/paint'
import { zoneColours } from '#shared/picture/zone-colours'
import { runMeasuresOf } from './run-measures'
import { type RunWithFinish, runInWorkshop } from './run-in-workshop'

/**
 * Notes the colours of a piece as a photo with a grey card shows them, beside what is promised of the run's revision. A piece
 * that later ones are held against is for those who may change the scheme to choose.
 */
export async function addMeasure(ctx: Ctx, runId: string, draft: RunMeasureDraft): Promise<RunMeasureView> {
  assertMay(ctx, draft.isSample ? 'scheme:change' : 'run:record')
  return inTransaction(ctx, async (tx) => {
    const row = await runInWorkshop(tx, runId)
    if (draft.piece > row.run.pieces) throw new Problem({ code: 'input/invalid', fields: [{ path: 'piece', message: `This run has ${row.run.pieces} pieces.` }] })
    await photoIsThere(tx, draft.photoId)
    const { piece, photoId, note, isSample } = draft
    const [made] = await tx.db.insert(runMeasures).values({
      workshopId: tx.workshopId, runId, piece, photoId, note, isSample, zones: measuredZones(row, draft), engineVersion: ENGINE_VERSION, measuredBy: tx.personId,
    }).returning({ id: runMeasures.id })
    const views = await runMeasuresOf(tx, row)
    return views.find(view => view.id === made!.id)!
  })
}

async function photoIsThere(tx: Ctx, photoId: string | null): Promise<void> {
  if (photoId === null) return
  const [photo] = await tx.db.select({ id: photos.id }).from(photos).where(and(eq(photos.id, photoId), eq(photos.workshopId, tx.workshopId)))
  if (!photo) throw new Problem({ code: 'photo/not-found' })
}

function measuredZones({ body, materials }: RunWithFinish, { card, zones }: RunMeasureDraft): ZoneMeasure[] {
  const look: Look = { body, materials }
  const promised = new Map(zoneColours(look, { upTo: 'all', clear: true, light: 'bench' }).map(each => [each.zone as string, each]))
  return zones.map(({ zone, rgb }, n) => {
    const promise = promised.get(zone)
    return {
      zone, label: promise?.label ?? zone, measured: fromPhoto(rgb, card, n),
      predicted: promise ? [...promise.promised.lab] : null,
      isEffect: promise !== undefined && (promise.face !== undefined || promise.wayUp.some(step => step.coatId !== null && isEffectCoat(look, step.coatId))),
    }
  })
}

/** Paint whose colour depends on where one stands, or on its own thickness, or that glows: no tolerance of solid colours holds for it (common practice). */
function isEffectCoat({ body, materials }: Look, coatId: string): boolean {
  const coat = body.stack.flatMap(item => item.act === 'coat' && item.coat.id === coatId ? [item.coat] : [])[0]
  return coat?.mix.parts.some(part => materials.paints.some(paint => paint.id === part.paintId && EFFECTS.includes(paint.kind))) ?? false
}

const EFFECTS: readonly PaintKind[] = ['pearl', 'interference', 'metallic', 'candy', 'fluorescent']

function fromPhoto(rgb: RunMeasureDraft['card'], card: RunMeasureDraft['card'], n: number): ZoneMeasure['measured'] {
  try {
    return labFromPatch(rgb, card)
  }
  catch (error) {
    if (error instanceof RangeError) throw new Problem({ code: 'input/invalid', fields: [{ path: n === 0 ? 'card' : `zones.${n}`, message: error.message }] })
    throw error
  }
}
