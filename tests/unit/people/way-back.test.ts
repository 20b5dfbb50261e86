import { expect, it } from 'vitest'
import { wayBack } from '~/composables/people/way-back'

it('goes back to the page that was wanted', () => {
  expect(wayBack('/schemes/1?from=2')).toBe('/schemes/1?from=2')
})

it.each(['https://bad.example', '//bad.example', '/\\bad.example', 'javascript:alert(1)', '', undefined, ['/schemes'], 7])('goes home rather than to %s', (back) => {
  expect(wayBack(back)).toBe('/')
})
