import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { labFromXyz, type Rgb, type Xyz } from '../../../shared/optics/colorimetry'
import { coatLayer, layOver } from '../../../shared/optics/coat-layer'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { emissionPhotons } from '../../../shared/optics/fluorescence'
import { CARD_WHITE, groundFromLab } from '../../../shared/optics/known-film'
import { kelvinLight } from '../../../shared/optics/kelvin-light'
import { weigh } from '../../../shared/optics/light-power'
import { filmOptics, paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { linearFromXyz, xyzFromLinearRgb } from '../../../shared/optics/screen-colour'
import { exactSeen } from '../../../shared/optics/seen-exact'
import { seenKey, seenLight } from '../../../shared/optics/seen-light'
import { SeenWish } from '../../../shared/optics/seen-wish'
import { spectrumFromLab } from '../../../shared/optics/spectrum-from-colour'
import { promise } from '../../../shared/optics/stack'
import { measuredSpectrum } from '../../../shared/optics/surface'
import { PICTURE_LINEAR_WEIGHTS, toPictureBands } from '../../../shared/optics/to-picture-bands'
import { reflectanceUnderWater } from '../../../shared/optics/under-water'
import { WATERS } from '../../../shared/optics/water'
import { linearRgb, magnitude } from './draws'

const inWater = (type: typeof WATERS[number], depth: number, distance = 0, adapted = true): SeenWish => ({ light: 'D65', water: { type, depth, distance, adapted } })
const WISHES: SeenWish[] = [
  { light: 'D65' }, { light: 'A' }, { light: 'F11' }, { light: 'LED-5000' }, { light: { kelvin: 2700 } }, { light: { kelvin: 4100 } }, { light: { kelvin: 9300 } },
  inWater('II', 5, 1), inWater('5C', 3, 1), inWater('5C', 3, 1, false), inWater('tea-stained', 1, 0.5), { light: 'LED-5000', water: { type: 'clear', depth: 2, distance: 2, adapted: true } },
]
const named = WISHES.map(wish => [seenKey(wish), wish] as const)
const dot = (weights: Readonly<Float64Array>, values: ArrayLike<number>) =>
  [0, 1, 2].map(row => Array.from(values).reduce((sum, value, b) => sum + weights[16 * row + b]! * value, 0)) as Rgb

describe('a picture', () => {
  it('in daylight is weighed by the very numbers it was before there were other lights', () => {
    seenLight({ light: 'D65' }).reflected.forEach((weight, i) => expect(weight).toBeCloseTo(PICTURE_LINEAR_WEIGHTS[i]!, 14))
  })
  it.each(named)('shows paint as the exact bands do, nearly always closer than an eye can tell: %s', (_, wish) => {
    const seen = seenLight(wish), exact = exactSeen(wish)
    const misses: number[] = []
    const coat = fc.tuple(linearRgb, magnitude(-1, 0.7), magnitude(-1, 0.5))
    fc.assert(fc.property(fc.array(coat, { minLength: 1, maxLength: 4 }), (coats) => {
      let film: Float64Array = new Float64Array(36).fill(0.85), short: Float64Array = new Float64Array(16).fill(0.85)
      for (const [rgb, S, X] of coats) {
        const masstone = spectrumFromLab(labFromXyz(xyzFromLinearRgb(rgb.map(c => 0.01 + 0.9 * c) as Rgb))).reflectance
        const optics = filmOptics(masstone.map(R => S * (1 - R) ** 2 / 2 / R), new Float64Array(36).fill(S))
        film = layOver(coatLayer(optics, X), film)
        short = layOver(coatLayer(optics, X, 'picture16'), short)
      }
      const drawn = xyzFromLinearRgb(dot(seen.reflected, measuredSpectrum(short, 'gloss', undefined, seen.surface)))
      const promised = exact.toDaylight(weigh(exact.weights, measuredSpectrum(film, 'gloss', undefined, exact.surface)))
      misses.push(deltaE2000(labFromXyz(drawn), labFromXyz(promised)))
    }), { numRuns: 200 })
    misses.sort((a, b) => a - b)
    expect(misses[100]).toBeLessThan(0.2)
    expect(misses[190]).toBeLessThan(0.6)
  })
  it.each(named)('shows light given off as the exact bands do: %s', (_, wish) => {
    const seen = seenLight(wish), exact = exactSeen(wish)
    for (const peak of [480, 520, 560, 603, 640]) {
      const bell = emissionPhotons({ peak, width: 56 })
      const photons = bell.map(value => value * exact.white[1] / 2 / weigh(exact.given, bell)[1])
      const drawn = labFromXyz(xyzFromLinearRgb(dot(seen.given, toPictureBands(photons)))), promised = labFromXyz(exact.toDaylight(weigh(exact.given, photons)))
      expect(deltaE2000(drawn, promised)).toBeLessThan(0.5)
    }
  })
  it.each(named)('counts every photon that falls: %s', (_, wish) => {
    const sum = (values: Float64Array) => values.reduce((total, value) => total + value, 0)
    const { photons } = seenLight(wish)
    expect(sum(photons)).toBeGreaterThan(0)
    expect(photons.every(value => value >= 0)).toBe(true)
  })
  it('shows a white as white under every lamp, and knows how a white looks under water', () => {
    for (const light of ['D65', 'A', 'F11', 'LED-3000', { kelvin: 2200 }, { kelvin: 12_000 }] as const) {
      seenLight({ light }).white.forEach(channel => expect(channel).toBeCloseTo(1, 6))
    }
    const [r, , b] = seenLight(inWater('I', 15, 0, false)).white
    expect(b).toBeGreaterThan(5 * Math.max(0, r))
    const adapted = seenLight(inWater('I', 3)).white
    expect(Math.max(...adapted) - Math.min(...adapted)).toBeLessThan(0.02)
  })
})

describe('numbers', () => {
  it('for a named light are what they are without any wish', () => {
    const stack = { ground: groundFromLab(CARD_WHITE), coats: [{ optics: paintOpticsFrom({ how: 'two-swatches', overBlack: [30, 20, 15], overWhite: [58, 40, 35], passes: 2 }), passes: 1 }], finish: 'satin' as const }
    expect(promise(stack, exactSeen({ light: 'F11' })).lab).toEqual(promise(stack, 'F11').lab)
  })
  it('under no water at all are those in the light above, but for the film that ends against water', () => {
    const paper = spectrumFromLab([50, 40, 20]).reflectance
    const above = exactSeen({ light: 'D65' }), below = exactSeen(inWater('9C', 0))
    expect(deltaE2000(above.lab(weigh(above.weights, paper)), below.lab(weigh(below.weights, paper)))).toBeLessThan(1e-9)
  })
  it('under water are those of the water itself', () => {
    const paper = spectrumFromLab([60, -30, 40]).reflectance
    const { lab, labAdapted } = reflectanceUnderWater(paper, { water: '3C', depth: 4, distance: 1 })
    const used = exactSeen(inWater('3C', 4, 1, true)), camera = exactSeen(inWater('3C', 4, 1, false))
    expect(used.lab(weigh(used.weights, paper))).toEqual(labAdapted)
    expect(camera.lab(weigh(camera.weights, paper))).toEqual(lab)
  })
  it.each(WATERS)('grow darker with every metre to an eye that does not get used to the place: %s', (type) => {
    const lightness = [0, 2, 5, 10].map(depth => exactSeen(inWater(type, depth, 0, false)).white[1])
    lightness.slice(1).forEach((Y, i) => expect(Y).toBeLessThan(lightness[i]!))
  })
  it('hardly move where daylight takes over from the filament at 4000 K', () => {
    const [warm, cool] = [3999.999, 4000].map(kelvin => exactSeen({ light: { kelvin } }))
    for (const lab of [[45, 60, 40], [60, -40, 40], [40, 10, -50], [80, 0, 80], [50, 0, 0]] as const) {
      const paper = spectrumFromLab([...lab]).reflectance
      const seen = [warm!, cool!].map(by => labFromXyz(by.toDaylight(weigh(by.weights, paper))))
      expect(deltaE2000(seen[0]!, seen[1]!)).toBeLessThan(1)
    }
  })
})

describe('a wish', () => {
  it('names alike what looks alike and nothing else', () => {
    expect(new Set(WISHES.map(seenKey)).size).toBe(WISHES.length)
    expect(seenKey(inWater('I', 3))).toBe(seenKey(SeenWish.parse(JSON.parse(JSON.stringify(inWater('I', 3))))))
  })
  it.each([
    [{ light: 'moon' }], [{ light: { kelvin: 900 } }], [{ light: { kelvin: Number.NaN } }], [{ light: 'D65', water: { type: 'ink', depth: 1, distance: 1, adapted: true } }],
    [{ light: 'D65', water: { type: 'I', depth: -1, distance: 1, adapted: true } }], [{ light: 'D65', water: { type: 'I', depth: 61, distance: 1, adapted: true } }],
  ])('is refused when there is no such place or light: %j', (wish) => {
    expect(SeenWish.safeParse(wish).success).toBe(false)
  })
  it('is refused by the light itself out of its range', () => {
    expect(() => kelvinLight(1000)).toThrow(/colour temperature/)
    expect(() => kelvinLight(30_000)).toThrow(RangeError)
  })
})

it('paints what the exact numbers say in linear light', () => {
  const seen = seenLight({ light: 'A' }), exact = exactSeen({ light: 'A' })
  const white: Xyz = exact.toDaylight(exact.white)
  linearFromXyz(white).forEach((channel, c) => expect(channel).toBeCloseTo(seen.white[c]!, 6))
})
