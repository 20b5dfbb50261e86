import { bareGround, layCoats } from '../compose'
import { glowLight } from '../glow-light'
import { paintLight } from '../paint-light'
import type { KeyedCoat, ViewKit } from '../view-kit'
import type { LightAsk, PictureEngine } from './picture-engine'
import { sampleLightKeep } from './sample-light'
import { changedCoats, sharedStart } from './shared-coats'

interface KeptState { keys: readonly string[], state: Float32Array }
interface KeptGlow { underKey: string, coats: readonly KeyedCoat[], light: Float32Array | undefined }

/** What is kept of a kit's last picture: all coats laid, those below the edit, and the glow. */
interface Kept {
  prefix: KeptState | undefined
  whole: KeptState | undefined
  glow: KeptGlow | undefined
}

/** The engine that runs anywhere, and that the others are held to. */
export function plainEngine(): PictureEngine {
  let held = new WeakMap<ViewKit, Kept>()
  const samplesLit = sampleLightKeep()
  return {
    name: 'plain',
    light(kit, ask) {
      const kept = held.get(kit) ?? { prefix: undefined, whole: undefined, glow: undefined }
      held.set(kit, kept)
      const reflectance = composeKept(kept, ask)
      return paintLight(ask.form, { reflectance, glow: keptGlow(kept, ask), coats: ask.coats }, ask.lighting, samplesLit(ask.form, ask.lighting))
    },
    close() {
      held = new WeakMap()
    },
  }
}

/**
 * Reflectance of the stack under every sample. Starts from the coats that have not changed since last time, and keeps
 * what lies below the first that has: the next change is most likely to the same coat.
 */
function composeKept(kept: Kept, { groundKey, ground, coats, form }: LightAsk): Float32Array {
  const keys = [groundKey, ...coats.map(coat => coat.key)]
  const last = kept.whole
  const alike = last ? sharedStart(last.keys, keys) : 0
  if (last && alike === keys.length && alike === last.keys.length) return last.state

  const starts = [last, kept.prefix].filter((each): each is KeptState => each !== undefined && sharedStart(each.keys, keys) === each.keys.length)
  let from = starts.reduce<KeptState | undefined>((best, each) => !best || each.keys.length > best.keys.length ? each : best, undefined)
    ?? { keys: [groundKey], state: bareGround(form.samples.count, ground) }
  if (alike > from.keys.length) {
    from = { keys: keys.slice(0, alike), state: layCoats(coats.slice(from.keys.length - 1, alike - 1), from.state) }
  }
  // The old whole has had its day, unless it is what the new one starts from.
  const spare = last && last !== from ? last.state : undefined
  kept.prefix = from
  kept.whole = { keys, state: layCoats(coats.slice(from.keys.length - 1), from.state, spare) }
  return kept.whole.state
}

/** Light that the stack gives off under every sample; worked out anew only where a coat lies that has changed since last time. */
function keptGlow(kept: Kept, { groundKey, ground, coats, form, lighting: { seen } }: LightAsk): Float32Array | undefined {
  const underKey = `${seen.key} ${groundKey}`
  const last = kept.glow?.underKey === underKey ? kept.glow : undefined
  const changed = last && changedCoats(last.coats, coats)
  if (last && changed?.length === 0) return last.light
  const light = glowLight(coats, ground, form.samples.count, seen, last?.light && changed && { light: last.light, changed })
  kept.glow = { underKey, coats, light }
  return light
}
