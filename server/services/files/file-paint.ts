import type { paints } from '#server/db/tables'
import type { FilePaint } from '#shared/files/scheme-file'
import type { PaintDraft } from '#shared/shelf/paint'

/** A paint of the shelf as a file holds it, built field by field: neither its price nor what is left of it travels. */
export function filePaint(row: typeof paints.$inferSelect): FilePaint {
  return {
    id: row.id,
    opticsId: row.opticsId,
    name: row.name,
    kind: row.kind,
    base: row.base,
    known: row.known,
    reducerPer100: row.reducerPer100,
    filmPerPass: row.filmPerPass,
    volumeSolids: row.volumeSolids,
    density: row.density,
    restMinutes: row.restMinutes,
    ...row.potLifeMinutes === null ? {} : { potLifeMinutes: row.potLifeMinutes },
    ...row.twoPart === null ? {} : { twoPart: row.twoPart },
    hazards: row.hazards,
    note: row.note,
  }
}

/** A paint of a file as it is put on a shelf: nothing of it is there yet. */
export function draftOfFilePaint({ id: _id, opticsId: _opticsId, ...paint }: FilePaint): PaintDraft {
  return { ...paint, volumeLeft: 0 }
}
