import type { BlankShape } from './blank-shape'
import { bodyMeasures, type BodyMeasures } from './body-measures'
import { finOutline, type FinOutline } from './fin-outline'
import { profileOf, type Profile } from './profile'
import { surfaceTable, type SurfaceTable } from './surface-table'

/** A blank with everything that is worth working out once: keep it as long as the shape stands. */
export interface PreparedBlank {
  shape: BlankShape
  profile: Profile
  measures: BodyMeasures
  table: SurfaceTable
  /** In the order of `shape.fins`. */
  fins: FinOutline[]
}

/** Works out the curves, arc lengths and fins of a shape (about 30 ms). */
export function prepareBlank(shape: BlankShape): PreparedBlank {
  const profile = profileOf(shape)
  return {
    shape,
    profile,
    measures: bodyMeasures(profile),
    table: surfaceTable(profile),
    fins: shape.fins.map(fin => finOutline(fin, profile)),
  }
}
