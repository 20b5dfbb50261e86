import type { paints } from '#server/db/tables'
import type { Role } from '#shared/people/roles'
import { may } from '#shared/people/may'
import type { StoredOptics } from '#shared/shelf/stored-optics'
import type { PaintListItem, PaintView } from '#shared/shelf/paint-view'
import { paintTrust } from '#shared/shelf/paint-trust'
import { swatchesOf } from './swatch-keep'

/** A paint with what is left of it in its bottles, mL. */
export type PaintRow = typeof paints.$inferSelect & { volumeLeft: number }

/** The only way from a paint's row to the wire; leaves the price out for those who may not see cost. */
export function paintView(row: PaintRow, optics: StoredOptics, role: Role): PaintView {
  return {
    id: row.id,
    name: row.name,
    kind: row.kind,
    base: row.base,
    known: row.known,
    reducerPer100: row.reducerPer100,
    filmPerPass: row.filmPerPass,
    volumeSolids: row.volumeSolids,
    density: row.density,
    restMinutes: row.restMinutes,
    potLifeMinutes: row.potLifeMinutes ?? undefined,
    twoPart: row.twoPart ?? undefined,
    hazards: row.hazards,
    note: row.note,
    volumeLeft: row.volumeLeft,
    pricePerMl: may(role, 'shelf:cost') ? row.pricePerMl ?? undefined : undefined,
    opticsId: row.opticsId,
    optics,
    swatches: swatchesOf(row.opticsId, optics),
    trust: paintTrust(row.known, optics),
    retired: row.retired,
    version: row.version,
    changedAt: row.changedAt.toISOString(),
  }
}

/** A row of the shelf: what the table shows, without spectra and notes. */
export function paintListItem(row: PaintRow, optics: StoredOptics, schemes: number, bottles: number, role: Role): PaintListItem {
  const { optics: _spectra, note: _note, ...shown } = paintView(row, optics, role)
  return { ...shown, schemes, bottles }
}
