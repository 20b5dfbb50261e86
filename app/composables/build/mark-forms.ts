import type { Mark } from '#shared/scheme/mark'
import { bar } from '#shared/scheme/starter-masks'

/** A mark one can start from by its numbers. */
export type MarkStart = 'dots' | 'line' | 'bars' | 'worm tracks' | 'torn sponge'

export const MARK_STARTS: readonly { key: MarkStart, word: string }[] = [
  { key: 'dots', word: 'Scattered dots' },
  { key: 'line', word: 'A line along the flank' },
  { key: 'bars', word: 'Bars down the flank' },
  { key: 'worm tracks', word: 'Worm tracks' },
  { key: 'torn sponge', word: 'Torn sponge' },
]

const BARS = [0.3, 0.4, 0.5, 0.6, 0.7, 0.8]

/** The marks a start lays, in usual sizes; `seed` scatters them one way. */
export function startMarks(start: MarkStart, seed: number): Mark[] {
  switch (start) {
    case 'dots': return [{ kind: 'scatter', seed, count: 40, u: [0.22, 0.9], v: [0.15, 0.6], radius: [0.5, 1.1], apart: 2.5, soft: 0.15, grow: 0 }]
    case 'line': return [{ kind: 'strokes', with: 'airbrush', strokes: [{ points: [[0.18, 0.48], [0.4, 0.46], [0.65, 0.48], [0.92, 0.5]], width: [2.5, 1], amount: [1, 0.8] }] }]
    case 'bars': return BARS.map(u => ({ kind: 'outline', points: bar(u, 0.02, 0.68, 0.024, 0.01, 0), soft: 0.8, wobble: 0.3, amount: 1 }))
    case 'worm tracks': return [{ kind: 'worm tracks', seed, wavelength: 6, width: 1.2 }]
    case 'torn sponge': return [{ kind: 'torn sponge', seed, size: 8, threshold: 0.25, soft: 0.15 }]
  }
}

/** One number of a mark. */
export interface MarkNumber { key: string, label: string, unit?: string, value: number, min: number, max: number, step: number, set: (value: number) => Mark }

const seedOf = <M extends Mark & { seed: number }>(mark: M): MarkNumber => ({ key: 'seed', label: 'Another fall', value: mark.seed, min: 0, max: 2 ** 31, step: 1, set: seed => ({ ...mark, seed }) })
const percent = (share: number) => Math.round(share * 100)

/** The numbers of a mark that can be changed without drawing. */
export function markNumbers(mark: Mark): MarkNumber[] {
  switch (mark.kind) {
    case 'scatter': return [
      { key: 'count', label: 'Dots', value: mark.count, min: 1, max: 600, step: 1, set: count => ({ ...mark, count }) },
      { key: 'small', label: 'Smallest', unit: 'mm', value: mark.radius[0], min: 0.1, max: 15, step: 0.1, set: r => ({ ...mark, radius: [r, Math.max(r, mark.radius[1])] }) },
      { key: 'large', label: 'Largest', unit: 'mm', value: mark.radius[1], min: 0.1, max: 15, step: 0.1, set: r => ({ ...mark, radius: [Math.min(r, mark.radius[0]), r] }) },
      { key: 'apart', label: 'Apart', unit: 'mm', value: mark.apart, min: 0, max: 60, step: 0.5, set: apart => ({ ...mark, apart }) },
      { key: 'grow', label: 'Grown by', unit: 'mm', value: mark.grow, min: -5, max: 5, step: 0.1, set: grow => ({ ...mark, grow }) },
      { key: 'from', label: 'From nose', unit: '%', value: percent(mark.u[0]), min: 0, max: 100, step: 1, set: u => ({ ...mark, u: [u / 100, Math.max(u / 100, mark.u[1])] }) },
      { key: 'to', label: 'To', unit: '%', value: percent(mark.u[1]), min: 0, max: 100, step: 1, set: u => ({ ...mark, u: [Math.min(u / 100, mark.u[0]), u / 100] }) },
      { key: 'high', label: 'From back', unit: '%', value: percent(mark.v[0]), min: 0, max: 100, step: 1, set: v => ({ ...mark, v: [v / 100, Math.max(v / 100, mark.v[1])] }) },
      { key: 'low', label: 'Down to', unit: '%', value: percent(mark.v[1]), min: 0, max: 100, step: 1, set: v => ({ ...mark, v: [Math.min(v / 100, mark.v[0]), v / 100] }) },
      seedOf(mark),
    ]
    case 'worm tracks': return [
      { key: 'wave', label: 'From bend to bend', unit: 'mm', value: mark.wavelength, min: 0.5, max: 30, step: 0.5, set: wavelength => ({ ...mark, wavelength }) },
      { key: 'width', label: 'Wide', unit: 'mm', value: mark.width, min: 0.1, max: 10, step: 0.1, set: width => ({ ...mark, width }) },
      seedOf(mark),
    ]
    case 'torn sponge': return [
      { key: 'size', label: 'Patches', unit: 'mm', value: mark.size, min: 0.5, max: 40, step: 0.5, set: size => ({ ...mark, size }) },
      { key: 'open', label: 'Left open', unit: '%', value: percent((1 + mark.threshold) / 2), min: 0, max: 100, step: 2, set: share => ({ ...mark, threshold: share / 50 - 1 }) },
      { key: 'soft', label: 'Soft edge', value: mark.soft, min: 0.05, max: 1, step: 0.05, set: soft => ({ ...mark, soft }) },
      seedOf(mark),
    ]
    case 'strokes': return [
      { key: 'start', label: 'Wide at its start', unit: 'mm', value: mark.strokes[0]?.width[0] ?? 1, min: 0.1, max: 40, step: 0.1, set: w => ({ ...mark, strokes: mark.strokes.map(stroke => ({ ...stroke, width: [w, stroke.width[1]] })) }) },
      { key: 'end', label: 'Wide at its end', unit: 'mm', value: mark.strokes[0]?.width[1] ?? 1, min: 0.1, max: 40, step: 0.1, set: w => ({ ...mark, strokes: mark.strokes.map(stroke => ({ ...stroke, width: [stroke.width[0], w] })) }) },
    ]
    case 'outline': return [
      { key: 'soft', label: 'Soft edge', unit: 'mm', value: mark.soft, min: 0.05, max: 10, step: 0.05, set: soft => ({ ...mark, soft }) },
      { key: 'wobble', label: 'Torn by', unit: 'mm', value: mark.wobble, min: 0, max: 5, step: 0.1, set: wobble => ({ ...mark, wobble }) },
      { key: 'amount', label: 'Amount', unit: '%', value: percent(mark.amount), min: 0, max: 300, step: 5, set: share => ({ ...mark, amount: share / 100 }) },
    ]
    case 'dots': return [
      { key: 'grow', label: 'Grown by', unit: 'mm', value: mark.grow, min: -5, max: 5, step: 0.1, set: grow => ({ ...mark, grow }) },
      { key: 'soft', label: 'Soft edge', unit: 'mm', value: mark.soft, min: 0.05, max: 5, step: 0.05, set: soft => ({ ...mark, soft }) },
    ]
    case 'fan': return [
      { key: 'count', label: 'Rays', value: mark.count, min: 2, max: 30, step: 1, set: count => ({ ...mark, count }) },
    ]
  }
}
