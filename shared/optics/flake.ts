import { type Bands, wavelengthsOf } from './bands'
import { BINDER_INDEX, MICA_INDEX, type Oxide, refractiveIndex } from './refractive-index'
import { type Complex, multiply, power } from './complex'
import { admittance, boundary, phase, through, uprightPart, type Wave } from './thin-film'

export type { Oxide } from './refractive-index'

/** The flakes of a pearl or a metallic, as sprayed. */
export interface Flake {
  oxide: Oxide
  /** Thickness of the oxide on each side of the mica, or of the aluminium itself, nm. */
  thickness: number
  /** Mean number of flakes over a point after one pass. */
  flakesPerPass: number
  /** Spread of the flakes' tilt, degrees; 6…12 is usual (our estimate). */
  sigma: number
  /** Share of the flakes' light scattered by their edges, 0…1; 0.03…0.12 is usual (our estimate). */
  edge: number
  /** Where pearls share a cup: each kind and its share of all flakes, summing to 1. `oxide` and `thickness` are then those of the commonest. */
  kinds?: FlakeKind[]
}

/** One of several kinds of flake in a cup. */
export interface FlakeKind { oxide: Oxide, thickness: number, share: number }

/** One flake, averaged over its spreads: R and T at each cosine in turn, all bands of the first cosine first. */
export interface SingleFlake { R: Float64Array, T: Float64Array }

/** Cosines, inside the binder, that diffuse light is averaged over: equal shares of cos². */
export const DIFFUSE_COSINES: readonly number[] = Array.from({ length: 12 }, (_, i) => Math.sqrt((i + 0.5) / 12))

/** Flakes already worked out, newest last. A memory of answers, not a state: forgetting it changes nothing but time. */
const REMEMBERED = new Map<string, SingleFlake>()
const REMEMBERED_MOST = 96

const MICA_MEAN = 350, MICA_SPREAD = 90
const OXIDE_SPREAD = 0.05
const OXIDE_NODES = [-2, -1, 0, 1, 2]

/** Steps out from the mean and their bell-shaped shares. */
function bell(steps: readonly number[]): { step: number, share: number }[] {
  const heights = steps.map(step => Math.exp(-step * step / 2))
  const whole = heights.reduce((sum, height) => sum + height, 0)
  return steps.map((step, i) => ({ step, share: heights[i]! / whole }))
}

const OXIDE = bell(OXIDE_NODES)

/**
 * Reflectance and transmittance of one flake lying in the binder, unpolarised.
 *
 * Oxide | mica | oxide, averaged over mica 350 ± 90 nm thick (in closed form) and oxide ± 5 %; aluminium stands alone.
 *
 * The answer is shared between callers and must not be written to.
 *
 * @param oxide     what coats the mica, or aluminium
 * @param thickness nm, above 0 and at most 1000
 * @param cosines   of the angle in the binder, above 0 and at most 1
 * @throws {RangeError} when the thickness is out of range
 */
export function singleFlake(oxide: Oxide, thickness: number, cosines: readonly number[], bands: Bands): SingleFlake {
  if (!(thickness > 0 && thickness <= 1000)) throw new RangeError(`flake: thickness must be above 0 and at most 1000 nm, got ${thickness}`)
  const key = [oxide, thickness, bands, ...cosines].join(' ')
  const known = REMEMBERED.get(key)
  if (known) return known
  if (REMEMBERED.size >= REMEMBERED_MOST) REMEMBERED.delete(REMEMBERED.keys().next().value!)
  const fresh = workOutFlake(oxide, thickness, cosines, wavelengthsOf(bands))
  REMEMBERED.set(key, fresh)
  return fresh
}

/** `singleFlake` at any wavelengths, nm, without remembering the answer. */
export function workOutFlake(oxide: Oxide, thickness: number, cosines: readonly number[], wavelengths: readonly number[]): SingleFlake {
  const R = new Float64Array(cosines.length * wavelengths.length), T = new Float64Array(R.length)
  cosines.forEach((cosine, c) => {
    const along = BINDER_INDEX * Math.sqrt(1 - cosine * cosine)
    wavelengths.forEach((nm, b) => {
      const at = c * wavelengths.length + b
      for (const swing of ['s', 'p'] as const) {
        const { r, t } = averagePower(oxide, thickness, swing, along, nm)
        R[at]! += r / 2
        T[at]! += t / 2
      }
    })
  })
  return { R, T }
}

/** Shares of power sent back and let through for one polarisation, averaged over the spreads. */
function averagePower(oxide: Oxide, thickness: number, swing: 's' | 'p', along: number, nm: number): { r: number, t: number } {
  const { n, k } = refractiveIndex(oxide, nm)
  const oxideIndex = { re: n, im: -k }
  const upright = uprightPart(oxideIndex, along)
  const etaBinder = etaOf(swing, { re: BINDER_INDEX, im: 0 }, along)
  const etaOxide = admittance(swing, oxideIndex, upright)
  const intoOxide = boundary(etaBinder, etaOxide)
  const outOfOxide = boundary(etaOxide, etaBinder)

  const sum = { r: 0, t: 0 }
  if (oxide === 'aluminium') {
    addPower(sum, through(intoOxide, phase(upright, thickness, nm), outOfOxide), 1)
    return sum
  }
  const uprightMica = uprightPart({ re: MICA_INDEX, im: 0 }, along)
  const etaMica = admittance(swing, { re: MICA_INDEX, im: 0 }, uprightMica)
  const oxideToMica = boundary(etaOxide, etaMica), micaToOxide = boundary(etaMica, etaOxide)
  const turn = 2 * Math.PI * uprightMica.re / nm
  for (const { step, share } of OXIDE) {
    const crossing = phase(upright, thickness * (1 + OXIDE_SPREAD * step), nm)
    const face = through(intoOxide, crossing, oxideToMica)
    const back = through(micaToOxide, crossing, outOfOxide)
    addMeanOverMica(sum, face, back, turn * MICA_MEAN, turn * MICA_SPREAD, share)
  }
  return sum
}

/**
 * Adds the power of two coated faces with mica between, averaged over mica whose phase is normally spread.
 *
 * The wave that has crossed the mica k times more than another keeps exp(−2k²·spread²) of its interference, so the mean is
 * a short sum instead of many thicknesses.
 *
 * @param face  from the binder through the coat into the mica
 * @param back  from the mica through the coat into the binder; the same coat, so also what the face looks like from inside
 * @param phase of one crossing of mica of mean thickness, and its standard deviation, radians
 */
function addMeanOverMica(sum: { r: number, t: number }, face: Wave, back: Wave, phase: number, spread: number, share: number): void {
  const within = multiply(back.r, back.r)
  const straight = multiply(face.t, back.t)
  const first = multiply(straight, back.r)
  const kept = 1 / (1 - power(within))
  let r = power(face.r) + power(first) * kept
  let t = 1
  let loops = { re: 1, im: 0 }
  for (let k = 1; ; k++) {
    const fringe = Math.exp(-2 * (k * spread) ** 2)
    if (fringe < 1e-15) break
    const wheel = { re: fringe * Math.cos(2 * k * phase), im: -fringe * Math.sin(2 * k * phase) }
    const late = multiply(first, loops)
    loops = multiply(loops, within)
    const meeting = {
      re: late.re * face.r.re + late.im * face.r.im + power(first) * kept * loops.re,
      im: late.im * face.r.re - late.re * face.r.im + power(first) * kept * loops.im,
    }
    r += 2 * multiply(meeting, wheel).re
    t += 2 * multiply(loops, wheel).re
  }
  sum.r += share * r
  sum.t += share * power(straight) * kept * t
}

function etaOf(swing: 's' | 'p', index: Complex, along: number): Complex {
  return admittance(swing, index, uprightPart(index, along))
}

/** The medium is the same above and below, so power is the square of the amplitude. */
function addPower(sum: { r: number, t: number }, { r, t }: Wave, share: number): void {
  sum.r += share * power(r)
  sum.t += share * power(t)
}

/** One flake's R and T in diffuse light, one value per band: the mean over `DIFFUSE_COSINES`. */
export function diffuseFlake(oxide: Oxide, thickness: number, bands: Bands): SingleFlake {
  const { R, T } = singleFlake(oxide, thickness, DIFFUSE_COSINES, bands)
  const count = wavelengthsOf(bands).length
  const mean = (values: Float64Array) => Float64Array.from({ length: count }, (_, b) => {
    let sum = 0
    for (let c = 0; c < DIFFUSE_COSINES.length; c++) sum += values[c * count + b]!
    return sum / DIFFUSE_COSINES.length
  })
  return { R: mean(R), T: mean(T) }
}
