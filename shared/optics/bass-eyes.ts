import { assertBands, BANDS_36, type Spectrum } from './bands'
import { BASS_PAIR_WORDS, type BassTold } from './bass-words'
import { fallingLight } from './light-power'

/**
 * Peaks of a largemouth bass's two kinds of cone, nm.
 *
 * @source L. D. Mitchem et al., "Seeing red: color vision in the largemouth bass", Current Zoology 65 (2019) 43–52
 */
export const BASS_PEAKS = { green: 535, red: 614 } as const

/** Light that the two kinds of cone take, each as a share of what they take of a perfect white in the same light. */
export interface BassCatch { green: number, red: number }

/** What a bass's cones make of two colours. Says nothing of what a bass does about it. */
export interface BassVerdict {
  /** Difference of the two cones' balance, in steps that are just told apart. */
  hue: number
  /** Difference of brightness, in the same steps. */
  brightness: number
  by: BassTold
  words: string
}

/**
 * Least share by which a cone's answers must differ to be told apart, and the light, as a share of white, below which
 * differences drown. Assumptions: usual values for fish are 0.05 to 0.15 (common practice).
 */
const LEAST_SHARE = 0.1, DROWNS_BELOW = 0.06

/**
 * Sensitivity of a fish's cone to photons, 36 bands, 1 at its peak: a pigment with vitamin A2, as fresh-water fish have.
 *
 * @param peak nm, 450…650
 * @source V. I. Govardovskii, N. Fyhrquist, T. Reuter, D. G. Kuzmin, K. Donner, "In search of the visual pigment template",
 *         Visual Neuroscience 17 (2000) 509–528, alpha and beta bands of A2
 */
export function coneSensitivity(peak: number): Float64Array {
  if (!(peak >= 450 && peak <= 650)) throw new RangeError(`cone: the peak must be from 450 to 650 nm, got ${peak}`)
  const steep = 62.7 + 1.834 * Math.exp((peak - 625) / 54.2)
  const place = 0.875 + 0.0268 * Math.exp((peak - 665) / 40.7)
  const betaPeak = 216.7 + 0.287 * peak, betaWidth = 317 - 1.149 * peak + 0.00124 * peak * peak
  return Float64Array.from(BANDS_36, (nm) => {
    const x = peak / nm
    const alpha = 1 / (Math.exp(steep * (place - x)) + Math.exp(20.85 * (0.9101 - x)) + Math.exp(-10.37 * (1.1123 - x)) + 0.5343)
    return alpha + 0.37 * Math.exp(-(((nm - betaPeak) / betaWidth) ** 2))
  })
}

/** Sensitivities of the two cones, 36 bands. Shared: not to be written to. */
export const BASS_CONES: Readonly<Record<keyof BassCatch, Readonly<Float64Array>>> = { green: coneSensitivity(BASS_PEAKS.green), red: coneSensitivity(BASS_PEAKS.red) }

/**
 * What the two cones take of a colour.
 *
 * @param reflectance as seen, 36 bands
 * @param light       power of the light, 36 bands; daylight when left out (`waterLight` gives one under water)
 */
export function bassCatch(reflectance: Spectrum, light: Spectrum = fallingLight('D65').power): BassCatch {
  assertBands('bassCatch', 36, reflectance, light)
  const share = (cone: Readonly<Float64Array>) => {
    let taken = 0, white = 0
    BANDS_36.forEach((nm, i) => {
      const photons = cone[i]! * light[i]! * nm
      taken += photons * reflectance[i]!
      white += photons
    })
    return white > 0 ? taken / white : 0
  }
  return { green: share(BASS_CONES.green), red: share(BASS_CONES.red) }
}

/**
 * Whether a bass's two cones would tell two colours apart, by their balance and by brightness.
 *
 * @source the noise that receptors themselves make sets the limit: M. Vorobyev, D. Osorio, Proc. R. Soc. B 265 (1998) 351–358;
 *         the two limits are assumptions (`LEAST_SHARE`, `DROWNS_BELOW`)
 */
export function toldApartByBass(a: Spectrum, b: Spectrum, light?: Spectrum): BassVerdict {
  return verdictOn(bassCatch(a, light), bassCatch(b, light))
}

/** Whether a bass's two cones would tell two catches apart; see `toldApartByBass`. */
export function verdictOn(one: BassCatch, other: BassCatch): BassVerdict {
  const step = (p: number, q: number) => Math.log((p + DROWNS_BELOW) / (q + DROWNS_BELOW)) / LEAST_SHARE
  const green = step(one.green, other.green), red = step(one.red, other.red)
  const hue = Math.abs(green - red) / Math.SQRT2
  const brightness = Math.abs(green + red) / 2
  const by = hue >= BY_HUE ? 'colour' : brightness >= BY_BRIGHTNESS ? 'brightness' : 'nothing'
  return { hue, brightness, by, words: BASS_PAIR_WORDS[by] }
}

/** Steps from which two colours count as told apart. Set so that the pairs that bass were trained on come out as they did; our judgement. */
const BY_HUE = 2.5, BY_BRIGHTNESS = 3
