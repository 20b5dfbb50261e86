import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import type { SchemeBody } from '#shared/scheme/body'
import { applyEdit, editWords, type SchemeEdit } from '#shared/scheme/edits'
import { type History, record, redo, startHistory, undo } from '#shared/scheme/history'
import { mergeBodies } from '#shared/scheme/merge-bodies'
import { rebaseHistory, settleHistory } from '#shared/scheme/merge-history'
import { coatsOf } from '#shared/scheme/stack-order'
import { after, anyBody, anyEdit, body, id, rows } from './bodies'

function worked(start: SchemeBody, edits: readonly SchemeEdit[]): History {
  return edits.reduce((history, edit) => {
    const outcome = applyEdit(history.present, edit)
    return outcome.ok ? record(history, outcome.body, { words: editWords(history.present, edit), field: null, at: 0 }) : history
  }, startHistory(start))
}
const passes = (n: number, count: number): SchemeEdit => ({ do: 'set-passes', coatId: id('coat', n), passes: count })
const passesOf = (of: SchemeBody) => coatsOf(of.stack).map(each => each.passes)

describe('own steps after somebody else saved', () => {
  it('take back what one did oneself and leave what the other did', () => {
    const base = after(body(1, 2), [passes(1, 2), passes(2, 2)])
    const theirs = after(base, [passes(2, 9)])
    const own = rebaseHistory(worked(base, [passes(1, 3), passes(1, 4)]), base, theirs)
    expect(passesOf(own.present)).toEqual([4, 9])
    expect(passesOf(undo(own).present)).toEqual([3, 9])
    expect(passesOf(undo(undo(own)).present)).toEqual([2, 9])
    expect(passesOf(redo(redo(undo(undo(own)))).present)).toEqual([4, 9])
  })

  it('end at theirs when all of them are undone', () => {
    const anyWork = fc.array(anyEdit, { maxLength: 12 })
    fc.assert(fc.property(anyBody, anyWork, anyWork, (base, own, other) => {
      const theirs = after(base, other)
      let history = rebaseHistory(worked(base, own), base, theirs)
      while (history.past.length > 0) history = undo(history)
      expect(history.present).toEqual(theirs)
    }), { numRuns: 60 })
  })

  it('can be done again after they were undone before the other saved', () => {
    const base = after(body(1, 2), [passes(1, 2), passes(2, 2)])
    const undone = undo(undo(worked(base, [passes(1, 3), passes(1, 4)])))
    const own = rebaseHistory(undone, base, after(base, [passes(2, 9)]))
    expect(passesOf(redo(own).present)).toEqual([3, 9])
    expect(passesOf(redo(redo(own)).present)).toEqual([4, 9])
  })
})

describe('after a choice', () => {
  const base = after(body(1, 2), [passes(1, 2), passes(2, 2)])
  const mine = worked(base, [passes(1, 3), passes(2, 3)])
  const theirs = after(base, [passes(1, 9), passes(2, 9)])

  it('undo brings the side not taken back, whichever it is', () => {
    const kept = settleHistory(mine, base, theirs, 'mine')
    expect(passesOf(kept.present)).toEqual([3, 3])
    expect(passesOf(undo(kept).present)).toEqual([9, 9])
    expect(passesOf(undo(undo(kept)).present)).toEqual([3, 3])
    const taken = settleHistory(mine, base, theirs, 'theirs')
    expect([taken.present, undo(taken).present].map(passesOf)).toEqual([[9, 9], [3, 3]])
  })

  it('coat by coat, both whole sides are within reach', () => {
    const choices = new Map([[`coat ${id('coat', 1)}`, 'theirs' as const]])
    const chosen = settleHistory(mine, base, theirs, choices)
    expect(chosen.present).toEqual(mergeBodies(base, mine.present, theirs, choices).body)
    expect([chosen, undo(chosen), undo(undo(chosen))].map(each => passesOf(each.present))).toEqual([[9, 3], [9, 9], [3, 3]])
  })

  it('where nothing is known of the beginning, one of the two is kept and the other is one undo away', () => {
    const chosen = settleHistory(startHistory(body(1, 2)), null, body(3), 'theirs')
    expect(rows(chosen.present)).toEqual([3])
    expect(rows(undo(chosen).present)).toEqual([1, 2])
  })
})
