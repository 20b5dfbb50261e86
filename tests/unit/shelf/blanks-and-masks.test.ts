import { describe, expect, it } from 'vitest'
import { crossCut, fullestShare, topOutline } from '~/composables/blank/blank-sections'
import { densityOfWater, floatSum, floatWords, USUAL_WISH } from '~/composables/blank/float-check'
import { measureBlank } from '~/composables/blank/measure-blank'
import { blankFromWish, formOptions, lastingName, sizeOfForm } from '~/composables/blank/own-blank'
import { formOfWish, maskWishOf, newMaskWish } from '~/composables/mask/mask-form'
import { maskBlank, outlinesOnBlank } from '~/composables/mask/mask-on-blank'
import { scalePitch } from '~/composables/mask/scale-pitch'
import { cutOutlines, CUTS, usualCut } from '~/composables/mask/stencil-forms'
import { BUILT_IN_BLANKS, builtInBlank } from '#shared/blank/built-in-blanks'
import { BlankShape } from '#shared/blank/blank-shape'
import { MaskForm } from '#shared/scheme/mask'
import { STARTER_MASKS } from '#shared/scheme/starter-masks'

const BODY = { areaMm2: 4000, volumeMm3: 20_000 }

describe('float or sink', () => {
  it('adds up: with the ballast it asks for, the lure hangs', () => {
    for (const isLetIn of [true, false]) {
      const { neutralBallast } = floatSum({ ...USUAL_WISH, isLetIn }, BODY)
      const sum = floatSum({ ...USUAL_WISH, isLetIn, ballastMass: neutralBallast }, BODY)
      expect(sum.netLift).toBeCloseTo(0, 9)
      expect(sum.outcome).toBe('hangs')
    }
  })

  it('is what a hand sum says: wood, ballast, steel, film', () => {
    const sum = floatSum({ ...USUAL_WISH, wood: 0.4, ballast: 'lead', ballastMass: 4, isLetIn: false, hardware: 5, film: 0.3 }, BODY)
    expect(sum.mass).toBeCloseTo(20 * 0.4 + 4 + 5 + 1.2 * 1.15, 9)
    expect(sum.displaced / sum.water).toBeCloseTo(20 + 4 / 11.34 + 5 / 7.9 + 1.2, 9)
  })

  it('lets a lure that hangs in a lake float in the sea', () => {
    const { neutralBallast } = floatSum(USUAL_WISH, BODY)
    const inSea = floatSum({ ...USUAL_WISH, ballastMass: neutralBallast, salinity: 35 }, BODY)
    expect(inSea.outcome).toBe('floats')
    expect(floatWords(inSea)).toMatch(/^It floats: 0\.\d+ g/)
    expect(densityOfWater(15, 35)).toBeCloseTo(1.02597, 4)
    expect(densityOfWater(4, 0)).toBeCloseTo(0.99997, 5)
  })

  it('counts a lip, and refuses ballast larger than the body', () => {
    const lip = builtInBlank('minnow-90').lip!
    expect(floatSum(USUAL_WISH, BODY, lip).rows.map(row => row.what)).toContain('lip')
    expect(() => floatSum({ ...USUAL_WISH, ballastMass: 390 }, BODY)).toThrow('larger than the body')
  })
})

describe('a measured blank', () => {
  it('has zones that make up its body, and an outline for each', () => {
    const measured = measureBlank(builtInBlank('glide-160'))
    const area = (zone: string) => measured.zones.find(one => one.zone === zone)!.areaMm2
    const parts = area('back') + area('upper-flank') + area('lower-flank') + area('belly')
    expect(parts / measured.bodyMm2).toBeCloseTo(1, 2)
    expect(measured.zones.filter(zone => !zone.path.startsWith('M'))).toEqual([])
    expect(measured.finsMm2).toBeGreaterThan(0)
  })

  it.each(BUILT_IN_BLANKS.map(shape => [shape.name, shape] as const))('%s is as wide from above and cut across as it measures', (_, shape) => {
    const { width, height } = measureBlank(shape)
    const above = Math.max(...topOutline(shape).map(point => point[1])) * 2
    const cut = crossCut(shape, fullestShare(shape))
    expect(Math.abs(above - width)).toBeLessThan(0.1)
    expect(cut.width).toBeLessThanOrEqual(width + 0.1)
    expect(cut.height).toBeGreaterThan(0.85 * height)
  })
})

describe('a blank of one’s own', () => {
  it.each(formOptions().map(form => form.value))('is made of the form %s at its own size, and at twice its height', (form) => {
    const wish = { label: 'Ours', form, ...sizeOfForm(form), hasLip: true, hasFins: true, hasJoints: true }
    for (const height of [wish.height, Math.min(200, 2 * wish.height)]) {
      const { shape } = blankFromWish({ ...wish, height })
      expect(BlankShape.safeParse(shape).success).toBe(true)
      expect(measureBlank(shape!).height).toBeCloseTo(height, 3)
    }
  })

  it('says in words what makes no blank', () => {
    const wish = { label: 'Ours', form: 'shad-80', length: 400, height: 3, width: 200, hasLip: true, hasFins: true, hasJoints: true }
    const { shape, trouble } = blankFromWish(wish)
    expect(shape === undefined ? trouble : 'made').toMatch(/no blank|made/)
  })

  it('gets a lasting name from its label', () => {
    expect(lastingName('Älteste Form, 90!')).toBe('alteste-form-90')
    expect(lastingName('…')).toBe('blank')
  })
})

describe('masks by numbers', () => {
  it('take the pitch of a fish’s scales: 100 mm of roach are about 1.6 mm', () => {
    expect(scalePitch(100, 43.5).true).toBeCloseTo(1.61, 2)
    expect(scalePitch(100, 43.5).forLooks).toBeCloseTo(3.22, 2)
    expect(() => scalePitch(0, 40)).toThrow(RangeError)
  })

  it.each(CUTS)('cut %s that are valid, as many as wanted, larger when they are to be larger', (cut) => {
    const wish = { ...usualCut(cut), count: 9 }
    expect(cutOutlines(wish)).toHaveLength(9)
    const span = (size: number) => {
      const us = cutOutlines({ ...wish, size })[4]!.map(([u]) => u)
      return Math.max(...us) - Math.min(...us)
    }
    expect(span(200)).toBeGreaterThan(1.4 * span(100))
    for (const size of [20, 100, 300]) {
      const form = formOfWish({ ...newMaskWish(), kind: 'stencil', cut: { ...wish, size, count: 40 } })
      expect(MaskForm.safeParse(form).success).toBe(true)
    }
  })

  it('keep the outlines they came with until they are cut anew', () => {
    for (const { name, form } of STARTER_MASKS) expect(formOfWish(maskWishOf(name, form))).toEqual(form)
    const bars = STARTER_MASKS.find(mask => mask.name === 'Bars')!
    expect(formOfWish({ ...maskWishOf(bars.name, bars.form), isCutAnew: true })).not.toEqual(bars.form)
  })

  it('never let a thread close its net', () => {
    const wish = newMaskWish()
    const form = formOfWish({ ...wish, mesh: { ...wish.mesh, pitch: 0.5, thread: 3 } })
    expect(form.kind === 'mesh' && form.thread < form.pitch).toBe(true)
  })

  it('lie on the blank they are drawn on', () => {
    const on = maskBlank()
    const { x, y, width, height } = on.outline.box
    for (const { form } of STARTER_MASKS) {
      if (form.kind === 'mesh') continue
      for (const [, px, py] of outlinesOnBlank(on, form.outlines).matchAll(/[ML](-?[\d.]+) (-?[\d.]+)/g)) {
        expect(Number(px) >= x && Number(px) <= x + width && Number(py) >= y && Number(py) <= y + height).toBe(true)
      }
    }
  })
})
