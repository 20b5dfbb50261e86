import { expect, it } from 'vitest'
import { paperRows } from '~/composables/paper/paper-rows'
import { body, id } from '../scheme/bodies'

const short = (...rows: (number | string)[]) => paperRows(body(...rows)).map(row => row.is === 'coat' ? `${row.number}${row.through.map(mask => ` through ${mask.name}`).join('')}` : `${row.is} ${row.mask.name} after ${row.after?.slice(-1) ?? 'the ground'}`)

it('tells the work from the ground up, each coat with what is fitted while it is laid', () => {
  expect(short(4, '+1', 2, '+2', 3, '-1', 1, '-2')).toEqual([
    '1', 'fit Mask 1 after 4', '2 through Mask 1', 'fit Mask 2 after 2', '3 through Mask 1 through Mask 2', 'lift Mask 1 after 3', '4 through Mask 2', 'lift Mask 2 after 1',
  ])
})

it('begins with a mask on the bare ground where that is so', () => {
  expect(short('+1', 1, '-1')[0]).toBe('fit Mask 1 after the ground')
})

it('has no line for a mask that the scheme does not hold', () => {
  expect(paperRows({ ...body('+1', 1, '-1'), masks: [] }).map(row => row.key)).toEqual([id('coat', 1)])
})
