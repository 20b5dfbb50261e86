import { expect, it } from 'vitest'
import { orderAsWished } from '#shared/photos/order-as-wished'

const standing = ['a', 'b', 'c', 'd'].map(id => ({ id }))
const order = (wish: string[]) => orderAsWished(standing, wish).map(thing => thing.id).join('')

it('puts photos in the wished order and lets one that was added meanwhile follow', () => {
  expect(order(['c', 'a', 'b'])).toBe('cabd')
})

it('neither loses nor doubles a photo, whatever is wished', () => {
  expect(order(['d', 'd', 'gone', 'a'])).toBe('dabc')
  expect(order([])).toBe('abcd')
})
