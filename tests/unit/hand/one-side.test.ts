import { expect, it } from 'vitest'
import { minnow, samplesAt } from '../picture/deposit/bench'
import { depositKeep } from '#shared/picture/deposit/keep'
import { layMarks } from '#shared/picture/deposit/mark-map'
import type { Mark } from '#shared/scheme/mark'

const marks: Readonly<Record<string, Mark>> = {
  stroke: { kind: 'strokes', with: 'brush', strokes: [{ points: [[0.3, 0.4], [0.7, 0.4]], width: [2, 2], amount: [1, 1] }] },
  dot: { kind: 'dots', dots: [[0.5, 0.4, 3]], soft: 0.1, grow: 0 },
  outline: { kind: 'outline', points: [[0.4, 0.3], [0.6, 0.3], [0.6, 0.5], [0.4, 0.5]], soft: 0.1, wobble: 0, amount: 1 },
}

function laid(mark: Mark): number[] {
  const keep = depositKeep(samplesAt(minnow, [[0.5, 0.4, 1], [0.5, 0.4, -1]]), minnow)
  const out = new Float32Array(2)
  layMarks(keep, [mark], 1, out)
  return Array.from(out, amount => Math.round(amount))
}

it.each(Object.keys(marks))('a %s is laid on both flanks, or on one alone', (name) => {
  const mark = marks[name]!
  expect(laid(mark)).toEqual([1, 1])
  expect(laid({ ...mark, only: 'left' } as Mark)).toEqual([1, 0])
  expect(laid({ ...mark, only: 'right' } as Mark)).toEqual([0, 1])
})
