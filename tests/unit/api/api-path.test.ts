import { expect, it } from 'vitest'
import { apiBy, apiPath } from '~/composables/api/api'

it('fills in what an address leaves open, and lets nothing out of its place', () => {
  expect(apiPath('/api/schemes/:schemeId/revisions/:number', { schemeId: 'a', number: 7 })).toBe('/api/schemes/a/revisions/7')
  expect(apiPath('/api/cards/by-link/:token', { token: '../me?x#y' })).toBe('/api/cards/by-link/..%2Fme%3Fx%23y')
  expect(apiPath('/api/blanks')).toBe('/api/blanks')
})

it('refuses an address that is not filled in', () => {
  expect(() => apiPath('/api/cards/:cardId', { card: 'a' })).toThrow('/api/cards/:cardId needs cardId')
})

it('sends everything but the parameters along', async () => {
  const sent: unknown[] = []
  const ask = apiBy((path, options) => {
    sent.push([path, options])
    return Promise.resolve('answer')
  })
  expect(await ask('/api/cards/:cardId', { params: { cardId: 'a' }, method: 'DELETE', headers: { 'if-match': '"v1"' } })).toBe('answer')
  expect(sent).toEqual([['/api/cards/a', { method: 'DELETE', headers: { 'if-match': '"v1"' } }]])
})
