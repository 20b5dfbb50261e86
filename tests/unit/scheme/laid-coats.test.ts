import { describe, expect, it } from 'vitest'
import type { StackItem } from '#shared/scheme/body'
import { Coat } from '#shared/scheme/coat'
import { laidCoats } from '#shared/scheme/laid-coats'
import { Mask } from '#shared/scheme/mask'

const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
const coat = (n: number): StackItem => ({
  act: 'coat',
  coat: Coat.parse({ id: id(n), mix: { parts: [] }, tool: { kind: 'brush' }, gun: { aim: 'all over' }, where: {}, passes: 1 }),
})
const fit = (n: number): StackItem => ({ act: 'fit', maskId: id(n) })
const lift = (n: number): StackItem => ({ act: 'lift', maskId: id(n) })
const mask = (n: number) => Mask.parse({ id: id(n), name: `net ${n}`, seed: n, form: { kind: 'mesh', weave: 'hexagon', pitch: 2, thread: 0.3 } })

const laid = (stack: StackItem[], masks = [mask(90), mask(91)]) =>
  laidCoats({ stack, masks }).map(one => [one.number, one.masks.map(fitted => fitted.id)])

describe('coats as they are laid', () => {
  it('a mask lies over the coats between its fit and its lift, and over no other', () => {
    expect(laid([coat(1), fit(90), coat(2), coat(3), lift(90), coat(4)]))
      .toEqual([[1, []], [2, [id(90)]], [3, [id(90)]], [4, []]])
  })

  it('masks overlap in the order they were fitted', () => {
    expect(laid([fit(91), coat(1), fit(90), coat(2), lift(91), coat(3)]))
      .toEqual([[1, [id(91)]], [2, [id(91), id(90)]], [3, [id(90)]]])
  })

  it('a mask that was never lifted stays on to the last coat', () => {
    expect(laid([fit(90), coat(1), coat(2)])).toEqual([[1, [id(90)]], [2, [id(90)]]])
  })

  it('a mask the scheme does not hold keeps no paint off', () => {
    expect(laid([fit(77), coat(1), lift(77), lift(90), coat(2)])).toEqual([[1, []], [2, []]])
  })

  it('coats are counted from the ground up', () => {
    expect(laidCoats({ stack: [coat(5), coat(6)], masks: [] }).map(one => [one.number, one.coat.id])).toEqual([[1, id(5)], [2, id(6)]])
  })
})
