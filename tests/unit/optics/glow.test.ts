import { describe, expect, it } from 'vitest'
import { coatLayer } from '../../../shared/optics/coat-layer'
import { type Lab, labFromReflectance } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { glowPhotons } from '../../../shared/optics/glow'
import { CARD_BLACK, CARD_WHITE, groundFromLab } from '../../../shared/optics/known-film'
import observer from '../../../shared/optics/data/cie-1931-observer.json'
import { emissionPhotons } from '../../../shared/optics/fluorescence'
import { fallingLight, radianceFactor, xyzOfPhotons } from '../../../shared/optics/light-power'
import { type Light, LIGHTS, POWER } from '../../../shared/optics/lights'
import { mixOptics, type PaintOptics, paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { coloursOnTheWayUp, promise, stackReflectance } from '../../../shared/optics/stack'
import { flat } from './draws'

const loud = (overWhite: Lab, passes: number, peak: number, width: number, quantumYield: number) =>
  paintOpticsFrom({ how: 'dye-over-white', overWhite, passes, haze: 0.012, fluorescent: { peak, width, quantumYield } })
const orange = loud([66, 60, 72], 2, 603, 56, 0.93)
const cerise = loud([58, 74, 10], 2, 614, 56, 0.92)
const lemon = loud([93, -18, 92], 2.2, 520, 70, 0.9)
const white = groundFromLab(CARD_WHITE), black = groundFromLab(CARD_BLACK)
const daylight = fallingLight('D65').photons
const quiet = ({ fluorescent: _, ...dye }: PaintOptics): PaintOptics => dye

function totalFactor(optics: PaintOptics, passes: number, ground: Float64Array, light: Light = 'D65'): Float64Array {
  const coats = [{ optics, passes, layer: coatLayer(optics, passes) }]
  const given = radianceFactor(glowPhotons(coats, ground, fallingLight(light).photons), light)
  return stackReflectance({ ground, coats, finish: 'gloss' }).measured.map((value, i) => value + given[i]!)
}
const peak = (optics: PaintOptics, passes: number, ground: Float64Array) => Math.max(...totalFactor(optics, passes, ground))
const over = (optics: PaintOptics, ground: Float64Array, light: Light = 'D65', passes = 2) => promise({ ground, coats: [{ optics, passes }], finish: 'gloss' }, light)

describe('fluorescents', () => {
  // Peaks of measured Donaldson matrices: orange 2.4, cerise 2.15, lemon 1.56. The dyes here are invented, so the order of magnitude is what must be met.
  it.each([['orange', orange, 2.4], ['cerise', cerise, 2.15], ['lemon', lemon, 1.56]] as const)('outshine paper as measured ones do: %s', (_, paint, measured) => {
    expect(peak(paint, 2, white) / measured).toBeGreaterThan(0.75)
    expect(peak(paint, 2, white) / measured).toBeLessThan(1.35)
  })
  it('need a white ground: over black the same two passes give next to nothing', () => {
    expect(peak(orange, 2, white)).toBeGreaterThan(2.4)
    expect(peak(orange, 2, black)).toBeLessThan(0.7)
    expect(over(orange, black).lab[0]).toBeLessThan(45)
  })
  it('do not glow in light without short waves: a filament lamp feeds a lemon far less than daylight does', () => {
    const gain = (light: Light) => over(lemon, white, light).lab[0] - over(quiet(lemon), white, light).lab[0]
    expect(gain('D65')).toBeGreaterThan(5)
    expect(gain('A')).toBeLessThan(0.5 * gain('D65'))
  })
  it('without a yield are the plain dye', () => {
    const dull = { ...orange, fluorescent: { ...orange.fluorescent!, quantumYield: 0 } }
    expect(over(dull, white)).toEqual(over(quiet(orange), white))
  })
  it('show the dye they had when their optics are of an engine that knew no glow', () => {
    const { Kf: _, ...old } = orange.fluorescent!
    expect(over({ ...orange, engineVersion: '1', fluorescent: old }, white)).toEqual(over(quiet(orange), white))
  })
  it('go dark under black and lose their feed under a candy', () => {
    const under = (optics: PaintOptics, passes: number) => {
      const stack = (paint: PaintOptics) => promise({ ground: white, coats: [{ optics: paint, passes: 2 }, { optics, passes }], finish: 'gloss' }).lab
      return deltaE2000(stack(lemon), stack(quiet(lemon)))
    }
    expect(under(paintOpticsFrom({ how: 'masstone-hide', masstone: [8, 0, 0], passesToHide: 2 }), 3)).toBeLessThan(0.5)
    expect(under(paintOpticsFrom({ how: 'dye-over-white', overWhite: [42, 62, 36], passes: 2.6 }), 4)).toBeLessThan(3)
    expect(under(paintOpticsFrom({ how: 'clear' }), 1)).toBeGreaterThan(3)
  })
  it('feed one another: orange over lemon takes up the light of the lemon', () => {
    const coats = [lemon, orange].map(optics => ({ optics, passes: 2, layer: coatLayer(optics, 2) }))
    const sum = (values: Float64Array) => values.reduce((total, value) => total + value, 0)
    const both = glowPhotons(coats, white, daylight), bare = glowPhotons([{ ...coats[0]!, optics: quiet(lemon) }, coats[1]!], white, daylight)
    expect(sum(both)).toBeGreaterThan(sum(bare) * 1.05)
  })
  it('come up from the ground to the promise', () => {
    const stack = { ground: white, coats: [{ optics: lemon, passes: 2 }, { optics: orange, passes: 1 }], finish: 'gloss' as const }
    expect(coloursOnTheWayUp(stack).at(-1)!.lab).toEqual(promise(stack).lab)
  })
  it('keep their hue on a screen that cannot show them, and say so', () => {
    const { srgb: [r, g, b], outOfGamut } = over(orange, white)
    expect(outOfGamut).toBe(true)
    expect(r).toBeGreaterThan(0.95)
    expect(g).toBeLessThan(0.65)
    expect(b).toBeLessThan(0.3)
  })
  it('glow half as much as one of half the passes when let down half with clear', () => {
    const thinned = mixOptics([{ optics: orange, drops: 1 }, { optics: paintOpticsFrom({ how: 'clear' }), drops: 1 }])
    expect(deltaE2000(over(thinned, white).lab, over(orange, white, 'D65', 1).lab)).toBeLessThan(1e-6)
  })
  it('lose their glow in a cup of black', () => {
    const soot = paintOpticsFrom({ how: 'masstone-hide', masstone: [8, 0, 0], passesToHide: 2 })
    const mix = mixOptics([{ optics: orange, drops: 1 }, { optics: soot, drops: 3 }])
    const glow = (optics: PaintOptics) => over(optics, white).xyz[1] - over(quiet(optics), white).xyz[1]
    expect(glow(mix)).toBeLessThan(0.1 * glow(orange))
  })
  it.each(LIGHTS)('weigh on the eye as their light does, lamp by lamp: %s', (light) => {
    const photons = emissionPhotons({ peak: 560, width: 120 }).map(value => 100 * value)
    const sum = [0, 0, 0]
    let white = 0
    POWER[light].power.forEach((power, i) => {
      const nm = 380 + 5 * i, place = Math.min(i / 2, 35), below = Math.floor(place), share = place - below
      const power5 = ((1 - share) * photons[below]! + share * (photons[below + 1] ?? 0)) / nm
      white += power * observer.y[i]!
      sum[0]! += power5 * observer.x[i]!
      sum[1]! += power5 * observer.y[i]!
      sum[2]! += power5 * observer.z[i]!
    })
    const exact = sum.map(value => value / white)
    xyzOfPhotons(photons, light).forEach((value, c) => expect(Math.abs(value / exact[c]! - 1)).toBeLessThan(light === 'D65' ? 0.002 : 0.03))
  })
  it('give a plain reflectance where they only reflect', () => {
    const dye = totalFactor(quiet(orange), 2, white)
    expect(deltaE2000(labFromReflectance(dye), over(quiet(orange), white).lab)).toBeLessThan(1e-9)
    expect(flat(0)).not.toEqual(dye)
  })
})
