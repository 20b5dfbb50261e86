import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { applyDiff, diffBodies, isEmptyDiff } from '#shared/scheme/diff'
import { diffSentences, diffSummary } from '#shared/scheme/diff-words'
import { after, anyBody, body, coat, id, paint } from './bodies'

const c = (n: number) => id('coat', n)
const materials = { paints: [paint(1), paint(2)] }
const sentences = (from: ReturnType<typeof body>, to: ReturnType<typeof body>) => diffSentences(diffBodies(from, to), { from: { body: from, materials }, to: { body: to, materials } })

describe('the difference of two versions', () => {
  it('is nothing between a version and itself', () => {
    fc.assert(fc.property(anyBody, (a) => {
      expect(isEmptyDiff(diffBodies(a, structuredClone(a)))).toBe(true)
    }))
  })

  it('done to the earlier gives the later', () => {
    fc.assert(fc.property(anyBody, anyBody, (a, b) => {
      expect(applyDiff(a, diffBodies(a, b))).toEqual(b)
    }), { numRuns: 300 })
  })

  it('is empty only when the versions are alike', () => {
    fc.assert(fc.property(anyBody, anyBody, (a, b) => {
      if (isEmptyDiff(diffBodies(a, b))) expect(a).toEqual(b)
    }))
  })

  it('calls a moved coat moved and never changed', () => {
    const diff = diffBodies(body(1, 2, 3, 4), body(4, 1, 2, 3))
    expect(diff.moved).toEqual([{ coatId: c(4), from: 4, to: 1 }])
    expect([diff.changed, diff.added, diff.takenOut]).toEqual([[], [], []])
  })

  it('does not call coats moved that only got another number from one added below', () => {
    expect(diffBodies(body(1, 2, 3), body(9, 1, 2, 3))).toMatchObject({ moved: [], added: [coat(9)] })
  })

  it('a coat carried into a bracket shows as what the mask now covers', () => {
    const diff = diffBodies(body(1, '+1', 2, '-1'), body('+1', 1, 2, '-1'))
    expect(diff.moved).toEqual([])
    expect(diff.masksSpanned).toMatchObject([{ from: [c(2)], to: [c(1), c(2)] }])
  })

  it('cannot be done to a body it was not made from', () => {
    expect(() => applyDiff(body(), diffBodies(body(1), body(1, 2)))).toThrow(RangeError)
  })
})

describe('in words', () => {
  it('names fields before and after', () => {
    const to = after(body(1, 2), [
      { do: 'change-coat', coatId: c(2), change: { name: 'glaze', passes: 5, mix: { parts: [{ paintId: id('paint', 2), drops: 3 }], reducer: 1 } } },
    ])
    expect(sentences(body(1, 2), to)).toEqual([
      'Coat 2, “glaze”: name none → “glaze”; mix 20 drops Paint 1, 5 drops reducer → 3 drops Paint 2, 1 drop reducer; passes 3 → 5.',
    ])
  })

  it('says what was added, taken out, moved and fitted otherwise', () => {
    expect(sentences(body(1, 2, 3, '+1', 4, '-1'), body(3, 1, '+1', 4, 5, '-1'))).toEqual([
      'Coat 2 is taken out.', 'Coat 4 is new.', 'Coat 3 is now coat 1.',
    ])
    expect(sentences(body(1, '+1', 2, '-1'), body('+1', 1, 2, '-1'))).toEqual(['“Mask 1” is on for coats 1 and 2 instead of coat 2.'])
  })

  it('sums up in a few words', () => {
    expect(diffSummary(diffBodies(body(1, 2), body(1, 2)))).toBe('nothing')
    expect(diffSummary(diffBodies(body(1, 2), after(body(1, 2, 3), [{ do: 'set-passes', coatId: c(1), passes: 9 }])))).toBe('1 coat changed, 1 new')
  })
})
