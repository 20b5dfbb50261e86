import { flakeGeometry } from '#shared/optics/flake-angles'
import { FLAKE_TABLE_COSINES } from '#shared/optics/flake-table'
import { VEIL } from '#shared/optics/surface'
import type { FlakeLevels } from '../coat-table'
import { GLINT_LEAST, mirroringPlace } from '../flake-light'
import { atNormal } from '../light-tables'
import { FORM, glossAt, MATT_SHARE, type Lighting, type SampleForm } from '../paint-light'

/** Rows of a table of flakes, one for each angle. */
export const FLAKE_ROWS = FLAKE_TABLE_COSINES.length

/** How strongly flakes mirror the light to the eye at every sample, and where between two rows of their table they are read. */
export interface Mirroring { strength: Float32Array, place: Float32Array }

/** What a light does at every sample of a form, whatever is painted there. */
export interface SampleLight {
  /** Light that falls on the paint. */
  light: Float32Array
  /** White light that a matt film or a veil adds to the paint. */
  even: Float32Array | undefined
  /** White light that a clear mirrors. */
  gloss: Float32Array | undefined
  /** What flakes of one kind do. */
  mirroring(flake: Pick<FlakeLevels, 'sigma' | 'sparkle'>): Mirroring
}

/** Works out a light at every sample. */
export function sampleLight(form: SampleForm, { tables, finish, plain, aspecular, seen: { surface } }: Lighting): SampleLight {
  const { samples: { count, occlusion }, normal, sparkle } = form
  const kept = new Map<string, Mirroring>()
  return {
    light: plain ? new Float32Array(count).fill(1) : overSamples(i => (1 + FORM * (atForm(tables.irradiance, i) - 1)) * occlusion[i]!),
    even: evenLight(),
    gloss: finish === 'gloss' && !plain ? overSamples(i => glossAt(form, i, tables)) : undefined,
    mirroring(flake) {
      const key = plain ? `${flake.sigma}` : `${flake.sigma} ${flake.sparkle}`
      const found = kept.get(key) ?? mirroringOf(flake)
      kept.set(key, found)
      return found
    },
  }

  function atForm(table: Float32Array, i: number): number {
    return atNormal(table, normal[3 * i]!, normal[3 * i + 1]!)
  }

  function overSamples(value: (sample: number) => number): Float32Array {
    const out = new Float32Array(count)
    for (let i = 0; i < count; i++) out[i] = value(i)
    return out
  }

  function evenLight(): Float32Array | undefined {
    if (plain) return VEIL[finish] > 0 ? new Float32Array(count).fill(surface.veil * VEIL[finish]) : undefined
    if (finish === 'gloss') return undefined
    const matt = tables.matt(), share = surface.veil * MATT_SHARE * VEIL[finish] / VEIL.matt
    return overSamples(i => share * atForm(matt, i) * occlusion[i]!)
  }

  function mirroringOf({ sigma, sparkle: glints }: Pick<FlakeLevels, 'sigma' | 'sparkle'>): Mirroring {
    if (plain) {
      const { gain, cosine } = flakeGeometry(aspecular, sigma, surface.index)
      return { strength: new Float32Array(count).fill(gain), place: new Float32Array(count).fill(mirroringPlace(cosine)) }
    }
    const { strength, local } = tables.flakes(sigma, surface.index)
    return {
      strength: overSamples(i => atForm(strength, i) * Math.max(GLINT_LEAST, 1 + glints * sparkle[i]!) * occlusion[i]!),
      place: overSamples(i => mirroringPlace(atForm(local, i))),
    }
  }
}

/** Keeps what a light does at the samples of a form for as long as both stand; for each form the light it was last seen in. */
export function sampleLightKeep(): (form: SampleForm, lighting: Lighting) => SampleLight {
  const kept = new WeakMap<SampleForm, { lighting: Lighting, light: SampleLight }>()
  return (form, lighting) => {
    const last = kept.get(form)
    if (last && isSameTent(last.lighting, lighting)) return last.light
    const light = sampleLight(form, lighting)
    kept.set(form, { lighting, light })
    return light
  }
}

/** Whether two lightings do the same at every sample: what the light is seen as is not asked here, but against what the film ends is. */
function isSameTent(a: Lighting, b: Lighting): boolean {
  return a.tables === b.tables && a.finish === b.finish && a.plain === b.plain && a.aspecular === b.aspecular
    && a.seen.surface.index === b.seen.surface.index && a.seen.surface.veil === b.seen.surface.veil
}
