import { expect, it } from 'vitest'
import { addressKey } from '#server/services/people/count-try'

it.each([
  ['192.0.2.7', '192.0.2.7'],
  ['::ffff:192.0.2.7', '192.0.2.7'],
  ['2001:db8:1:2:3:4:5:6', '2001:0db8:0001:0002'],
  ['2001:DB8:1:2::9', '2001:0db8:0001:0002'],
  ['2001:db8::9', '2001:0db8:0000:0000'],
  ['::1', '0000:0000:0000:0000'],
  ['1::2:3:4:5:6:7', '0001:0000:0002:0003'],
  ['fe80::1%eth0', 'fe80:0000:0000:0000'],
])('counts the tries of %s under %s', (address, key) => {
  expect(addressKey(address)).toBe(key)
})
