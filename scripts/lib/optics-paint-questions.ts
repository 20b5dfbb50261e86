import { coatLayer } from '../../shared/optics/coat-layer'
import { labFromReflectance } from '../../shared/optics/colorimetry'
import { findCoatNow } from '../../shared/optics/find-coat'
import { radianceAtAngles } from '../../shared/optics/flake-angles'
import { layOver } from '../../shared/optics/film'
import { glowPhotons } from '../../shared/optics/glow'
import { fallingLight, radianceFactor } from '../../shared/optics/light-power'
import { filmOptics, paintOpticsFrom } from '../../shared/optics/paint-optics'
import { promise, stackReflectance } from '../../shared/optics/stack'
import { measuredSpectrum } from '../../shared/optics/surface'
import { reflectanceUnderWater, waterLight } from '../../shared/optics/under-water'
import { isWater, WATERS } from '../../shared/optics/water'
import { type Fields, fields, finishOf, lightOf, list, number, numbers, within } from './optics-question'

/** Colours of a coat of pearl by angle from the gloss. */
export function pearl({ thickness, oxide, meanFlakes, sigma, edge, ground, aspecular }: Fields): object {
  const optics = paintOpticsFrom({
    how: 'interference', oxide: oxideOf(oxide), thickness: number('thickness', thickness), flakesPerPass: number('meanFlakes', meanFlakes),
    sigma: number('sigma', sigma), edge: number('edge', edge),
  })
  const under = numbers('ground', ground, 36)
  within('ground', under, 0, 1)
  const angles = list('aspecular', aspecular).map((angle, i) => number(`aspecular[${i}]`, angle))
  within('aspecular', angles, 0, 130)
  const layer = coatLayer(optics, 1)
  const seen = radianceAtAngles([{ optics, passes: 1 }], [layer], measuredSpectrum(layOver(layer, under), 'gloss'), angles)
  return { lab: angles.map(angle => labFromReflectance(seen[angle]!)) }
}

function oxideOf(value: unknown): 'anatase' | 'rutile' | 'hematite' {
  if (value === 'anatase' || value === 'rutile' || value === 'hematite') return value
  throw new RangeError(`"oxide" must be one of anatase, rutile, hematite, got ${JSON.stringify(value) ?? 'nothing'}`)
}

/** What a coat that glows sends back and gives off, as shares of a perfect white, and its colour; under gloss. */
export function fluorescent({ Kf, Ko, S, emission, yield: quantumYield, passes, ground, light }: Fields): object {
  const feeding = numbers('Kf', Kf, 36), other = numbers('Ko', Ko, 36)
  within('Kf', feeding, 0, Number.MAX_VALUE)
  within('Ko', other, 0, Number.MAX_VALUE)
  const photonYield = number('yield', quantumYield)
  within('yield', [photonYield], 0, 1)
  const film = filmOptics(feeding.map((value, i) => value + other[i]!), numbers('S', S, 36))
  const optics = { ...film, fluorescent: { peak: 600, width: 60, quantumYield: photonYield, Kf: feeding, emission: numbers('emission', emission, 36) } }
  const coat = { optics, passes: number('passes', passes) }
  const under = numbers('ground', ground, 36), falling = lightOf(light)
  const stack = { ground: under, coats: [coat], finish: 'gloss' as const }
  const photons = glowPhotons([{ ...coat, layer: coatLayer(optics, coat.passes) }], under, fallingLight(falling).photons)
  return {
    reflected: Array.from(stackReflectance(stack).measured),
    luminescent: Array.from(radianceFactor(photons, falling)),
    lab: promise(stack, falling).lab,
  }
}

/** A reflectance as it looks under water. */
export function water({ water: name, depth, distance, reflectance }: Fields): object {
  if (!isWater(name)) throw new RangeError(`"water" must be one of ${WATERS.join(', ')}, got ${JSON.stringify(name) ?? 'nothing'}`)
  const place = { water: name, depth: number('depth', depth), distance: number('distance', distance) }
  const values = numbers('reflectance', reflectance, 36)
  within('reflectance', values, 0, 100)
  return { ...reflectanceUnderWater(values, place), light: Array.from(waterLight(place).power) }
}

/** Paints and drop mixes that come nearest to a colour. */
export function find({ target, ground, finish, light, second, paints, drops, parts, passes }: Fields): object {
  const [L, a, b] = numbers('target', target, 3) as [number, number, number]
  within('target: lightness', [L], 0, 130)
  const under = numbers('ground', ground, 36)
  return findCoatNow({
    target: [L, a, b], ground: under, finish: finish === undefined ? 'gloss' : finishOf(finish), light: lightOf(light),
    second: second === undefined ? 'A' : lightOf(second),
    shelf: list('paints', paints).map((one, i) => {
      const { id, K, S } = fields(`paints[${i}]`, one)
      if (typeof id !== 'string') throw new RangeError(`"paints[${i}].id" must be a text`)
      return { id, optics: filmOptics(numbers(`paints[${i}].K`, K, 36), numbers(`paints[${i}].S`, S, 36)) }
    }),
    ...(drops === undefined ? {} : { dropsMost: number('drops', drops) }),
    ...(parts === undefined ? {} : { partsMost: number('parts', parts) }),
    ...(passes === undefined ? {} : { passesMost: number('passes', passes) }),
  })
}
