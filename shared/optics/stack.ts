import { assertBands, assertWithin, type Spectrum } from './bands'
import { coatLayer } from './coat-layer'
import type { Lab, Light, Rgb, Xyz } from './colorimetry'
import { type CoatLayer, layOver } from './film'
import { ASPECULAR, type Aspecular, radianceAtAngles } from './flake-angles'
import { glowPhotons, hasGlow } from './glow'
import { weigh } from './light-power'
import type { PaintOptics } from './paint-optics'
import { type ScreenColour, screenFromGlow, screenFromXyz, softShoulder } from './screen-colour'
import { type ExactSeen, resolveSeen } from './seen-exact'
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

/** What in a stack may outshine paper: nothing, flakes that mirror, or paint that gives off light. */
export type Brightness = 'paper' | 'flakes' | 'glow'

/** What a stack will look like, seen straight on and lit from 45°; with flakes also by angle. */
export interface Promised extends Colour {
  /** What outshines paper in it, and so how a screen bends it. */
  brightness: Brightness
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

/**
 * The colours a painter sees on the way up: bare ground first, then after each coat. Flakes are seen at 45°.
 *
 * @param by a light by name in air, or anything a piece can be seen by (`exactSeen`)
 */
export function coloursOnTheWayUp(stack: Stack, by: Light | ExactSeen = 'D65'): Colour[] {
  const seen = resolveSeen(by)
  const layers = layersOf(stack)
  return Array.from({ length: layers.length + 1 }, (_, count) => {
    const part = { ...stack, coats: stack.coats.slice(0, count) }
    return seenAt45(part, layers.slice(0, count), seen)
  })
}

/**
 * The colour a finished stack is promised to have; with what its fluorescents give off in that light.
 *
 * @param by a light by name in air, or anything a piece can be seen by (`exactSeen`)
 */
export function promise(stack: Stack, by: Light | ExactSeen = 'D65'): Promised {
  const seen = resolveSeen(by)
  const layers = layersOf(stack)
  const brightness = brightnessOf(stack)
  if (!hasFlakes(stack)) return { brightness, ...seenAt45(stack, layers, seen) }

  const diffuse = measuredSpectrum(layAll(stack, layers), stack.finish, undefined, seen.surface)
  const glow = glowXyz(stack, layers, seen)
  const radiance = radianceAtAngles(stack.coats, layers, diffuse, ASPECULAR, seen.surface)
  const shown = (reflectance: Spectrum) => colourOf(reflectance, seen, brightness, glow)
  const angles = Object.fromEntries(ASPECULAR.map(angle => [angle, shown(radiance[angle])])) as Record<Aspecular, Colour>
  const face = radiance[15].map((value, i) => (value + radiance[25][i]!) / 2)
  return { brightness, ...angles[45], angles, face: shown(face), flop: angles[110] }
}

/**
 * Light that leaves a stack, 36 bands: its radiance factor lit from 45° and seen straight on, and the photons it gives off in the
 * units of `ExactSeen.photons`.
 */
export function lightFrom(stack: Stack, seen: ExactSeen): { reflected: Float64Array, photons: Float64Array } {
  const layers = layersOf(stack)
  return { reflected: reflectedAt45(stack, layers, seen), photons: givenOff(stack, layers, seen) }
}

/** The three forms of a reflectance's colour, with light given off added; what may outshine paper is bent so that a screen can draw it. */
export function colourOf(reflectance: Spectrum, by: Light | ExactSeen = 'D65', brightness: Brightness = 'paper', glow: Xyz = [0, 0, 0]): Colour {
  const seen = resolveSeen(by)
  const [x, y, z] = weigh(seen.weights, reflectance)
  const xyz: Xyz = [x + glow[0], y + glow[1], z + glow[2]]
  return { xyz, lab: seen.lab(xyz), ...screenOf(xyz, brightness, seen) }
}

/** How a screen draws a colour. */
export function screenOf(xyz: Xyz, brightness: Brightness, by: Light | ExactSeen = 'D65'): ScreenColour {
  const shown = resolveSeen(by).toDaylight(xyz)
  switch (brightness) {
    case 'paper': return screenFromXyz(shown)
    case 'flakes': return screenFromXyz(softShoulder(shown))
    case 'glow': return screenFromGlow(shown)
  }
}

function brightnessOf({ coats }: Stack): Brightness {
  if (hasGlow(coats)) return 'glow'
  return coats.some(coat => coat.optics.flake !== undefined) ? 'flakes' : 'paper'
}

function hasFlakes(stack: Stack): boolean {
  return stack.coats.some(coat => coat.optics.flake !== undefined)
}

function seenAt45(stack: Stack, layers: readonly CoatLayer[], seen: ExactSeen): Colour {
  return colourOf(reflectedAt45(stack, layers, seen), seen, brightnessOf(stack), glowXyz(stack, layers, seen))
}

function reflectedAt45(stack: Stack, layers: readonly CoatLayer[], { surface }: ExactSeen): Float64Array {
  const diffuse = measuredSpectrum(layAll(stack, layers), stack.finish, undefined, surface)
  return hasFlakes(stack) ? radianceAtAngles(stack.coats, layers, diffuse, [45], surface)[45] : diffuse
}

function glowXyz(stack: Stack, layers: readonly CoatLayer[], seen: ExactSeen): Xyz {
  return hasGlow(stack.coats) ? weigh(seen.given, givenOff(stack, layers, seen)) : [0, 0, 0]
}

function givenOff({ coats, ground }: Stack, layers: readonly CoatLayer[], { photons, surface }: ExactSeen): Float64Array {
  return glowPhotons(coats.map((coat, i) => ({ ...coat, layer: layers[i]! })), ground, photons, surface)
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
