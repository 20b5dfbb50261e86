import { BANDS } from '../coat-table'
import { glowPacker } from '../simd/pack-glow'
import { stepPacker } from '../simd/pack-steps'
import { SimdMemory, simdModule } from '../simd/simd-memory'
import { finishLight } from '../paint-light'
import type { KeyedCoat, ViewKit } from '../view-kit'
import type { LightAsk, PictureEngine } from './picture-engine'
import { sampleLightKeep, type SampleLight } from './sample-light'
import { changedCoats, sharedStart } from './shared-coats'

/** A kit's own memory: what was last given off, what lies below the edit, and from `free` on the room for one picture. */
interface Held {
  memory: SimdMemory
  out: number
  glowOut: number
  glow: { underKey: string, coats: readonly KeyedCoat[] } | undefined
  /** What the last picture was of, and how much of it is kept at `state` and `flakes`. */
  last: LastStack | undefined
  below: { coats: number, state: number, flakes: number } | undefined
  free: number
}

interface LastStack { underKey: string, keys: readonly string[], sample: SampleLight }

/** The engine that works four bands at a time; undefined on a machine without vectors. */
export function simdEngine(): PictureEngine | undefined {
  const made = simdModule()
  if (!made) return undefined
  const module = made
  const samplesLit = sampleLightKeep(), packSteps = stepPacker(), packGlow = glowPacker()
  let kits = new WeakMap<ViewKit, Held>()

  return {
    name: 'simd',
    light(kit, ask) {
      const held = kits.get(kit) ?? hold(ask.form.samples.count)
      kits.set(kit, held)
      const sample = samplesLit(ask.form, ask.lighting)
      const out = lay(held, ask, sample)
      return finishLight(ask.form, givenOff(held, ask), ask.lighting, sample, out)
    },
    close() {
      kits = new WeakMap()
    },
  }

  function hold(count: number): Held {
    const memory = new SimdMemory(module)
    const out = memory.room(3 * 4 * count), glowOut = memory.room(3 * 4 * count)
    return { memory, out, glowOut, glow: undefined, last: undefined, below: undefined, free: memory.mark() }
  }

  /** Light of the paint and its flakes. What is alike with the last picture from the ground up is kept and not laid again. */
  function lay(held: Held, { groundKey, ground, coats, form, lighting: { seen } }: LightAsk, sample: SampleLight): Float32Array {
    const { memory } = held, { count } = form.samples
    const keys = coats.map(coat => coat.key)
    const alike = held.last?.underKey === groundKey && held.last.sample === sample ? sharedStart(held.last.keys, keys) : 0
    if (held.below && held.below.coats > alike) held.below.coats = 0
    const laid = held.below?.coats ?? 0
    // At least one coat is left over: the next edit is most likely to the last that changed.
    const keep = Math.min(alike, Math.max(0, coats.length - 1))
    if (keep > laid && !held.below) {
      const bytes = 4 * BANDS * count
      held.below = { coats: 0, state: memory.room(bytes), flakes: memory.room(bytes) }
      held.free = memory.mark()
    }
    const groundAt = memory.put(Float32Array.from(ground)), light = memory.put(sample.light), weights = memory.put(Float32Array.from(seen.reflected))
    const { outside, inside } = seen.surface
    const go = (from: number, to: number, isLast: boolean) => {
      const { steps, count: stepCount, last } = packSteps(memory, coats.slice(from, to), sample)
      const { state = 0, flakes = 0 } = held.below ?? {}
      const [under, mirrored] = from > 0 ? [state, flakes] : [0, 0]
      const scale = (1 - outside) * (1 - inside)
      memory.work.lay(count, steps, stepCount, groundAt, under, mirrored, last, weights, light, inside, scale, isLast ? held.out : 0, state, flakes)
    }
    if (held.below && keep > laid) {
      go(laid, keep, false)
      held.below.coats = keep
    }
    go(held.below?.coats ?? 0, coats.length, true)
    held.last = { underKey: groundKey, keys, sample }
    const out = memory.floats(held.out, 3 * count).slice()
    memory.giveBack(held.free)
    return out
  }

  /** Light given off, worked out anew where a coat lies that has changed since last time. */
  function givenOff(held: Held, { groundKey, ground, coats, form, lighting: { seen } }: LightAsk): Float32Array | undefined {
    const { memory, glowOut } = held, { count } = form.samples
    if (!coats.some(({ table }) => table.glow)) {
      held.glow = undefined
      return undefined
    }
    const underKey = `${seen.key} ${groundKey}`
    const changed = held.glow?.underKey === underKey ? changedCoats(held.glow.coats, coats) : undefined
    if (changed?.length !== 0) {
      const { layers, glowing, glowingCount, changed: changedAt, rows, room } = packGlow(memory, coats, changed ?? [], ground, seen)
      memory.work.glow(count, layers, coats.length, glowing, glowingCount, changedAt, changed ? changed.length : -1, rows, room, seen.surface.inside, glowOut)
      memory.giveBack(held.free)
      held.glow = { underKey, coats }
    }
    return memory.floats(glowOut, 3 * count)
  }
}
