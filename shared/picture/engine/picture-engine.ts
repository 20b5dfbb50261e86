import type { Lighting, SampleForm } from '../paint-light'
import type { KeyedCoat, ViewKit } from '../view-kit'

/** Ways of working out a picture's light; all of them come to the same. */
export type EngineName = 'plain' | 'simd' | 'webgl2'

/** What the light of a picture's samples is asked for. */
export interface LightAsk {
  /** Says all of the ground. */
  groundKey: string
  /** Reflectance inside the ground, 16 bands. */
  ground: ArrayLike<number>
  /** The coats shown, from the ground up: a code per sample, its table, and a key that says both. */
  coats: readonly KeyedCoat[]
  /** The samples of the kit with their normals and grain; with fitted eyes or blind ones. */
  form: SampleForm
  lighting: Lighting
}

/**
 * Works out the light of every sample of a view: lays the coats, lights flakes and glow, adds gloss, bends it for the screen.
 *
 * An engine keeps what it likes of a kit's last picture, and lets go of it when the kit is let go of. `light` throws when the
 * machine has taken away what the engine runs on; the engine is of no use from then on, and the next one takes over.
 *
 * @accuracy CIEDE2000 at most 0.5 and 0.1 on the mean from evaluation in double precision
 */
export interface PictureEngine {
  readonly name: EngineName
  /** Linear light as the screen will show it, three per sample: paint toned, gloss on top. */
  light(kit: ViewKit, ask: LightAsk): Float32Array
  /** Lets go of all that is held. */
  close(): void
}
