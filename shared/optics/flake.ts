import { type Bands, wavelengthsOf } from './bands'
import { BINDER_INDEX, MICA_INDEX, type Oxide, refractiveIndex } from './refractive-index'
import { admittance, boundary, type Complex, phase, through, uprightPart, type Wave } from './thin-film'

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
}

/** One flake, averaged over its spreads: R and T at each cosine in turn, all bands of the first cosine first. */
export interface SingleFlake { R: Float64Array, T: Float64Array }

/** Cosines, inside the binder, that diffuse light is averaged over: equal shares of cos². */
export const DIFFUSE_COSINES: readonly number[] = Array.from({ length: 12 }, (_, i) => Math.sqrt((i + 0.5) / 12))

/** Flakes already worked out, newest last. A memory of answers, not a state: forgetting it changes nothing but time. */
const REMEMBERED = new Map<string, SingleFlake>()
const REMEMBERED_MOST = 96

const MICA_MEAN = 350, MICA_SPREAD = 90
const MICA_NODES = 25, MICA_REACH = 3
const OXIDE_SPREAD = 0.05
const OXIDE_NODES = [-2, -1, 0, 1, 2]

/** Steps out from the mean and their bell-shaped shares. */
function bell(steps: readonly number[]): { step: number, share: number }[] {
  const heights = steps.map(step => Math.exp(-step * step / 2))
  const whole = heights.reduce((sum, height) => sum + height, 0)
  return steps.map((step, i) => ({ step, share: heights[i]! / whole }))
}

const MICA = bell(Array.from({ length: MICA_NODES }, (_, i) => MICA_REACH * (2 * i / (MICA_NODES - 1) - 1)))
const OXIDE = bell(OXIDE_NODES)

/**
 * Reflectance and transmittance of one flake lying in the binder, unpolarised.
 *
 * Oxide | mica | oxide, averaged over mica 350 ± 90 nm thick and oxide ± 5 %; aluminium stands alone.
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
  const micaIndex = { re: MICA_INDEX, im: 0 }
  const uprightMica = uprightPart(micaIndex, along)
  const etaMica = admittance(swing, micaIndex, uprightMica)
  const oxideToMica = boundary(etaOxide, etaMica), micaToOxide = boundary(etaMica, etaOxide)
  for (const { step, share } of OXIDE) {
    const crossing = phase(upright, thickness * (1 + OXIDE_SPREAD * step), nm)
    const under = through(micaToOxide, crossing, outOfOxide)
    for (const mica of MICA) {
      const core = through(oxideToMica, phase(uprightMica, MICA_MEAN + MICA_SPREAD * mica.step, nm), under)
      addPower(sum, through(intoOxide, crossing, core), share * mica.share)
    }
  }
  return sum
}

function etaOf(swing: 's' | 'p', index: Complex, along: number): Complex {
  return admittance(swing, index, uprightPart(index, along))
}

/** The medium is the same above and below, so power is the square of the amplitude. */
function addPower(sum: { r: number, t: number }, { r, t }: Wave, share: number): void {
  sum.r += share * (r.re * r.re + r.im * r.im)
  sum.t += share * (t.re * t.re + t.im * t.im)
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
