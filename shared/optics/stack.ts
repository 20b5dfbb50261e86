import { assertBands, assertWithin, type Spectrum } from './bands'
import { coatLayer } from './coat-layer'
import { type Lab, labFromXyz, type Light, type Rgb, type Xyz, xyzFromReflectance } from './colorimetry'
import { type CoatLayer, layOver } from './film'
import { ASPECULAR, type Aspecular, radianceAtAngles } from './flake-angles'
import type { PaintOptics } from './paint-optics'
import { screenFromXyz, softShoulder } from './screen-colour'
import { type Finish, measuredSpectrum } from './surface'

/** One coat: a paint and the passes it was sprayed in. */
export interface Coat { optics: PaintOptics, passes: number }

/** A ground and the coats over it, the first sprayed first. */
export interface Stack {
  /** Reflectance inside the ground, 36 bands, 0…1 (`groundFromLab`). */
  ground: Spectrum
  coats: readonly Coat[]
  finish: Finish
}

/** Reflectance of a stack inside its film, and as seen through its surface; 36 bands each. */
export interface StackReflectance { internal: Float64Array, measured: Float64Array }

/** A colour three ways, and whether a screen had to draw it paler. */
export interface Colour { xyz: Xyz, lab: Lab, srgb: Rgb, outOfGamut: boolean }

/** What a stack will look like under one light, seen straight on and lit from 45°; with flakes also by angle. */
export interface Promised extends Colour {
  light: Light
  /** Only with flakes: colours by angle away from the gloss, 15…110 degrees. */
  angles?: Record<Aspecular, Colour>
  /** Only with flakes: mean of 15 and 25 degrees. */
  face?: Colour
  /** Only with flakes: 110 degrees. */
  flop?: Colour
}

/**
 * Diffuse reflectance of a stack of coats.
 *
 * @throws {RangeError} when the ground is not 36 values within 0…1, or a coat is out of range
 */
export function stackReflectance(stack: Stack): StackReflectance {
  const internal = layAll(stack, layersOf(stack))
  return { internal, measured: measuredSpectrum(internal, stack.finish) }
}

/** The colours a painter sees on the way up: bare ground first, then after each coat. Flakes are seen at 45°. */
export function coloursOnTheWayUp(stack: Stack, light: Light = 'D65'): Colour[] {
  const layers = layersOf(stack)
  return Array.from({ length: layers.length + 1 }, (_, count) => {
    const part = { ...stack, coats: stack.coats.slice(0, count) }
    return seenAt45(part, layers.slice(0, count), light)
  })
}

/** The colour a finished stack is promised to have under a light. */
export function promise(stack: Stack, light: Light = 'D65'): Promised {
  const layers = layersOf(stack)
  if (!hasFlakes(stack)) return { light, ...seenAt45(stack, layers, light) }

  const diffuse = measuredSpectrum(layAll(stack, layers), stack.finish)
  const radiance = radianceAtAngles(stack.coats, layers, diffuse)
  const angles = Object.fromEntries(ASPECULAR.map(angle => [angle, colourOf(radiance[angle], light, true)])) as Record<Aspecular, Colour>
  const face = radiance[15].map((value, i) => (value + radiance[25][i]!) / 2)
  return { light, ...angles[45], angles, face: colourOf(face, light, true), flop: angles[110] }
}

/** The three forms of a reflectance's colour; `bright` bends what outshines paper so that a screen can draw it. */
export function colourOf(reflectance: Spectrum, light: Light = 'D65', bright = false): Colour {
  const xyz = xyzFromReflectance(reflectance, light)
  const screen = screenFromXyz(bright ? softShoulder(xyz) : xyz, light)
  return { xyz, lab: labFromXyz(xyz, light), ...screen }
}

function hasFlakes(stack: Stack): boolean {
  return stack.coats.some(coat => coat.optics.flake !== undefined)
}

function seenAt45(stack: Stack, layers: readonly CoatLayer[], light: Light): Colour {
  const diffuse = measuredSpectrum(layAll(stack, layers), stack.finish)
  if (!hasFlakes(stack)) return colourOf(diffuse, light)
  return colourOf(radianceAtAngles(stack.coats, layers, diffuse, [45])[45], light, true)
}

function layersOf(stack: Stack): CoatLayer[] {
  assertBands('stack', 36, stack.ground)
  assertWithin('stack', 'the ground', 0, 1, stack.ground)
  return stack.coats.map(coat => coatLayer(coat.optics, coat.passes))
}

function layAll(stack: Stack, layers: readonly CoatLayer[]): Float64Array {
  const running = Float64Array.from(stack.ground)
  for (const layer of layers) layOver(layer, running, running)
  return running
}
