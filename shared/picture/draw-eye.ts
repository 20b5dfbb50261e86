import type { DrawnEye } from '#shared/blank/drawn-parts'
import { layOver, type Canvas } from './canvas'
import { noise2 } from './deposit/noise'
import type { EyeColours } from './eye-colours'
import { atNormal, type LightTables } from './light-tables'
import { glossLight } from './paint-light'
import { addGloss, tonePaint } from './tone'

/** Samples a pixel in each direction. */
const FINE = 4
/** Where the pupil ends and the dark rim begins, shares of the radius; how much longer the pupil is toward the nose. */
const PUPIL = 0.47
const RIM = 0.87
const TOWARD_NOSE = 0.06
/** The lens throws light through the iris to its far side: darker above, brighter below. */
const LENS = 0.34
/** Fibres of the foil: how many stand round the pupil, how strong, and how much farther out they vary. Chosen by eye. */
const FIBRES = [{ around: 7, strength: 0.10 }, { around: 19, strength: 0.13 }, { around: 44, strength: 0.10 }] as const
/** Foil drawn out from the pupil shines in a bow across the lamp. */
const BOW = { strength: 0.3, toward: 1.15 }
/** Light gathered by the lens on the side away from the lamp, and the shade of the socket's brow on the other. */
const GATHERED = { strength: 0.55, at: 0.68, width: 0.13 }
const BROW = { strength: 0.5, from: 0.35 }
/** Foil behind a dome sees less of the tent than paint does. */
const FOIL = 0.78
/** An eye is polished: its highlight outshines the clear round it. */
const SHINE = 1.25

const smooth = (from: number, to: number, x: number) => {
  const t = Math.min(1, Math.max(0, (x - from) / (to - from)))
  return t * t * (3 - 2 * t)
}

/** Draws a fitted eye: foil iris with its streaks, pupil, rim and the highlight of its dome. */
export function drawEye(canvas: Canvas, eye: DrawnEye, colours: EyeColours, tables: LightTables, plain: boolean): void {
  const [i00, i01, i10, i11] = eye.inverse
  const determinant = Math.abs(i00 * i11 - i01 * i10)
  if (!(determinant > 0)) return
  // Half extents of the ellipse in the picture, from the inverse of its matrix.
  const reachX = Math.hypot(i01, i11) / determinant + 1, reachY = Math.hypot(i00, i10) / determinant + 1
  const soft = Math.sqrt(determinant)
  const rgb = new Float32Array(3)
  const left = Math.max(0, Math.floor(eye.centre[0] - reachX)), right = Math.min(canvas.width - 1, Math.ceil(eye.centre[0] + reachX))
  const top = Math.max(0, Math.floor(eye.centre[1] - reachY)), bottom = Math.min(canvas.height - 1, Math.ceil(eye.centre[1] + reachY))
  for (let row = top; row <= bottom; row++) {
    for (let column = left; column <= right; column++) {
      let hits = 0, red = 0, green = 0, blue = 0
      for (let k = 0; k < FINE * FINE; k++) {
        const dx = column + (k % FINE + 0.5) / FINE - eye.centre[0], dy = row + (Math.floor(k / FINE) + 0.5) / FINE - eye.centre[1]
        const a = i00 * dx + i01 * dy, b = i10 * dx + i11 * dy
        if (a * a + b * b > 1) continue
        eyeLight(eye, colours, a, b, soft, tables, plain, rgb)
        hits++
        red += rgb[0]!
        green += rgb[1]!
        blue += rgb[2]!
      }
      if (hits === 0) continue
      // Only where the body is: an eye near the outline ends with it.
      const pixel = row * canvas.width + column
      const seen = Math.min(1, canvas.body[pixel]!) / FINE ** 2
      layOver(canvas, pixel, seen * hits, seen * red, seen * green, seen * blue)
    }
  }
}

function eyeLight(eye: DrawnEye, colours: EyeColours, a: number, b: number, soft: number, tables: LightTables, plain: boolean, rgb: Float32Array): void {
  const q = Math.hypot(a, b)
  const lean = 0.85 + 0.3 * q ** 5
  const [tx, ty, tz] = eye.toTail, [ux, uy, uz] = eye.up, [fx, fy, fz] = eye.facing
  const x = fx + lean * (a * tx + b * ux), y = fy + lean * (a * ty + b * uy), z = fz + lean * (a * tz + b * uz)
  const size = Math.hypot(x, y, z)
  const light = plain ? 1 : 1 + 0.5 * (atNormal(tables.irradiance, x / size, y / size) - 1)

  const [ca, cb] = q > 0 ? [a / q, b / q] : [1, 0]
  let streak = 1
  FIBRES.forEach(({ around, strength }, k) => {
    // Fibres end at different lengths: the pattern drifts as it runs out.
    streak += strength * noise2(around * ca + 2.2 * q, around * cb - 1.6 * q, 5 + 4 * k)
  })
  streak *= 1 + BOW.strength * ((ca * Math.cos(BOW.toward) + cb * Math.sin(BOW.toward)) ** 2 - 0.5)
  const along = a < 0 ? a / (1 + TOWARD_NOSE) : a
  const toPupil = smooth(PUPIL + soft, PUPIL - soft, Math.hypot(along, b))
  const toRim = smooth(RIM - 0.05, RIM + 0.11, q)
  // A fine bright ring where the foil turns in to the pupil, and a dark seat round the whole eye.
  const ring = 1 + 0.35 * Math.exp(-(((q - PUPIL - 0.05) / 0.05) ** 2))
  const seat = 1 - 0.6 * smooth(0.94, 1, q)
  const gathered = GATHERED.strength * Math.exp(-(((q - GATHERED.at) / GATHERED.width) ** 2)) * Math.max(0, -cb) ** 2
  const brow = 1 - BROW.strength * smooth(BROW.from, 1, b) * smooth(PUPIL, 1, q)
  const foil = FOIL * streak * ring * brow * (1 - LENS * b + gathered) * (0.88 + 0.24 * smooth(0.5, 0.75, q))
  for (let c = 0; c < 3; c++) {
    const iris = colours.iris[c]! * foil
    const ringed = iris + (colours.rim[c]! - iris) * toRim
    rgb[c] = light * seat * (ringed + (colours.pupil[c]! * (1 - 0.3 * b) - ringed) * toPupil)
  }
  tonePaint(rgb, 0)
  if (!plain) addGloss(rgb, 0, SHINE * glossLight(tables, x / size, y / size, z / size))
}
