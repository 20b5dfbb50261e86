import { BANDS_36 } from '../../shared/optics/bands'
import { coatLayer } from '../../shared/optics/coat-layer'
import { type Lab, lightnessOf, xyzFromLab } from '../../shared/optics/colorimetry'
import { radianceAtAngles } from '../../shared/optics/flake-angles'
import { layOver } from '../../shared/optics/film'
import { interferenceColour } from '../../shared/optics/known-flake'
import { CARD_BLACK, CARD_WHITE, groundFromLab } from '../../shared/optics/known-film'
import { type PaintOptics, paintOpticsFrom } from '../../shared/optics/paint-optics'
import { hexFromSrgb, screenFromXyz } from '../../shared/optics/screen-colour'
import { exactSeen } from '../../shared/optics/seen-exact'
import { promiseSpread } from '../../shared/optics/spread'
import { colourOf, lightFrom, promise, type Stack } from '../../shared/optics/stack'
import { FINISHES, measuredFromInternal, measuredSpectrum } from '../../shared/optics/surface'
import { waterShares } from '../../shared/optics/water-light'
import type { Water } from '../../shared/optics/water'
import { headsAlong, headsOver, plotCurves, plotPatches, type Scale } from './plot'
import { type Svg, svgText } from './svg'

const olive = paintOpticsFrom({ how: 'two-swatches', overBlack: [28, -6, 20], overWhite: [46, -9, 38], passes: 1 })
const cream = paintOpticsFrom({ how: 'two-swatches', overBlack: [66, 2, 12], overWhite: [88, 1, 16], passes: 1 })
const candy = paintOpticsFrom({ how: 'dye-over-white', overWhite: [50, 62, 36], passes: 2 })
const orange = paintOpticsFrom({ how: 'dye-over-white', overWhite: [66, 60, 72], passes: 2, haze: 0.012, fluorescent: { peak: 603, width: 56, quantumYield: 0.93 } })
const pearl = (thickness: number) => paintOpticsFrom({ how: 'interference', thickness, oxide: 'anatase', flakesPerPass: 0.4, sigma: 8, edge: 0.06 })
const over = (ground: Lab, coats: readonly [PaintOptics, number][], finish: Stack['finish'] = 'gloss'): Stack => ({ ground: groundFromLab(ground), coats: coats.map(([optics, passes]) => ({ optics, passes })), finish })
const hex = (stack: Stack) => hexFromSrgb(promise(stack).srgb)
const upTo = (from: number, to: number, step: number) => Array.from({ length: Math.round((to - from) / step) + 1 }, (_, i) => from + i * step)

function interference(): Svg {
  const thicknesses = upTo(20, 180, 1)
  // One flake sends back a part of the light: shown brighter, all by one factor, so that hue can be told.
  const ribbon = (oxide: 'anatase' | 'rutile' | 'hematite') => thicknesses.map((nm) => {
    const [x, y, z] = xyzFromLab(interferenceColour(oxide, nm))
    return hexFromSrgb(screenFromXyz([1.5 * x, 1.5 * y, 1.5 * z]).srgb)
  })
  return plotPatches('Interference colour against the thickness of the oxide', headsAlong(20, 180, upTo(20, 180, 20)), [
    { name: 'anatase', fills: ribbon('anatase') }, { name: 'rutile', fills: ribbon('rutile') }, { name: 'hematite', fills: ribbon('hematite') },
  ], 'thickness of the oxide on the mica, nm')
}

function grounds(): Svg {
  const angles = upTo(15, 110, 1)
  const ribbon = (thickness: number, ground: Lab) => {
    const coat = { optics: pearl(thickness), passes: 2 }, layer = coatLayer(coat.optics, coat.passes)
    const seen = radianceAtAngles([coat], [layer], measuredSpectrum(layOver(layer, groundFromLab(ground)), 'gloss'), angles)
    return angles.map(angle => hexFromSrgb(colourOf(seen[angle]!, 'D65', 'flakes').srgb))
  }
  return plotPatches('Pearls over black and over white, from face to flop', headsAlong(15, 110, [15, 25, 45, 75, 110]), ([['gold', 75], ['red', 94], ['blue', 125], ['green', 155]] as const).flatMap(([name, nm]) => [
    { name: `${name}, over black`, fills: ribbon(nm, CARD_BLACK) }, { name: `${name}, over white`, fills: ribbon(nm, CARD_WHITE) },
  ]), 'degrees away from the gloss')
}

const PERCENT: Scale = { from: 0, to: 100, marks: [0, 20, 40, 60, 80, 100], words: 'lightness L* as seen' }

function finishes(): Svg {
  const inside = upTo(0, 1, 0.01)
  return plotCurves('Matt against clear: lightness as seen against light inside the film', { from: 0, to: 1, marks: [0, 0.2, 0.4, 0.6, 0.8, 1], words: 'reflectance inside the film' }, PERCENT,
    [...FINISHES].reverse().map(finish => ({ name: finish, points: inside.map(R => [R, lightnessOf(measuredFromInternal(R, finish))] as const) })))
}

function letDowns(): Svg {
  const passes = [0, 0.5, 1, 1.5, 2, 3, 4, 6]
  const row = (name: string, optics: PaintOptics, ground: Lab) => ({ name, fills: passes.map(count => hex(over(ground, [[optics, count]]))) })
  return plotPatches('Let-downs: colours pass by pass', headsOver(passes.map(String)), [
    row('cream, over black', cream, CARD_BLACK), row('olive, over black', olive, CARD_BLACK), row('olive, over white', olive, CARD_WHITE),
    row('candy, over white', candy, CARD_WHITE), row('candy, over black', candy, CARD_BLACK), row('blue pearl, over black', pearl(125), CARD_BLACK),
  ], 'passes')
}

const NM: Scale = { from: 400, to: 700, marks: [400, 450, 500, 550, 600, 650, 700], words: 'wavelength, nm' }
const overBands = (values: ArrayLike<number>) => BANDS_36.flatMap((nm, i) => nm < 400 || nm > 700 ? [] : [[nm, values[i]!] as const])

function fluorescents(): Svg {
  const seen = exactSeen({ light: 'D65' })
  const total = (ground: Lab) => {
    const { reflected, photons } = lightFrom(over(ground, [[orange, 2]]), seen)
    return reflected.map((value, i) => value + photons[i]! / seen.photons[i]!)
  }
  return plotCurves('A fluorescent orange over white and over black', NM, { from: 0, to: 3.2, marks: [0, 0.5, 1, 1.5, 2, 2.5, 3], words: 'share of what a perfect white sends back' }, [
    { name: 'over white', points: overBands(total(CARD_WHITE)) },
    { name: 'white, no glow', points: overBands(lightFrom(over(CARD_WHITE, [[orange, 2]]), seen).reflected) },
    { name: 'over black', points: overBands(total(CARD_BLACK)) },
  ])
}

function waterLight(): Svg {
  const left = (water: Water) => overBands(waterShares({ water, depth: 3, distance: 0 }).down.map(share => 100 * share))
  return plotCurves('Daylight left at three metres', NM, { ...PERCENT, words: 'per cent of the daylight' }, [
    { name: 'open sea, II', points: left('II') }, { name: 'coast, 3C', points: left('3C') }, { name: 'clear lake', points: left('clear') }, { name: 'tea-stained', points: left('tea-stained') },
  ])
}

function underWater(): Svg {
  const depths = [0, 2, 5, 10]
  const paints: [string, Stack][] = [
    ['red', over(CARD_WHITE, [[candy, 3]])], ['fluorescent', over(CARD_WHITE, [[orange, 2]])], ['olive', over(CARD_WHITE, [[olive, 2]])], ['cream', over(CARD_WHITE, [[cream, 2]])],
  ]
  const row = ([name, stack]: [string, Stack], water: Water, adapted: boolean) => ({
    name: `${name}${adapted ? ', used to it' : ''}`,
    fills: depths.map(depth => hexFromSrgb(promise(stack, depth === 0 ? 'D65' : exactSeen({ light: 'D65', water: { type: water, depth, distance: 1, adapted } })).srgb)),
  })
  return plotPatches('Paints in coastal water, 3C, seen from one metre', headsOver(['in air', '2 m', '5 m', '10 m']), paints.flatMap(paint => [row(paint, '3C', false), row(paint, '3C', true)]),
    'as a camera set for daylight sees them, and to an eye used to the water')
}

function spreads(): Svg {
  const passes = upTo(0, 6, 0.25)
  const curve = (name: string, optics: PaintOptics, ground: Lab, figure: 'typical' | 'most') => ({ name, points: passes.map(count => [count, promiseSpread(over(ground, [[optics, count]]))[figure]] as const) })
  return plotCurves('How sure a let-down is', { from: 0, to: 6, marks: [0, 1, 2, 3, 4, 5, 6], words: 'passes' }, { from: 0, to: 12, marks: [0, 2, 4, 6, 8, 10, 12], words: 'within so much, CIEDE2000' }, [
    curve('candy, mostly', candy, CARD_WHITE, 'most'), curve('candy, typically', candy, CARD_WHITE, 'typical'),
    curve('cream, mostly', cream, CARD_BLACK, 'most'), curve('cream, typically', cream, CARD_BLACK, 'typical'),
  ])
}

/** Every plot of docs/optics.md by the name of its file in docs/pictures, drawn from the engine as it is. */
export function opticsPlots(): Record<string, string> {
  const plots = {
    'optics-interference': interference(), 'optics-grounds': grounds(), 'optics-finish': finishes(), 'optics-let-down': letDowns(), 'optics-fluorescent': fluorescents(),
    'optics-water-light': waterLight(), 'optics-water': underWater(), 'optics-spread': spreads(),
  }
  return Object.fromEntries(Object.entries(plots).map(([name, svg]) => [`${name}.svg`, svgText(svg)]))
}
