import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { applyEdit, editField, editWords, type SchemeEdit } from '#shared/scheme/edits'
import { SchemeBody } from '#shared/scheme/body'
import { coatsOf, stackFaults } from '#shared/scheme/stack-order'
import { after, anyBody, anyEdit, body, coat, frozen, id, mask, rows } from './bodies'

const c = (n: number) => id('coat', n)
const m = (n: number) => id('mask', n)
const ids = (of: SchemeBody) => coatsOf(of.stack).map(each => each.id)

describe('any edit', () => {
  it('leaves a finish that can be sprayed, or refuses with a sentence', () => {
    fc.assert(fc.property(anyBody, anyEdit, (before, edit) => {
      const outcome = applyEdit(before, edit)
      if (outcome.ok) expect(stackFaults(outcome.body)).toEqual([])
      else expect(outcome.because).toMatch(/^[“A-Z].*\.$/)
    }), { numRuns: 400 })
  })

  it('never changes the body it was given', () => {
    fc.assert(fc.property(anyBody, anyEdit, (before, edit) => {
      applyEdit(frozen(before), frozen(edit))
    }))
  })

  it('makes what the draft\'s form allows', () => {
    fc.assert(fc.property(anyBody, (made) => {
      expect(SchemeBody.safeParse(made).error).toBeUndefined()
    }))
  })

  it('that only moves things keeps every coat just as it was', () => {
    fc.assert(fc.property(anyBody, anyEdit, (before, edit) => {
      if (edit.do !== 'move-item' && edit.do !== 'carry-coat' && edit.do !== 'span-mask') return
      const moved = after(before, [edit])
      const byId = (of: SchemeBody) => coatsOf(of.stack).sort((a, b) => a.id < b.id ? -1 : 1)
      expect(byId(moved)).toEqual(byId(before))
    }))
  })

  it('has words for undo', () => {
    fc.assert(fc.property(anyBody, anyEdit, (before, edit) => {
      expect(editWords(before, edit)).toMatch(/^[A-Z]\S*/)
    }))
  })
})

describe('coats', () => {
  it('a new one taken out again leaves the body as it was', () => {
    fc.assert(fc.property(anyBody, fc.nat(20), (before, row) => {
      const added = applyEdit(before, { do: 'add-coat', coat: coat(99), row: row % (before.stack.length + 1) })
      if (!added.ok) throw new Error(added.because)
      expect(after(added.body, [{ do: 'take-out-coat', coatId: c(99) }])).toEqual(before)
    }))
  })

  it('a carry up is undone by a carry down', () => {
    fc.assert(fc.property(anyBody, fc.integer({ min: 1, max: 8 }), (before, n) => {
      const up = applyEdit(before, { do: 'carry-coat', coatId: c(n), way: 'up' })
      if (up.ok) expect(after(up.body, [{ do: 'carry-coat', coatId: c(n), way: 'down' }])).toEqual(before)
    }))
  })

  it('a move is undone by the move back', () => {
    fc.assert(fc.property(anyBody, fc.nat(14), fc.nat(14), (before, from, to) => {
      const there = applyEdit(before, { do: 'move-item', from, to })
      if (there.ok) expect(after(there.body, [{ do: 'move-item', from: to, to: from }])).toEqual(before)
    }))
  })

  it('a coat laid again lies right above the first, alike but for its id, under the same masks', () => {
    const outcome = applyEdit(body('+1', 1, '-1', 2), { do: 'duplicate-coat', coatId: c(1), newId: c(9) })
    expect(outcome.ok && rows(outcome.body)).toEqual(['+1', 1, 9, '-1', 2])
    expect(outcome.ok && coatsOf(outcome.body.stack)[1]).toEqual({ ...coat(1), id: c(9) })
  })

  it('a change touches its coat only and never its id', () => {
    const before = body(1, 2)
    const made = after(before, [{ do: 'change-coat', coatId: c(2), change: { name: 'bars', passes: 7 } }])
    expect(coatsOf(made.stack)).toEqual([coat(1), coat(2, { name: 'bars', passes: 7 })])
    expect(made.stack[0]).toBe(before.stack[0])
  })

  it.each([0, 31, 2.5, Number.NaN])('%s passes are refused', (passes) => {
    expect(applyEdit(body(1), { do: 'set-passes', coatId: c(1), passes })).toEqual({ ok: false, because: 'A coat has 1 to 30 whole passes.' })
  })

  it('are never set to what cannot be saved, and the limit is named', () => {
    const refused = (change: Extract<SchemeEdit, { do: 'change-coat' }>['change']) => applyEdit(body(1), { do: 'change-coat', coatId: c(1), change })
    expect(refused({ name: 'x'.repeat(81) })).toEqual({ ok: false, because: 'Name: at most 80 characters.' })
    expect(refused({ rest: -1 })).toEqual({ ok: false, because: 'Rest: at least 0.' })
    expect(refused({ name: 'bars', passes: 99 })).toEqual({ ok: false, because: 'Passes: at most 30.' })
    expect(refused({ mix: { parts: Array.from({ length: 7 }, (_, i) => ({ paintId: id('paint', i), drops: 1 })), reducer: 0 } })).toEqual({ ok: false, because: 'Mix: at most 6 of them.' })
    expect(applyEdit(body(1), { do: 'add-coat', coat: coat(2, { passes: 0 }), row: 0 })).toEqual({ ok: false, because: 'Passes: at least 1.' })
    expect(applyEdit(body(1), { do: 'change-ground', ground: { ...body(1).ground, name: ' ' } })).toEqual({ ok: false, because: 'Name of the ground: at least 1 character.' })
  })

  it('are at most 60', () => {
    const full = body(...Array.from({ length: 60 }, (_, i) => i + 1))
    expect(applyEdit(full, { do: 'add-coat', coat: coat(99), row: 0 })).toEqual({ ok: false, because: 'A scheme has at most 60 coats.' })
  })

  it('that are not there are refused, whatever is asked of them', () => {
    const edits: SchemeEdit[] = [
      { do: 'take-out-coat', coatId: c(9) }, { do: 'duplicate-coat', coatId: c(9), newId: c(8) }, { do: 'change-coat', coatId: c(9), change: {} },
      { do: 'set-passes', coatId: c(9), passes: 2 }, { do: 'carry-coat', coatId: c(9), way: 'up' },
    ]
    for (const edit of edits) expect(applyEdit(body(1), edit)).toEqual({ ok: false, because: 'That coat is not in this scheme.' })
  })
})

describe('masks', () => {
  it('are fitted just below the first coat and lifted just above the last', () => {
    const outcome = applyEdit(body(1, 2, 3, 4), { do: 'add-mask', mask: mask(1), over: { firstCoatId: c(2), lastCoatId: c(3) } })
    expect(outcome.ok && rows(outcome.body)).toEqual([1, '+1', 2, 3, '-1', 4])
  })

  it('can be fitted round other coats without touching other masks', () => {
    const outcome = applyEdit(body('+1', 1, '+2', 2, '-2', '-1', 3), { do: 'span-mask', maskId: m(2), over: { firstCoatId: c(1), lastCoatId: c(3) } })
    expect(outcome.ok && rows(outcome.body)).toEqual(['+1', '+2', 1, 2, '-1', 3, '-2'])
  })

  it('are refused over coats that lie the other way round', () => {
    const outcome = applyEdit(body(1, 2), { do: 'add-mask', mask: mask(1), over: { firstCoatId: c(2), lastCoatId: c(1) } })
    expect(outcome).toMatchObject({ ok: false, because: expect.stringContaining('last coat lies below its first') })
  })

  it('a mask added and taken away leaves the body as it was', () => {
    fc.assert(fc.property(anyBody, fc.nat(), fc.nat(), (before, a, b) => {
      const coats = ids(before)
      if (coats.length === 0) return
      const [first, last] = [a % coats.length, b % coats.length].sort((x, y) => x - y)
      const added = applyEdit(before, { do: 'add-mask', mask: mask(9), over: { firstCoatId: coats[first!]!, lastCoatId: coats[last!]! } })
      if (!added.ok) throw new Error(added.because)
      expect(after(added.body, [{ do: 'remove-mask', maskId: m(9) }])).toEqual(before)
    }))
  })
})

it('only work on one field of one thing counts as one step', () => {
  const passes = (n: number): SchemeEdit => ({ do: 'set-passes', coatId: c(n), passes: 3 })
  expect(editField(passes(1))).toBe(editField({ do: 'set-passes', coatId: c(1), passes: 9 }))
  expect(editField(passes(1))).not.toBe(editField(passes(2)))
  expect(editField({ do: 'change-coat', coatId: c(1), change: { name: 'a' } })).not.toBe(editField({ do: 'change-coat', coatId: c(1), change: { note: 'a' } }))
  expect(editField({ do: 'carry-coat', coatId: c(1), way: 'up' })).toBeNull()
})
