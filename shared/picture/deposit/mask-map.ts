import type { Mask, MaskForm } from '#shared/scheme/mask'
import { keptMap, type DepositKeep } from './keep'
import { meshMap } from './mesh-map'
import { hashShare, noise2, SWING } from './noise'
import { normalShare } from './normal-share'
import { outlineDistance, outlineField, type OutlineField } from './outline-field'
import { draped } from './plane-place'
import { fieldMap, type PlaneField } from './plane-field'

type StencilForm = Exclude<MaskForm, { kind: 'mesh' }>

/** How far a stencil turned over for the other flank is out of register, mm. */
const REGISTER = 0.25
/** Sizes of a torn edge's wander, mm. */
const TORN = { large: 3.1, small: 1.2 }

/** What a mask lets through at every sample of the body. Made once a view: every coat of a bracket gets the same. */
export function maskMap(keep: DepositKeep, mask: Pick<Mask, 'form' | 'seed'>): Float32Array {
  const { form, seed } = mask
  return keptMap(keep, 'masks', JSON.stringify([form, seed]), () => form.kind === 'mesh' ? meshMap(keep, form, seed) : stencilMap(keep, form, seed))
}

function stencilMap(keep: DepositKeep, form: StencilForm, seed: number): Float32Array {
  const outlines = form.outlines.map(places => draped(keep.blank.table, places, true))
  const field = outlineField(outlines, outlineReach(form.soft, form.wobble))
  const [left, right] = ([1, -1] as const).map(side => cutEdge(field, form.soft, form.wobble, seed, side)) as [PlaneField, PlaneField] // two sides
  const map = fieldMap(keep, left, right)
  if (form.does === 'shields') for (const i of keep.onBody) map[i] = 1 - (map[i] ?? 0)
  return map
}

/** mm from an outline within which its edge is felt. */
export function outlineReach(soft: number, wobble: number): number {
  return 4 * soft + 2 * wobble
}

/** The inside of outlines with a soft edge that may be torn; on the right flank turned over, a little out of register. */
export function cutEdge(field: OutlineField, soft: number, wobble: number, seed: number, side: 1 | -1): PlaneField {
  const off = (use: number) => (side > 0 ? 0 : REGISTER * (2 * hashShare(use, 7, seed) - 1))
  const [offU, offV] = [off(1), off(2)]
  const own = seed + (side > 0 ? 21 : 23)
  const at = (U: number, V: number) => {
    let d = outlineDistance(field, U - offU, V - offV)
    if (wobble > 0 && Math.abs(d) < field.reach) {
      d += wobble * SWING * (noise2(U / TORN.large, V / TORN.large, own) + 0.5 * noise2(U / TORN.small, V / TORN.small, own + 1))
    }
    return normalShare(-d / soft)
  }
  return { at, meets: 'cover' }
}
