import { describe, expect, it } from 'vitest'
import type { LightAsk, PictureEngine } from '#shared/picture/engine/picture-engine'
import { steadyEngine } from '#shared/picture/engine/steady-engine'
import type { ViewKit } from '#shared/picture/view-kit'

const KIT = {} as ViewKit, ASK = {} as LightAsk

/** An engine that works a few times and then traps. */
function failing(name: PictureEngine['name'], works: number, brightness: number): PictureEngine & { isClosed: () => boolean } {
  let left = works, closed = false
  return {
    name,
    light() {
      if (left-- <= 0) throw new WebAssembly.RuntimeError('unreachable')
      return Float32Array.of(brightness)
    },
    close: () => closed = true,
    isClosed: () => closed,
  }
}

describe('an engine that fails', () => {
  it('is followed by the next, which paints the same picture', () => {
    const first = failing('simd', 1, 1), second = failing('plain', 9, 2)
    const engine = steadyEngine([first, second])
    expect([engine.name, engine.light(KIT, ASK)[0]]).toEqual(['simd', 1])
    expect(engine.light(KIT, ASK)[0]).toBe(2)
    expect([engine.name, first.isClosed(), second.isClosed()]).toEqual(['plain', true, false])
  })

  it('says so only when no other can do it either, and all may try again', () => {
    const engine = steadyEngine([failing('simd', 0, 1), failing('plain', 0, 2)])
    expect(() => engine.light(KIT, ASK)).toThrow('unreachable')
    expect(engine.name).toBe('simd')
  })
})
