import type { Lab, Light, Xyz } from '#shared/optics/colorimetry'
import { colourWords } from '#shared/optics/colour-words'
import { hexFromSrgb } from '#shared/optics/screen-colour'
import { type ExactSeen, resolveSeen } from '#shared/optics/seen-exact'
import { ASPECULAR } from '#shared/optics/flake-angles'
import { type Promised, screenOf } from '#shared/optics/stack'

/** A promised colour as an interface shows it. */
export interface ColourShown {
  lab: Lab
  /** For `fill`: the nearest a screen comes. */
  hex: string
  /** An ordinary screen cannot show it: say so beside it. */
  outOfGamut: boolean
  words: string
}

/** A colour of the engine, for people. */
export function colourShown({ lab, srgb, outOfGamut }: { lab: Lab, srgb: readonly [number, number, number], outOfGamut: boolean }): ColourShown {
  return { lab, hex: hexFromSrgb([...srgb]), outOfGamut, words: colourWords(lab) }
}

/** A promise at an angle from the gloss; between two of the five angles read by ratio. A stack without flakes has one colour. `by` is what the promise is seen by. */
export function colourAtAngle(promised: Promised, angle: number, by: Light | ExactSeen = 'D65'): ColourShown {
  const { angles } = promised
  if (!angles) return colourShown(promised)
  const high = ASPECULAR.find(each => each >= angle) ?? 110
  const low = ASPECULAR.findLast(each => each <= angle) ?? 15
  if (high === low) return colourShown(angles[low])
  const share = (angle - low) / (high - low)
  const [from, to] = [angles[low].xyz, angles[high].xyz]
  const xyz = from.map((value, i) => Math.max(1e-9, value) ** (1 - share) * Math.max(1e-9, to[i]!) ** share) as Xyz // three of three
  return colourShown({ lab: resolveSeen(by).lab(xyz), ...screenOf(xyz, promised.brightness, by) })
}
