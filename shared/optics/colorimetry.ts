import { assertBands, type Spectrum } from './bands'
import { type Light, weightsFor, type Xyz } from './lights'

export type { Light, Xyz } from './lights'

/** Lightness L* 0…100, and a* (green to red) and b* (blue to yellow). */
export type Lab = [L: number, a: number, b: number]

/** Lightness, chroma and hue in degrees 0…360. */
export type Lch = [L: number, C: number, h: number]

/** Red, green and blue; 0…1 is what an ordinary screen shows. */
export type Rgb = [r: number, g: number, b: number]

const EPSILON = 216 / 24389
const KAPPA = 24389 / 27

/**
 * X, Y and Z of a reflectance under a light, CIE 1931 observer; Y of a perfect white is 1.
 *
 * @param reflectance as measured, 36 bands; above 1 is allowed (pearl faces, fluorescents)
 * @throws {RangeError} when there are not 36 bands
 */
export function xyzFromReflectance(reflectance: Spectrum, light: Light = 'D65'): Xyz {
  assertBands('xyzFromReflectance', 36, reflectance)
  const { x, y, z } = weightsFor(light)
  let sumX = 0, sumY = 0, sumZ = 0
  for (let i = 0; i < 36; i++) {
    const r = reflectance[i]!
    sumX += x[i]! * r
    sumY += y[i]! * r
    sumZ += z[i]! * r
  }
  return [sumX, sumY, sumZ]
}

/** L*, a*, b* of a colour against the white of its light. @source CIE 015; constants 216/24389 and 24389/27 exact */
export function labFromXyz(xyz: Xyz, light: Light = 'D65'): Lab {
  return labAgainst(xyz, weightsFor(light).white)
}

/** L*, a*, b* of a colour against a white in the same units. */
export function labAgainst(xyz: Xyz, white: Xyz): Lab {
  const fx = squash(xyz[0] / white[0]), fy = squash(xyz[1] / white[1]), fz = squash(xyz[2] / white[2])
  return [116 * fy - 16, 500 * (fx - fy), 200 * (fy - fz)]
}

/** X, Y and Z of a colour given as L*, a*, b* against the white of its light. */
export function xyzFromLab([L, a, b]: Lab, light: Light = 'D65'): Xyz {
  const white = weightsFor(light).white
  const fy = (L + 16) / 116
  return [white[0] * unsquash(fy + a / 500), white[1] * unsquash(fy), white[2] * unsquash(fy - b / 200)]
}

/** L*, a*, b* of a reflectance as measured, 36 bands, under a light. */
export function labFromReflectance(reflectance: Spectrum, light: Light = 'D65'): Lab {
  return labFromXyz(xyzFromReflectance(reflectance, light), light)
}

/** Lightness, chroma and hue of a Lab colour; the hue of a grey is 0. */
export function lchFromLab([L, a, b]: Lab): Lch {
  const hue = Math.atan2(b, a) * 180 / Math.PI
  return [L, Math.hypot(a, b), hue < 0 ? hue + 360 : hue]
}

/** L*, a*, b* from lightness, chroma and hue in degrees. */
export function labFromLch([L, C, h]: Lch): Lab {
  const angle = h * Math.PI / 180
  return [L, C * Math.cos(angle), C * Math.sin(angle)]
}

/** Lightness L* of a luminance Y, 0…1. Y = 0.18 gives 49.5. */
export function lightnessOf(Y: number): number {
  return 116 * squash(Y) - 16
}

/** The cube root that CIELAB bends straight near black. */
function squash(t: number): number {
  return t > EPSILON ? Math.cbrt(t) : (KAPPA * t + 16) / 116
}

function unsquash(f: number): number {
  const cube = f ** 3
  return cube > EPSILON ? cube : (116 * f - 16) / KAPPA
}
