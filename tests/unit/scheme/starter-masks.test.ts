import { describe, expect, it } from 'vitest'
import type { Place } from '#shared/scheme/mark'
import { MASK_NAME_MAX, MaskForm } from '#shared/scheme/mask'
import { bar, STARTER_MASKS } from '#shared/scheme/starter-masks'

function crosses([a, b]: [Place, Place], [c, d]: [Place, Place]): boolean {
  const turn = (p: Place, q: Place, r: Place) => Math.sign((q[0] - p[0]) * (r[1] - p[1]) - (q[1] - p[1]) * (r[0] - p[0]))
  return turn(a, b, c) * turn(a, b, d) < 0 && turn(c, d, a) * turn(c, d, b) < 0
}

function crossesItself(points: readonly Place[]): boolean {
  const edges = points.map((point, i): [Place, Place] => [point, points[(i + 1) % points.length] ?? point])
  return edges.some((edge, i) => edges.slice(i + 2).some(other => crosses(edge, other)))
}

describe('starter masks', () => {
  it.each(STARTER_MASKS.map(mask => [mask.name, mask] as const))('%s can be fitted as it is', (name, { form }) => {
    expect(MaskForm.parse(form)).toEqual(form)
    expect(name.length).toBeLessThanOrEqual(MASK_NAME_MAX)
  })

  it('each has a name of its own, and there are nets as well as stencils', () => {
    expect(new Set(STARTER_MASKS.map(mask => mask.name)).size).toBe(STARTER_MASKS.length)
    expect(new Set(STARTER_MASKS.map(mask => mask.form.kind))).toEqual(new Set(['mesh', 'stencil']))
  })

  it('outlines can be cut: none crosses itself, all lie on the flank', () => {
    for (const { form } of STARTER_MASKS) {
      if (form.kind === 'mesh') continue
      for (const outline of form.outlines) {
        expect(crossesItself(outline)).toBe(false)
        for (const [u, v] of outline) {
          expect(Math.abs(u - 0.5)).toBeLessThan(0.45)
          expect(Math.abs(v - 0.5)).toBeLessThan(0.5)
        }
      }
    }
  })

  it('a bar is widest at the back, comes to a point at its foot and leans as told', () => {
    const outline = bar(0.5, 0.02, 0.7, 0.03, 0.011, 0.01)
    expect(outline[0]).toEqual([0.47, 0.02])
    expect(outline.at(-1)).toEqual([0.53, 0.02])
    const foot = outline.reduce((a, b) => (b[1] > a[1] ? b : a))
    expect(foot[0]).toBeCloseTo(0.511, 9)
    expect(foot[1]).toBeCloseTo(0.7, 9)
    const mirrored = bar(0.5, 0.02, 0.7, 0.03, 0.011, -0.01)
    expect(Math.min(...mirrored.map(point => point[0]))).toBeLessThanOrEqual(Math.min(...outline.map(point => point[0])))
  })
})
