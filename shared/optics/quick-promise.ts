import type { Xyz } from './colorimetry'
import { layOver } from './film'
import { ASPECULAR, type Aspecular } from './flake-angles'
import { glowPhotons, SUBLAYERS } from './glow'
import { weigh } from './light-power'
import type { QuickCoat } from './quick-eye'
import type { ExactSeen } from './seen-exact'
import { type Brightness, type Colour, colourOf, type Promised, type Stack } from './stack'
import { measuredSpectrum } from './surface'

/** A stack's promise, the colours on the way up to it, and the light that leaves it at 45°, 36 bands each. */
export interface QuickPromise { promised: Promised, wayUp: Colour[], reflected: Float64Array, photons: Float64Array }

/** Gives back the photons of the lowest coats, each cut into so many, if they are known; or works them out. */
export type KeptPhotons = (coats: number, sublayers: number, work: () => Float64Array) => Float64Array

const BANDS = 36
/** On the way up a glow is cut more coarsely than at its end: within 0.02 CIEDE2000, in a quarter of the time. */
const ON_THE_WAY = 3

/**
 * What `promise` and `coloursOnTheWayUp` say of a stack, in one go over coats that are worked out already.
 *
 * @param coats       `quickCoat` of every coat of the stack, at all of `ASPECULAR`
 * @param keptPhotons for a caller that keeps what lies below an edit
 */
export function quickPromise({ ground, finish }: Pick<Stack, 'ground' | 'finish'>, coats: readonly QuickCoat[], seen: ExactSeen, keptPhotons: KeptPhotons = (_count, _cut, work) => work()): QuickPromise {
  const within = Float64Array.from(ground)
  const mirrored = new Map(ASPECULAR.map((angle): [Aspecular, Float64Array] => [angle, new Float64Array(BANDS)]))
  const seenAt = (angle: Aspecular) => {
    const more = mirrored.get(angle)!
    return measuredSpectrum(within, finish, undefined, seen.surface).map((value, b) => Math.max(0, value + more[b]!))
  }
  let brightness: Brightness = 'paper'
  let hasFlakes = false
  let reflected = seenAt(45), photons: Float64Array = new Float64Array(BANDS), glow: Xyz = [0, 0, 0]
  const wayUp = [colourOf(reflected, seen)]

  for (const [i, { layer, through, glows, mirrored: own }] of coats.entries()) {
    layOver(layer, within, within)
    hasFlakes ||= own !== undefined
    if (hasFlakes) {
      for (const [angle, sum] of mirrored) for (let b = 0; b < BANDS; b++) sum[b] = sum[b]! * through[b]! + (own?.[angle]?.[b] ?? 0)
    }
    if (glows) brightness = 'glow'
    else if (brightness === 'paper' && own) brightness = 'flakes'
    if (brightness === 'glow') {
      const cut = i === coats.length - 1 ? SUBLAYERS : ON_THE_WAY
      photons = keptPhotons(i + 1, cut, () => glowPhotons(coats.slice(0, i + 1).map(({ coat, layer: laid }) => ({ ...coat, layer: laid })), ground, seen.photons, seen.surface, cut))
      glow = weigh(seen.given, photons)
    }
    reflected = seenAt(45)
    wayUp.push(colourOf(reflected, seen, brightness, glow))
  }

  const top = wayUp.at(-1)! // the ground at least
  if (!hasFlakes) return { promised: { brightness, ...top }, wayUp, reflected, photons }
  const radiance = new Map(ASPECULAR.map((angle): [Aspecular, Float64Array] => [angle, seenAt(angle)]))
  const shown = (light: Float64Array) => colourOf(light, seen, brightness, glow)
  const angles = Object.fromEntries([...radiance].map(([angle, light]) => [angle, shown(light)])) as Record<Aspecular, Colour>
  const face = radiance.get(15)!.map((value, b) => (value + radiance.get(25)![b]!) / 2)
  return { promised: { brightness, ...top, angles, face: shown(face), flop: angles[110] }, wayUp, reflected, photons }
}
