import type { PaintDraft } from '#shared/shelf/paint'

/** A draft as columns: everything but the colour, which goes through the engine, and what is left, which is in bottles. */
export function paintValues(draft: PaintDraft) {
  return {
    name: draft.name,
    kind: draft.kind,
    base: draft.base,
    known: draft.known,
    reducerPer100: draft.reducerPer100,
    filmPerPass: draft.filmPerPass,
    volumeSolids: draft.volumeSolids,
    density: draft.density,
    restMinutes: draft.restMinutes,
    potLifeMinutes: draft.potLifeMinutes ?? null,
    twoPart: draft.twoPart ?? null,
    hazards: draft.hazards,
    note: draft.note,
    pricePerMl: draft.pricePerMl ?? null,
  }
}
