import { describe, expect, it } from 'vitest'
import type { PaintSnapshot } from '#shared/scheme/materials'
import { effectivePasses, passStrength } from '#shared/scheme/pass-strength'

const paint = (id: string, reducerPer100: number): PaintSnapshot => ({
  id, reducerPer100, name: id, kind: 'opaque', base: 'water', filmPerPass: 4, volumeSolids: 25, density: 1.05, hazards: [], opticsId: id,
  optics: { engineVersion: '1', bands: 36, kind: 'film', K: Array<number>(36).fill(0.1), S: Array<number>(36).fill(0.1), how: 'masstone-hide', clipped: false },
})
const materials = { paints: [paint('white', 20), paint('black', 50)] }
const cup = (reducer: number, ...parts: [string, number][]) => ({ mix: { reducer, parts: parts.map(([paintId, drops]) => ({ paintId, drops })) } })

describe('strength of a pass', () => {
  it('a paint reduced as usual lays a whole pass', () => {
    expect(passStrength(cup(2, ['white', 10]), materials)).toBeCloseTo(1, 12)
  })

  it('a thinner cup lays less film: twice the volume, half the pass', () => {
    expect(passStrength(cup(14, ['white', 10]), materials)).toBeCloseTo(0.5, 12)
  })

  it('an unreduced cup lays more', () => {
    expect(passStrength(cup(0, ['white', 10]), materials)).toBeCloseTo(1.2, 12)
  })

  it('paints count by their drops', () => {
    expect(passStrength(cup(0, ['white', 2], ['black', 1]), materials)).toBeCloseTo(1 + (2 * 0.2 + 0.5) / 3, 12)
  })

  it('an empty cup lays nothing', () => {
    expect(passStrength(cup(5), materials)).toBe(0)
  })

  it('effective passes are passes times their strength', () => {
    expect(effectivePasses({ ...cup(14, ['white', 10]), passes: 3 }, materials)).toBeCloseTo(1.5, 12)
  })
})
