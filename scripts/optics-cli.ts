import { labFromXyz, xyzFromReflectance } from '../shared/optics/colorimetry'
import { deltaE2000 } from '../shared/optics/delta-e'
import { filmInto, overGround } from '../shared/optics/film'
import type { Light } from '../shared/optics/lights'
import { filmOptics } from '../shared/optics/paint-optics'
import { screenFromXyz } from '../shared/optics/screen-colour'
import { spectrumFromLab } from '../shared/optics/spectrum-from-colour'
import { stackReflectance } from '../shared/optics/stack'
import { thinFilm } from '../shared/optics/thin-film'
import { coefficientsFromTwoGrounds } from '../shared/optics/two-grounds'
import { type Fields, fields, finishOf, lightOf, list, number, numbers, parse, within } from './lib/optics-question'
import { find, fluorescent, pearl, water } from './lib/optics-paint-questions'

const OPERATIONS = { layer, film, spectrum, colour, deltaE, twoGrounds, stack, pearl, fluorescent, water, find }

/**
 * Answers one question put as JSON.
 *
 * @throws {RangeError} with one sentence saying what is wrong with the question
 */
export function answer(text: string): object {
  const question = fields('the question', parse(text))
  const operation = Object.entries(OPERATIONS).find(([name]) => name === question.op)?.[1]
  if (!operation) throw new RangeError(`"op" must be one of ${Object.keys(OPERATIONS).join(', ')}, got ${JSON.stringify(question.op) ?? 'nothing'}`)
  return operation(question)
}

function layer({ cases }: Fields): object {
  const pair = new Float64Array(2)
  const answers = list('cases', cases).map((one, i) => {
    const [K, S, X, ground] = numbers(`cases[${i}]`, one, 4) as [number, number, number, number]
    within(`cases[${i}]: K, S and X`, [K, S, X], 0, Number.MAX_VALUE)
    within(`cases[${i}]: the ground`, [ground], 0, 1)
    filmInto(K, S, X, pair)
    return { R: pair[0]!, T: pair[1]!, over: overGround(pair[0]!, pair[1]!, ground) }
  })
  return { R: answers.map(a => a.R), T: answers.map(a => a.T), over: answers.map(a => a.over) }
}

function film({ cases }: Fields): object {
  const answers = list('cases', cases).map((one, i) => {
    const where = `cases[${i}]`
    const { wavelength, angle, n0, films, nExit } = fields(where, one)
    return thinFilm({
      wavelength: number(`${where}.wavelength`, wavelength),
      angle: number(`${where}.angle`, angle),
      n0: number(`${where}.n0`, n0),
      nExit: number(`${where}.nExit`, nExit),
      films: list(`${where}.films`, films).map((part, j) => {
        const { n, k, d } = fields(`${where}.films[${j}]`, part)
        return { n: number(`${where}.films[${j}].n`, n), k: number(`${where}.films[${j}].k`, k), d: number(`${where}.films[${j}].d`, d) }
      }),
    })
  })
  return { R: answers.map(a => a.R), T: answers.map(a => a.T) }
}

function spectrum({ lab, light }: Fields): object {
  const [L, a, b] = numbers('lab', lab, 3) as [number, number, number]
  within('lab: lightness', [L], 0, 100)
  const under = lightOf(light)
  const { reflectance, exact } = spectrumFromLab([L, a, b], under)
  if (!exact) throw new RangeError(`no surface can have the colour ${L}, ${a}, ${b} under ${under}`)
  return { reflectance: Array.from(reflectance) }
}

function colour({ reflectance, light }: Fields): object {
  const values = numbers('reflectance', reflectance, 36)
  within('reflectance', values, 0, 100)
  return coloursOf(values, lightOf(light))
}

function deltaE({ pairs }: Fields): object {
  return {
    deltaE: list('pairs', pairs).map((one, i) => {
      const [L1, a1, b1, L2, a2, b2] = numbers(`pairs[${i}]`, one, 6) as [number, number, number, number, number, number]
      return deltaE2000([L1, a1, b1], [L2, a2, b2])
    }),
  }
}

function twoGrounds({ black, white, overBlack, overWhite, passes }: Fields): object {
  const { K, S, clipped } = coefficientsFromTwoGrounds({
    black: numbers('black', black, 36),
    white: numbers('white', white, 36),
    overBlack: numbers('overBlack', overBlack, 36),
    overWhite: numbers('overWhite', overWhite, 36),
    passes: number('passes', passes),
  })
  return { K: Array.from(K), S: Array.from(S), clipped }
}

function stack({ ground, coats, finish, light }: Fields): object {
  const { measured } = stackReflectance({
    ground: numbers('ground', ground, 36),
    coats: list('coats', coats).map((one, i) => {
      const { K, S, passes } = fields(`coats[${i}]`, one)
      return {
        optics: filmOptics(numbers(`coats[${i}].K`, K, 36), numbers(`coats[${i}].S`, S, 36)),
        passes: number(`coats[${i}].passes`, passes),
      }
    }),
    finish: finishOf(finish),
  })
  const reflectance = Array.from(measured)
  return { reflectance, ...coloursOf(reflectance, lightOf(light)) }
}

function coloursOf(reflectance: number[], light: Light): { xyz: number[], lab: number[], srgb: number[] } {
  const xyz = xyzFromReflectance(reflectance, light)
  return { xyz, lab: labFromXyz(xyz, light), srgb: screenFromXyz(xyz, light).srgb }
}
