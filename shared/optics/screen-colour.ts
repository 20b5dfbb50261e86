import type { Light, Rgb, Xyz } from './colorimetry'
import { weightsFor } from './lights'

/** Nine numbers, row by row. */
export type Matrix3 = readonly [number, number, number, number, number, number, number, number, number]

/** A colour as a screen can show it, and whether the screen had to give up chroma for it. */
export interface ScreenColour {
  /** Encoded sRGB, 0…1. */
  srgb: Rgb
  /** True when an ordinary screen cannot show the colour and it was drawn paler at the same lightness and hue. */
  outOfGamut: boolean
}

/** Corners of the sRGB triangle, x and y. @source IEC 61966-2-1 (same corners as ITU-R BT.709) */
const RED = [0.64, 0.33], GREEN = [0.30, 0.60], BLUE = [0.15, 0.06]

/** @source K. M. Lam, "Metamerism and colour constancy" (1985), the "Bradford" cone matrix */
const BRADFORD: Matrix3 = [0.8951, 0.2664, -0.1614, -0.7502, 1.7135, 0.0367, 0.0389, -0.0685, 1.0296]

/** X, Y, Z under D65 to linear sRGB, worked out from the corners so that our white is exactly 1, 1, 1. */
export const LINEAR_SRGB_FROM_XYZ: Matrix3 = inverse(xyzFromLinear())

const BRADFORD_BACK = inverse(BRADFORD)

function xyzFromLinear(): Matrix3 {
  const column = ([x, y]: number[]) => [x! / y!, 1, (1 - x! - y!) / y!] as const
  const r = column(RED), g = column(GREEN), b = column(BLUE)
  const corners: Matrix3 = [r[0], g[0], b[0], r[1], g[1], b[1], r[2], g[2], b[2]]
  const s = times(inverse(corners), weightsFor('D65').white)
  return [
    r[0] * s[0], g[0] * s[1], b[0] * s[2],
    r[1] * s[0], g[1] * s[1], b[1] * s[2],
    r[2] * s[0], g[2] * s[1], b[2] * s[2],
  ]
}

/** A matrix times three numbers. */
export function times(m: Matrix3, [x, y, z]: readonly [number, number, number]): [number, number, number] {
  return [m[0] * x + m[1] * y + m[2] * z, m[3] * x + m[4] * y + m[5] * z, m[6] * x + m[7] * y + m[8] * z]
}

function inverse(m: Matrix3): Matrix3 {
  const [a, b, c, d, e, f, g, h, i] = m
  const A = e * i - f * h, B = f * g - d * i, C = d * h - e * g
  const det = a * A + b * B + c * C
  return [
    A / det, (c * h - b * i) / det, (b * f - c * e) / det,
    B / det, (a * i - c * g) / det, (c * d - a * f) / det,
    C / det, (b * g - a * h) / det, (a * e - b * d) / det,
  ]
}

/**
 * The colour in daylight that looks as this one does to an eye used to its light.
 *
 * @source Bradford transform, complete adaptation
 */
export function adaptToDaylight(xyz: Xyz, light: Light): Xyz {
  return light === 'D65' ? xyz : adaptWithin(xyz, weightsFor(light).white, Infinity)
}

/**
 * The colour in daylight that looks as this one does to an eye used to a local white as far as it can be.
 *
 * @param white X, Y, Z of a white in the local light, in the units of `xyz`
 * @param most  the most that each cone channel may be raised
 * @source Bradford transform, its three gains held at `most`
 */
export function adaptWithin(xyz: Xyz, white: Xyz, most: number): Xyz {
  const from = times(BRADFORD, white), to = times(BRADFORD, weightsFor('D65').white), cones = times(BRADFORD, xyz)
  const gain = (i: 0 | 1 | 2) => from[i] > 0 ? Math.min(most, to[i] / from[i]) : most
  return times(BRADFORD_BACK, [cones[0] * gain(0), cones[1] * gain(1), cones[2] * gain(2)])
}

/** Linear sRGB of a colour under D65; may lie outside 0…1. */
export function linearFromXyz(xyz: Xyz): Rgb {
  return times(LINEAR_SRGB_FROM_XYZ, xyz)
}

/** X, Y, Z under D65 of a linear sRGB colour. */
export function xyzFromLinearRgb(rgb: Rgb): Xyz {
  return times(xyzFromLinear(), rgb)
}

/** Encodes one linear channel for the screen. @source IEC 61966-2-1 */
export function encodeChannel(linear: number): number {
  return linear <= 0.0031308 ? 12.92 * linear : 1.055 * linear ** (1 / 2.4) - 0.055
}

/** Undoes `encodeChannel`. */
export function decodeChannel(encoded: number): number {
  return encoded <= 0.04045 ? encoded / 12.92 : ((encoded + 0.055) / 1.055) ** 2.4
}

/**
 * Lets colours brighter than paper bend towards white instead of breaking off: a soft shoulder above Y = 0.8.
 * For pearl faces and fluorescents only; it would dull an ordinary white.
 *
 * @returns the same chromaticity with Y below 1
 */
export function softShoulder([x, y, z]: Xyz): Xyz {
  if (y <= 0.8) return [x, y, z]
  const scale = (1 - 0.2 * Math.exp(-(y - 0.8) / 0.2)) / y
  return [x * scale, y * scale, z * scale]
}

/** Where the brightest channel of a glowing colour begins to bend, and how softly. Chosen by eye. */
const GLOW_KNEE = 0.8, GLOW_SOFTNESS = 0.28

/**
 * Screen colour of paint that gives off light: the brightest channel bends softly above 0.8 and takes the others with it, so
 * that an orange that outshines the screen stays orange instead of turning pale.
 */
export function screenFromGlow(xyz: Xyz, light: Light = 'D65'): ScreenColour {
  const linear = linearFromXyz(adaptToDaylight(xyz, light))
  const most = Math.max(...linear)
  const bent = most > GLOW_KNEE ? GLOW_KNEE + (1 - GLOW_KNEE) * (1 - Math.exp(-(most - GLOW_KNEE) / GLOW_SOFTNESS)) : most
  const held = linear.map(channel => most > GLOW_KNEE ? channel * bent / most : channel) as Rgb // three of three
  const [r, g, b] = isInside(held) ? held : intoGamut(held)
  return { srgb: [encodeClamped(r), encodeClamped(g), encodeClamped(b)], outOfGamut: !isInside(linear) }
}

/** Screen colour of X, Y, Z seen under a light by an eye used to that light. */
export function screenFromXyz(xyz: Xyz, light: Light = 'D65'): ScreenColour {
  const linear = linearFromXyz(adaptToDaylight(xyz, light))
  const outOfGamut = !isInside(linear)
  const shown = outOfGamut ? intoGamut(linear) : linear
  return { srgb: [encodeClamped(shown[0]), encodeClamped(shown[1]), encodeClamped(shown[2])], outOfGamut }
}

/** Six hexadecimal digits after a hash, for `fill` attributes and labels. */
export function hexFromSrgb(srgb: Rgb): string {
  return '#' + srgb.map(c => Math.round(Math.min(1, Math.max(0, c)) * 255).toString(16).padStart(2, '0')).join('')
}

function encodeClamped(linear: number): number {
  return encodeChannel(Math.min(1, Math.max(0, linear)))
}

const SLACK = 1e-7
function isInside([r, g, b]: Rgb): boolean {
  return Math.min(r, g, b) >= -SLACK && Math.max(r, g, b) <= 1 + SLACK
}

/**
 * Draws a colour that a screen cannot show paler, at the same Oklab lightness and hue, until it can.
 * Turns the hue far less than clipping the channels does.
 *
 * @param linear linear sRGB, any range
 * @returns linear sRGB within 0…1
 * @source Oklab: B. Ottosson, "A perceptual color space for image processing" (2020)
 */
export function intoGamut(linear: Rgb): Rgb {
  const [L, a, b] = oklabFromLinear(linear)
  if (!(L > 0)) return [0, 0, 0]
  if (L >= 1) return [1, 1, 1]
  let low = 0, high = 1
  for (let i = 0; i < 40; i++) {
    const middle = (low + high) / 2
    if (isInside(linearFromOklab([L, a * middle, b * middle]))) low = middle
    else high = middle
  }
  const [red, green, blue] = linearFromOklab([L, a * low, b * low])
  return [clampUnit(red), clampUnit(green), clampUnit(blue)]
}

function clampUnit(value: number): number {
  return Math.min(1, Math.max(0, value))
}

/** Oklab of a linear sRGB colour. */
export function oklabFromLinear([r, g, b]: Rgb): [L: number, a: number, b: number] {
  const l = Math.cbrt(0.4122214708 * r + 0.5363325363 * g + 0.0514459929 * b)
  const m = Math.cbrt(0.2119034982 * r + 0.6806995451 * g + 0.1073969566 * b)
  const s = Math.cbrt(0.0883024619 * r + 0.2817188376 * g + 0.6299787005 * b)
  return [
    0.2104542553 * l + 0.7936177850 * m - 0.0040720468 * s,
    1.9779984951 * l - 2.4285922050 * m + 0.4505937099 * s,
    0.0259040371 * l + 0.7827717662 * m - 0.8086757660 * s,
  ]
}

/** Linear sRGB of an Oklab colour. */
export function linearFromOklab([L, a, b]: readonly [number, number, number]): Rgb {
  const l = (L + 0.3963377774 * a + 0.2158037573 * b) ** 3
  const m = (L - 0.1055613458 * a - 0.0638541728 * b) ** 3
  const s = (L - 0.0894841775 * a - 1.2914855480 * b) ** 3
  return [
    4.0767416621 * l - 3.3077115913 * m + 0.2309699292 * s,
    -1.2684380046 * l + 2.6097574011 * m - 0.3413193965 * s,
    -0.0041960863 * l - 0.7034186147 * m + 1.7076147010 * s,
  ]
}
