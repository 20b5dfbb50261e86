import type { blanks, masks } from '#server/db/tables'
import type { BlankView } from '#shared/blank/blank-view'
import type { MaskView } from '#shared/scheme/mask-view'

/** The only way from a blank's row to the wire. */
export function blankView(row: typeof blanks.$inferSelect, schemes: number): BlankView {
  return { id: row.id, name: row.name, shape: row.shape, builtIn: row.builtIn, retired: row.retired, version: row.version, schemes }
}

/** The only way from a mask's row to the wire. */
export function maskView(row: typeof masks.$inferSelect): MaskView {
  return { id: row.id, name: row.name, form: row.form, retired: row.retired, version: row.version }
}
