import { describe, expect, it } from 'vitest'
import { brackets, carryCoat, coatNumber, masksOver, moveItem, stackFaults } from '#shared/scheme/stack-order'
import { body, id, rows } from './bodies'

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
