import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { applyEdit } from '#shared/scheme/edits'
import { brackets, carryCoat, coatNumber, coatsOf, masksOver, moveItem, rowsOfMask, stackFaults } from '#shared/scheme/stack-order'
import { anyBody, body, frozen, id, mask, rows } from './bodies'

const c = (n: number) => id('coat', n)

describe('carrying a coat', () => {
  it('takes it one row up past another coat', () => {
    const moved = carryCoat(body(1, 2, 3), c(1), 'up')
    expect(moved.ok && rows(moved)).toEqual([2, 1, 3])
  })

  it('takes it into a mask\'s bracket and out at the other end', () => {
    let b = body(1, '+1', 2, '-1')
    const seen = []
    for (let i = 0; i < 3; i++) {
      const moved = carryCoat(b, c(1), 'up')
      if (!moved.ok) throw new Error(moved.because)
      b = { ...b, stack: moved.stack }
      seen.push([rows(b), masksOver(b, c(1)).length])
    }
    expect(seen).toEqual([[['+1', 1, 2, '-1'], 1], [['+1', 2, 1, '-1'], 1], [['+1', 2, '-1', 1], 0]])
  })

  it('says why it cannot go below the ground or above the top', () => {
    expect(carryCoat(body(1, 2), c(1), 'down')).toEqual({ ok: false, because: 'It lies on the ground already: nothing is below it.' })
    expect(carryCoat(body(1, 2), c(2), 'up')).toEqual({ ok: false, because: 'It is on top already: nothing lies above it.' })
  })
})

describe('moving a fit or a lift', () => {
  it('widens and narrows what the mask covers', () => {
    const wider = moveItem(body(1, '+1', 2, '-1', 3), 3, 4)
    expect(wider.ok && rows(wider)).toEqual([1, '+1', 2, 3, '-1'])
  })

  it('never lifts a mask before it is fitted, and says what to do first', () => {
    expect(moveItem(body('+1', 1, '-1'), 2, 0)).toEqual({ ok: false, because: '“Mask 1” cannot be lifted before it is fitted. Carry its fit down first.' })
    expect(moveItem(body('+1', 1, '-1'), 0, 2)).toEqual({ ok: false, because: '“Mask 1” cannot be fitted after it is lifted. Carry its lift up first.' })
  })
})

describe('brackets', () => {
  it('count their rows and coats, and stand side by side where they overlap', () => {
    const b = body('+1', 1, '+2', 2, '-2', 3, '-1', '+3', 4, '-3')
    expect(brackets(b).map(({ from, to, coatIds, lane }) => ({ from, to, coats: coatIds.map(each => Number(each.slice(-12))), lane }))).toEqual([
      { from: 0, to: 6, coats: [1, 2, 3], lane: 1 },
      { from: 2, to: 4, coats: [2], lane: 0 },
      { from: 7, to: 9, coats: [4], lane: 0 },
    ])
  })

  it('may cross: a tape lifted while a later one is still on', () => {
    const b = body('+1', 1, '+2', 2, '-1', 3, '-2')
    expect(masksOver(b, c(2)).map(each => each.name)).toEqual(['Mask 1', 'Mask 2'])
    expect(masksOver(b, c(3)).map(each => each.name)).toEqual(['Mask 2'])
    expect(new Set(brackets(b).map(each => each.lane)).size).toBe(2)
  })
})

describe('a mask that spans coats', () => {
  const anyMasked = anyBody.filter(each => each.masks.length > 0 && coatsOf(each.stack).length > 0)
  const m = id('mask', 1)

  it('is on for exactly the coats between its fit and its lift, however it is nested', () => {
    fc.assert(fc.property(anyMasked, (made) => {
      for (const coat of coatsOf(made.stack)) {
        const around = brackets(made).filter(span => span.coatIds.includes(coat.id)).map(span => span.mask.id)
        expect(masksOver(made, coat.id).map(each => each.id).sort()).toEqual(around.sort())
      }
    }))
  })

  it('has its ends moved as asked, and nothing else; what cannot be is refused with the mask\'s name', () => {
    fc.assert(fc.property(anyMasked, fc.nat(14), fc.nat(14), (made, from, to) => {
      const moved = moveItem(frozen(made), from, to)
      if (moved.ok) {
        expect(stackFaults({ ...made, stack: moved.stack })).toEqual([])
        expect(moved.stack[to]).toEqual(made.stack[from])
        expect(moved.stack.toSpliced(to, 1)).toEqual(made.stack.toSpliced(from, 1))
        return
      }
      expect(moved.because).toMatch(/^[“A-Z].*\.$/)
      const item = made.stack[from]
      if (item?.act !== 'coat' && item && to < made.stack.length) expect(moved.because).toContain(made.masks.find(each => each.id === item.maskId)?.name)
    }))
  })

  it('comes round any run of coats row by row, so that the arrow keys reach all that a drag does', () => {
    fc.assert(fc.property(fc.integer({ min: 2, max: 7 }), fc.nat(), fc.nat(), (count, a, b) => {
      const coats = Array.from({ length: count }, (_, i) => i + 1)
      const [first, last] = [Math.min(a % count, b % count), Math.max(a % count, b % count)]
      let now = body('+1', 1, '-1', ...coats.slice(1))
      const carry = (act: 'fit' | 'lift', goal: () => number) => {
        for (let row = rowsOfMask(now.stack, m)[act]; row !== goal(); row = rowsOfMask(now.stack, m)[act]) {
          const step = moveItem(now, row, row + Math.sign(goal() - row))
          if (!step.ok) throw new Error(step.because)
          now = { ...now, stack: step.stack }
        }
      }
      carry('lift', () => last + 2)
      carry('fit', () => first)
      expect(masksOver(now, c(first + 1))).toHaveLength(1)
      expect(brackets(now)[0]?.coatIds).toEqual(coats.slice(first, last + 1).map(c))
    }))
  })

  it('is kept in place for a coat that is laid on the last of its own', () => {
    const laid = applyEdit(body('+1', 1, '-1', 2), { do: 'duplicate-coat', coatId: c(1), newId: c(9) })
    expect(laid.ok && masksOver(laid.body, c(9)).map(each => each.id)).toEqual([m])
  })

  it('may be fitted round another one, and inside it', () => {
    const outside = applyEdit(body('+1', 1, 2, 3, '-1'), { do: 'add-mask', mask: mask(2), over: { firstCoatId: c(2), lastCoatId: c(2) } })
    expect(outside.ok && rows(outside.body)).toEqual(['+1', 1, '+2', 2, '-2', 3, '-1'])
    expect(outside.ok && brackets(outside.body).map(span => span.lane)).toEqual([1, 0])
  })
})

describe('faults', () => {
  it('are none in a stack that can be sprayed', () => {
    expect(stackFaults(body(1, '+1', 2, '-1'))).toEqual([])
  })

  it.each([
    [body('+1', 1), 'never-lifted'],
    [body('-1', 1), 'lifted-before-fitted'],
    [body(1, '-1', '+1'), 'lifted-before-fitted'],
    [body('+1', 1, '-1', '+1', 2, '-1'), 'fitted-twice'],
    [{ ...body(1), masks: body('+1').masks }, 'never-fitted'],
    [{ ...body('+1', 1, '-1'), masks: [] }, 'unknown-mask'],
    [body(1, 1), 'coat-twice'],
  ])('are found and said in a sentence', (faulty, kind) => {
    const faults = stackFaults(faulty)
    expect(faults[0]?.kind).toBe(kind)
    for (const fault of faults) expect(fault.sentence).toMatch(/^[“A-Z].*\.$/)
  })
})

it('coats are numbered from the ground, whatever is fitted between', () => {
  expect([1, 2, 3].map(n => coatNumber(body(3, '+1', 1, '-1', 2).stack, c(n)))).toEqual([2, 3, 1])
  expect(coatNumber(body(1).stack, c(9))).toBe(0)
})
