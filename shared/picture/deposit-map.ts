import type { LaidCoat } from '#shared/scheme/laid-coats'
import type { DepositKeep } from './deposit/keep'
import { layCoat } from './deposit/lay-coat'
import { rootCoded, type DepositMap } from './deposit/root-code'

export { depositKeep, grazingBlur, type DepositKeep } from './deposit/keep'
export { depositOf, type DepositMap } from './deposit/root-code'

/**
 * Where a coat's paint lies in a view and how thick: the deposit of one effective pass at every sample, as root-coded bytes. It does
 * not depend on passes or paint, and for the same scheme and blank it is the same on every machine to a step of its code.
 */
export function depositMap(keep: DepositKeep, laid: Pick<LaidCoat, 'coat' | 'masks'>): DepositMap {
  return rootCoded(layCoat(keep, laid), keep.dither)
}
