import { describe, expect, it } from 'vitest'
import { formOfWish, newMaskWish } from '~/composables/mask/mask-form'
import { flatOutlines } from '~/composables/mask/drawn-outlines'
import { flatDrawing } from '~/composables/mask/print-drawing'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { boxRound, type FlatPoint, ringArea } from '#shared/scheme/outline/flat'
import { AS_THEY_CAME } from '#shared/scheme/outline/placing'
import { FOOT, OVERLAP, PAPERS, printLayout } from '#shared/scheme/outline/print-layout'

const minnow = prepareBlank(builtInBlank('minnow-90'))
const glide = prepareBlank(builtInBlank('glide-160'))
const circle = (radius: number): FlatPoint[] => Array.from({ length: 90 }, (_, i) => [radius * Math.cos(i * Math.PI / 45), radius * Math.sin(i * Math.PI / 45)])

describe('a stencil drawn or brought in', () => {
  const wish = { ...newMaskWish(), kind: 'stencil' as const, drawn: { outlines: [circle(4)], placing: { ...AS_THEY_CAME, along: 6, up: 2, turn: 30, mirrored: true } } }
  const form = formOfWish(wish, minnow)

  it('comes out of the printer as large as it went in, on the blank it was made for', () => {
    if (form?.kind !== 'stencil') throw new Error('no stencil')
    const [cut = []] = flatDrawing(minnow, form.outlines).cuts
    const box = boxRound([cut])!
    expect(box.right - box.left).toBeCloseTo(8, 1)
    expect(box.high - box.low).toBeCloseTo(8, 1)
    expect((box.left + box.right) / 2).toBeCloseTo(6, 1)
    expect((box.low + box.high) / 2).toBeCloseTo(2, 1)
    expect(Math.abs(ringArea(cut)) / (Math.PI * 16)).toBeGreaterThan(0.99)
  })
  it('grows with a longer blank', () => {
    if (form?.kind !== 'stencil') throw new Error('no stencil')
    const wide = (blank: typeof minnow) => {
      const box = boxRound(flatOutlines(blank, form.outlines))!
      return box.right - box.left
    }
    expect(wide(glide) / wide(minnow)).toBeGreaterThan(1.5)
  })
  it('is not kept before there is an outline', () => {
    expect(formOfWish({ ...wish, drawn: { outlines: [], placing: AS_THEY_CAME } }, minnow)).toBeNull()
  })
})

describe.each(['a4', 'letter'] as const)('printed on %s', (paper) => {
  const lay = (blank: typeof minnow) => {
    const { skin } = flatDrawing(blank, [])
    return printLayout([skin], paper)
  }
  const sizes = [PAPERS[paper].width, PAPERS[paper].height].sort((a, b) => a - b)

  it('puts both sides of a small lure on one sheet', () => {
    const { sheets } = lay(minnow)
    expect(sheets).toHaveLength(1)
    expect(sheets[0]!.parts.map(part => part.side)).toEqual(['left', 'right'])
  })
  it('keeps every part on its sheet, off the margin and off the ruler', () => {
    for (const blank of [minnow, glide, longLure]) {
      for (const sheet of lay(blank).sheets) {
        expect([sheet.width, sheet.height].sort((a, b) => a - b)).toEqual(sizes)
        for (const { x, y, shows } of sheet.parts) {
          expect(Math.min(x, y)).toBeGreaterThanOrEqual(10)
          expect(x + shows.width).toBeLessThanOrEqual(sheet.width - 10 + 1e-9)
          expect(y + shows.height).toBeLessThanOrEqual(sheet.height - 10 - FOOT + 1e-9)
        }
      }
    }
  })
  it('leaves nothing of a long one out: its sheets overlap and reach from end to end, each side', () => {
    const layout = lay(longLure)
    expect(layout.sheets[0]!.tile).not.toBeNull()
    for (const side of ['left', 'right'] as const) {
      const parts = layout.sheets.flatMap(sheet => sheet.parts).filter(part => part.side === side)
      const spans = [...new Map(parts.map(({ shows }) => [shows.x, shows.x + shows.width]))].sort((a, b) => a[0] - b[0])
      expect(spans[0]![0]).toBeCloseTo(layout[side].x, 9)
      expect(spans.at(-1)![1]).toBeCloseTo(layout[side].x + layout[side].width, 9)
      spans.slice(1).forEach(([from], i) => expect(spans[i]![1] - from).toBeCloseTo(OVERLAP, 9))
    }
  })
  it('shows each register mark of an overlap on both sheets', () => {
    const layout = lay(longLure)
    const parts = layout.sheets.flatMap(sheet => sheet.parts).filter(part => part.side === 'left')
    const seen = ([x, y]: FlatPoint) => parts.filter(({ shows }) => x >= shows.x && x <= shows.x + shows.width && y >= shows.y && y <= shows.y + shows.height).length
    const counts = layout.marks.map(seen)
    expect(Math.min(...counts)).toBeGreaterThanOrEqual(1)
    expect(counts.slice(4).every(count => count >= 2)).toBe(true)
    expect(counts.length).toBeGreaterThan(4)
  })
  it('turns the right side over about the middle of the body', () => {
    const { left, right } = lay(minnow)
    expect(right.x).toBeCloseTo(-(left.x + left.width), 9)
    expect([right.width, right.height]).toEqual([left.width, left.height])
  })
})

/** A glide bait blown up to 400 mm: longer than any sheet. */
const longLure = prepareBlank({ ...builtInBlank('glide-160'), length: 400 })
