import { describe, expect, it } from 'vitest'
import { engineTrial, isWorthwhile } from '~/workers/webgl2/engine-trial'
import { offerWebgl2 } from '~/workers/webgl2/offer-webgl2'
import { isSoftware } from '~/workers/webgl2/open-context'
import { webgl2Engine } from '~/workers/webgl2/webgl2-engine'
import type { PictureEngine } from '#shared/picture/engine/picture-engine'
import { simdEngine } from '#shared/picture/engine/simd-engine'

const known = (): PictureEngine => simdEngine()!

describe('the trial of an engine', () => {
  it('finds that the graphics processor agrees', () => {
    const engine = webgl2Engine()!
    const { most, mean } = engineTrial(engine, known())
    engine.close()
    expect(most).toBeLessThan(0.5)
    expect(mean).toBeLessThan(0.1)
  })
  it('finds out an engine that paints a little too bright', () => {
    const right = known()
    const bright: PictureEngine = { ...right, light: (kit, ask) => right.light(kit, ask).map(value => 1.02 * value) }
    const trial = engineTrial(bright, known())
    expect(isWorthwhile({ ...trial, ms: 1, knownMs: 10 })).toBe(false)
  })
  it('finds out an engine that paints what is no number', () => {
    const right = known()
    const broken: PictureEngine = { ...right, light: (kit, ask) => right.light(kit, ask).fill(Number.NaN) }
    expect(isWorthwhile({ ...engineTrial(broken, known()), ms: 1, knownMs: 10 })).toBe(false)
  })
  it('chooses none that is slower', () => {
    expect(isWorthwhile({ most: 0, mean: 0, ms: 11, knownMs: 10 })).toBe(false)
    expect(isWorthwhile({ most: 0, mean: 0, ms: 9, knownMs: 10 })).toBe(true)
  })
})

describe('a graphics processor that is played by software', () => {
  it.each([
    'ANGLE (Google, Vulkan 1.3.0 (SwiftShader Device (Subzero) (0x0000C0DE)), SwiftShader driver)',
    'llvmpipe (LLVM 15.0.6, 256 bits)', 'Mesa/X.org, softpipe', 'Microsoft Basic Render Driver', 'Generic Software Renderer',
  ])('is known by its name: %s', name => expect(isSoftware(name)).toBe(true))
  it('is not offered', () => expect(offerWebgl2(known())).toBeUndefined())
})
