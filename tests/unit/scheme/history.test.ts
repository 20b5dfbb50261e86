import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { HISTORY_MAX, ONE_STEP_MS, record, redo, startHistory, undo } from '#shared/scheme/history'
import { anyBody, body } from './bodies'

const step = (at: number, field: string | null = null) => ({ words: 'Something', field, at })

describe('undo and redo', () => {
  it('go back to the very first body and forward to the last, whatever was done', () => {
    fc.assert(fc.property(fc.array(anyBody, { minLength: 1, maxLength: 12 }), (bodies) => {
      const all = bodies.reduce((history, each, i) => record(history, each, step(i * 10_000)), startHistory(body(1)))
      const back = bodies.reduce(undo, all)
      expect(back.present).toEqual(body(1))
      expect(bodies.reduce(redo, back)).toEqual(all)
    }), { numRuns: 30 })
  })

  it('do nothing at either end', () => {
    const history = startHistory(body(1))
    expect(undo(history)).toBe(history)
    expect(redo(history)).toBe(history)
  })

  it('a new edit after undo ends what could be done again', () => {
    const two = record(record(startHistory(body(1)), body(1, 2), step(0)), body(1, 2, 3), step(1))
    const other = record(undo(two), body(2), step(2))
    expect(other.future).toEqual([])
    expect(undo(other).present).toEqual(body(1, 2))
  })
})

describe('steps', () => {
  it('quick edits of one field are one step, as when a slider is dragged', () => {
    const dragged = [2, 3, 4, 5].reduce((history, n, i) => record(history, body(1, n), step(i * 50, 'coat 1 passes')), startHistory(body(1)))
    expect(dragged.past).toHaveLength(1)
    expect(dragged.present).toEqual(body(1, 5))
    expect(undo(dragged).present).toEqual(body(1))
  })

  it('a pause, another field or an undo between makes another step', () => {
    const once = record(startHistory(body(1)), body(2), step(0, 'a'))
    expect(record(once, body(3), step(ONE_STEP_MS + 1, 'a')).past).toHaveLength(2)
    expect(record(once, body(3), step(10, 'b')).past).toHaveLength(2)
    expect(record(once, body(3), step(10)).past).toHaveLength(2)
    expect(record(redo(undo(once)), body(3), step(10, 'a')).past).toHaveLength(2)
  })

  it(`are kept up to ${HISTORY_MAX}, oldest let go first`, () => {
    const long = Array.from({ length: HISTORY_MAX + 5 }, (_, i) => i + 1).reduce((history, n) => record(history, body(n), step(n)), startHistory(body(0)))
    expect(long.past).toHaveLength(HISTORY_MAX)
    expect(Array.from({ length: HISTORY_MAX + 5 }).reduce<typeof long>(undo, long).present).toEqual(body(5))
  })
})
