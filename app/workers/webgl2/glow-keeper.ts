import type { LightAsk } from '#shared/picture/engine/picture-engine'
import { changedCoats } from '#shared/picture/engine/shared-coats'
import { glowLight } from '#shared/picture/glow-light'
import type { KeyedCoat, ViewKit } from '#shared/picture/view-kit'

interface KeptGlow { underKey: string, coats: readonly KeyedCoat[], light: Float32Array | undefined }

/** Works out the glow of views on the processor, and anew only where a coat lies that has changed since last time. */
export function glowKeeper(): (kit: ViewKit, ask: LightAsk) => Float32Array | undefined {
  const kept = new WeakMap<ViewKit, KeptGlow>()
  return (kit, { groundKey, ground, coats, form, lighting: { seen } }) => {
    const underKey = `${seen.key} ${groundKey}`
    const before = kept.get(kit)
    const last = before?.underKey === underKey ? before : undefined
    const changed = last && changedCoats(last.coats, coats)
    if (last && changed?.length === 0) return last.light
    const light = glowLight(coats, ground, form.samples.count, seen, last?.light && changed && { light: last.light, changed })
    kept.set(kit, { underKey, coats, light })
    return light
  }
}
