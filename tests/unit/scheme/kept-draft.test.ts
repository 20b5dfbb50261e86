import { describe, expect, it } from 'vitest'
import { draftShelf, openingOf } from '~/composables/scheme/kept-draft'
import { sameValue } from '#shared/scheme/canonical'
import { body } from './bodies'

function storage(full = false) {
  const items = new Map<string, string>()
  return {
    items,
    getItem: (key: string) => items.get(key) ?? null,
    setItem: (key: string, value: string) => {
      if (full) throw new DOMException('full', 'QuotaExceededError')
      items.set(key, value)
    },
    removeItem: (key: string) => {
      items.delete(key)
    },
  }
}

describe('unsaved drafts on the device', () => {
  it('come back as they were, for the person who made them only', () => {
    const store = storage()
    draftShelf(store, 'ann').write('s1', { version: 3, body: body(1, '+1', 2, '-1') })
    expect(draftShelf(store, 'ann').read('s1')).toEqual({ version: 3, body: body(1, '+1', 2, '-1') })
    expect(draftShelf(store, 'ben').read('s1')).toBeNull()
    draftShelf(store, 'ann').remove('s1')
    expect(store.items.size).toBe(0)
  })

  it('that cannot be read are as good as none', () => {
    const store = storage()
    for (const text of ['{', '{"version":1}', 'null']) {
      store.items.set('countershade:draft:ann:s1', text)
      expect(draftShelf(store, 'ann').read('s1')).toBeNull()
    }
  })

  it('a full storage stops nobody from working', () => {
    expect(() => draftShelf(storage(true), 'ann').write('s1', { version: 1, body: body(1) })).not.toThrow()
  })
})

describe('opening a scheme', () => {
  const server = { version: 3, body: body(1) }

  it('goes on with what the device kept from this very version', () => {
    expect(openingOf(server, { version: 3, body: body(1, 2) }, sameValue)).toEqual({ is: 'unsaved', body: body(1, 2) })
  })

  it('lets one choose when the device kept work made from an older version', () => {
    expect(openingOf(server, { version: 2, body: body(1, 2) }, sameValue)).toEqual({ is: 'conflict', mine: body(1, 2) })
  })

  it('starts as saved when nothing differs, whichever version it was made from', () => {
    expect(openingOf(server, null, sameValue)).toEqual({ is: 'as saved' })
    expect(openingOf(server, { version: 2, body: body(1) }, sameValue)).toEqual({ is: 'as saved' })
  })
})
