import type { FindCoatWish, FoundCoat } from './find-coat'
import { mixOptics } from './mix-optics'
import { type PromiseSpread, promiseSpread } from './spread'

/** A coat that comes near, and how sure its colour is. */
export interface SureCoat extends FoundCoat { spread: PromiseSpread }

/** What the coats of a stack are called: those below, the coat itself, those above. */
export type StackNumbers = readonly number[]

/**
 * How sure the colour of a found coat is where it would lie, in whole passes as it would be sprayed: over the coats below it,
 * under those above, in the light it was looked for in.
 *
 * @throws {RangeError} when a paint of the coat is not on the shelf it was looked for on
 */
export function sureCoat({ ground, below = [], above = [], finish, laid = 1, shelf, light }: FindCoatWish, found: FoundCoat, numbers?: StackNumbers): SureCoat {
  const parts = found.parts.map(({ id, drops }) => {
    const paint = shelf.find(each => each.id === id)
    if (!paint) throw new RangeError(`sureCoat: there is no paint ${id}`)
    return { optics: paint.optics, drops }
  })
  const [first] = parts
  const optics = parts.length === 1 && first ? first.optics : mixOptics(parts)
  const coats = [...below, { optics, passes: found.whole.passes * laid }, ...above]
  return { ...found, spread: promiseSpread({ ground, coats, finish }, light, numbers) }
}
