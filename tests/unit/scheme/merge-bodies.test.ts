import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { SchemeBody } from '#shared/scheme/body'
import { canonicalJson } from '#shared/scheme/canonical'
import { applyEdit } from '#shared/scheme/edits'
import { type Clash, clashKey, mergeBodies } from '#shared/scheme/merge-bodies'
import type { Side } from '#shared/scheme/merge-order'
import { coatsOf, stackFaults } from '#shared/scheme/stack-order'
import { after, anyBody, anyEdit, body, coat, id, mask, rows } from './bodies'

const anyWork = fc.array(anyEdit, { maxLength: 10 })
/** A body and what two people made of it. */
const anyThree = fc.tuple(anyBody, anyWork, anyWork).map(([base, own, other]) => ({ base, mine: after(base, own), theirs: after(base, other) }))
const SIDES: readonly Side[] = ['mine', 'theirs']

describe('two versions of one draft', () => {
  it('are mine when only I changed it, and theirs when only they did', () => {
    fc.assert(fc.property(anyThree, ({ base, mine, theirs }) => {
      expect(mergeBodies(base, mine, base)).toEqual({ body: mine, clashes: [] })
      expect(mergeBodies(base, base, theirs)).toEqual({ body: theirs, clashes: [] })
    }))
  })

  it('are as both have it when both did the same', () => {
    fc.assert(fc.property(anyThree, ({ base, mine }) => {
      expect(mergeBodies(base, mine, mine)).toEqual({ body: mine, clashes: [] })
    }))
  })

  it('always make a body that can be done at a bench, whatever is chosen', () => {
    fc.assert(fc.property(anyThree, fc.infiniteStream(fc.constantFrom(...SIDES)), ({ base, mine, theirs }, sides) => {
      const { clashes } = mergeBodies(base, mine, theirs)
      const choices = new Map(clashes.map(clash => [clashKey(clash), sides.next().value ?? 'mine']))
      const merged = mergeBodies(base, mine, theirs, choices).body
      expect(SchemeBody.parse(merged)).toEqual(merged)
      expect(stackFaults(merged)).toEqual([])
    }))
  })

  it('where they clash are as the side that was chosen', () => {
    fc.assert(fc.property(anyThree, fc.constantFrom(...SIDES), ({ base, mine, theirs }, side) => {
      const chosen = { mine, theirs }[side]
      const { body: merged, clashes } = mergeBodies(base, mine, theirs, side)
      for (const clash of clashes) expect(partOf(merged, clash)).toEqual(partOf(chosen, clash))
    }))
  })

  it('lose no coat that one side laid, nor one that both kept', () => {
    fc.assert(fc.property(anyThree, ({ base, mine, theirs }) => {
      const ids = (of: SchemeBody) => coatsOf(of.stack).map(each => each.id)
      const merged = new Set(ids(mergeBodies(base, mine, theirs).body))
      const laid = [...ids(mine), ...ids(theirs)].filter(each => !ids(base).includes(each))
      expect([...laid, ...ids(mine).filter(each => ids(theirs).includes(each))].filter(each => !merged.has(each))).toEqual([])
    }))
  })

  it('say the same to both people: what one calls mine the other calls theirs', () => {
    fc.assert(fc.property(anyThree, ({ base, mine, theirs }) => {
      const own = mergeBodies(base, mine, theirs, 'mine')
      const other = mergeBodies(base, theirs, mine, 'theirs')
      expect(new Set(other.clashes.map(clashKey))).toEqual(new Set(own.clashes.map(clashKey)))
      expect(rows(other.body)).toEqual(rows(own.body))
      const inOrder = ({ masks, answered = [], ...rest }: SchemeBody) => canonicalJson({ ...rest, masks: masks.map(canonicalJson).sort(), answered: [...answered].sort() })
      expect(inOrder(other.body)).toBe(inOrder(own.body))
    }))
  })
})

/** What a clash is about, in one body. */
function partOf(of: SchemeBody, clash: Clash): unknown {
  switch (clash.part) {
    case 'coat': return coatsOf(of.stack).find(each => each.id === clash.id)
    case 'mask': return of.masks.find(each => each.id === clash.id)
    case 'ground': return of.ground
    case 'eyes': return of.eyes
    case 'blank': return of.blankId
    case 'whole': return of
    // Of the order only what the other does not have may come between: its own law stands below.
    case 'order': return null
  }
}

describe('coat by coat', () => {
  const base = body(1, 2, 3)
  const passes = (of: SchemeBody, n: number, count: number) => after(of, [{ do: 'set-passes', coatId: id('coat', n), passes: count }])
  const passesOf = (of: SchemeBody) => coatsOf(of.stack).map(each => each.passes)

  it('changes of two coats are both kept, without a question', () => {
    const { body: merged, clashes } = mergeBodies(base, passes(base, 1, 7), passes(base, 3, 9))
    expect(clashes).toEqual([])
    expect(passesOf(merged)).toEqual([7, passesOf(base)[1], 9])
  })

  it('two changes of one coat are one question, and the others stay out of it', () => {
    const mine = passes(passes(base, 1, 7), 2, 4)
    const theirs = passes(passes(base, 1, 8), 3, 9)
    const { clashes } = mergeBodies(base, mine, theirs)
    expect(clashes.map(clashKey)).toEqual([`coat ${id('coat', 1)}`])
    expect(passesOf(mergeBodies(base, mine, theirs, new Map([[`coat ${id('coat', 1)}`, 'theirs']])).body)).toEqual([8, 4, 9])
  })

  it('a coat that one takes out and the other works on is a question', () => {
    const out = after(base, [{ do: 'take-out-coat', coatId: id('coat', 2) }])
    for (const theirs of [passes(base, 2, 9), after(base, [{ do: 'carry-coat', coatId: id('coat', 2), way: 'down' }, { do: 'carry-coat', coatId: id('coat', 3), way: 'down' }])]) {
      const { clashes } = mergeBodies(base, out, theirs)
      if (clashes.some(clash => clash.part === 'coat')) expect(rows(mergeBodies(base, out, theirs, 'theirs').body)).toContain(2)
    }
    expect(mergeBodies(base, out, passes(base, 2, 9)).clashes).toMatchObject([{ part: 'coat', mine: null, theirs: { passes: 9 } }])
  })

  it('ground and eyes are questions of their own', () => {
    const ground = (name: string) => ({ ...base.ground, name })
    const merged = mergeBodies(base, { ...base, ground: ground('Grey') }, { ...base, ground: ground('Black'), eyes: null }, 'theirs')
    expect(merged.body.ground.name).toBe('Black')
    expect(merged.clashes.map(clash => clash.part)).toEqual(['ground'])
  })

  it('answers of both are kept, and what one took back stays taken back', () => {
    const answered = (...keys: string[]) => ({ ...base, answered: keys })
    expect(mergeBodies(answered('a', 'b'), answered('a', 'b', 'c'), answered('b', 'd')).body.answered).toEqual(['b', 'c', 'd'])
  })
})

describe('the order', () => {
  const base = body(1, 2, 3, 4)

  it('is taken from both where each carried another coat', () => {
    expect(mergeBodies(base, body(2, 1, 3, 4), body(1, 2, 4, 3))).toEqual({ body: body(2, 1, 4, 3), clashes: [] })
    expect(rows(mergeBodies(base, body(5, 1, 2, 3, 4), body(1, 2, 3, 4, 6)).body)).toEqual([5, 1, 2, 3, 4, 6])
  })

  it('is a question where both laid a coat at one place, since it shows which lies on top', () => {
    const [mine, theirs] = [body(1, 2, 3, 4, 5), body(1, 2, 3, 4, 6)]
    expect(mergeBodies(base, mine, theirs).clashes).toEqual([{ part: 'order' }])
    expect(rows(mergeBodies(base, mine, theirs, 'mine').body)).toEqual([1, 2, 3, 4, 6, 5])
    expect(rows(mergeBodies(base, mine, theirs, 'theirs').body)).toEqual([1, 2, 3, 4, 5, 6])
  })

  it('is a question where both carried one coat, each elsewhere', () => {
    const [mine, theirs] = [body(4, 1, 2, 3), body(1, 4, 2, 3)]
    expect(mergeBodies(base, mine, theirs).clashes).toEqual([{ part: 'order' }])
    expect(rows(mergeBodies(base, mine, theirs, 'mine').body)).toEqual([4, 1, 2, 3])
    expect(rows(mergeBodies(base, mine, theirs, 'theirs').body)).toEqual([1, 4, 2, 3])
  })

  it('never lifts a mask before it is fitted, though one carried its fit and the other its lift', () => {
    const under = body('+1', 1, 2, '-1')
    const mine = body(1, 2, '+1', '-1')
    const theirs = body('+1', '-1', 1, 2)
    for (const side of SIDES) expect(rows(mergeBodies(under, mine, theirs, side).body)).toEqual(rows({ mine, theirs }[side]))
  })

  it('is a question when a coat would slip out of a mask that one laid it under', () => {
    const [under, mine, theirs] = [body('+1', 2, '-1', 3, 4, 5), body('+1', 2, 5, '-1', 3, 4), body(2, 3, '+1', 4, '-1', 5)]
    expect(mergeBodies(under, mine, theirs).clashes).toEqual([{ part: 'order' }])
    expect(rows(mergeBodies(under, mine, theirs, 'mine').body)).toEqual(rows(mine))
  })
})

describe('one of the two whole', () => {
  it('is chosen when nothing is known of what both began with', () => {
    expect(mergeBodies(null, body(1), body(2)).clashes).toEqual([{ part: 'whole' }])
    expect(mergeBodies(null, body(1), body(2), 'theirs').body).toEqual(body(2))
    expect(mergeBodies(null, body(1), body(1)).clashes).toEqual([])
  })

  it('is chosen when both together are more coats or masks than a scheme holds', () => {
    const many = (from: number, to: number) => body(...Array.from({ length: to - from + 1 }, (_, i) => from + i))
    const base = many(1, 40)
    const laid = (from: number) => ({ ...base, stack: [...base.stack, ...many(from, from + 14).stack] })
    expect(mergeBodies(base, laid(100), laid(200)).clashes).toEqual([{ part: 'whole' }])
    const masked = (from: number) => Array.from({ length: 12 }, (_, i) => mask(from + i)).reduce((now, each) => {
      const outcome = applyEdit(now, { do: 'add-mask', mask: each, over: { firstCoatId: coat(1).id, lastCoatId: coat(1).id } })
      return outcome.ok ? outcome.body : now
    }, base)
    expect(mergeBodies(base, masked(100), masked(200), 'theirs').body).toEqual(masked(200))
  })
})
