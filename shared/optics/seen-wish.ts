import { z } from 'zod'
import { KELVIN_MAX, KELVIN_MIN } from './kelvin-light'
import { LIGHTS } from './lights'
import { WATERS } from './water'

/** Deepest a lure is looked at, and from farthest away; m. */
export const DEPTH_MAX = 60, DISTANCE_MAX = 20

/** A light by name, or a white light of the workshop's own by its correlated colour temperature, kelvin. */
export const SeenLamp = z.union([z.enum(LIGHTS), z.object({ kelvin: z.number().min(KELVIN_MIN).max(KELVIN_MAX) })])
export type SeenLamp = z.output<typeof SeenLamp>

/** Water between the light, the piece and the eye. */
export const SeenWater = z.object({
  type: z.enum(WATERS),
  /** How deep the piece swims, and from how far it is seen; m. */
  depth: z.number().min(0).max(DEPTH_MAX),
  distance: z.number().min(0).max(DISTANCE_MAX),
  /** Seen by an eye used to the place, as far as an eye gets used to it; otherwise as a camera set for the light above the water sees it. */
  adapted: z.boolean(),
})
export type SeenWater = z.output<typeof SeenWater>

/** Whose eye: a person's, or a map of what a largemouth bass's two cones would tell apart. */
export const SEEN_EYES = ['person', 'bass'] as const

/** What something is seen by: a light, the water in between if there is any, and whose eye; a person's when left out. */
export const SeenWish = z.object({ light: SeenLamp, water: SeenWater.optional(), eye: z.enum(SEEN_EYES).optional() })
export type SeenWish = z.output<typeof SeenWish>

export { DAYLIGHT_IN_AIR, seenKey } from './seen-key'
