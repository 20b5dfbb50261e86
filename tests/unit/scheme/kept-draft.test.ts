import 'fake-indexeddb/auto'
import { beforeEach, describe, expect, it } from 'vitest'
import { type DraftDevice, draftDevice, openDraftDevice } from '~/composables/scheme/draft-device'
import { draftShelf, UNDO_KEPT_MS } from '~/composables/scheme/draft-shelf'
import { draftsOnlyHere, emptyDrafts } from '~/composables/scheme/empty-drafts'
import { type KeptDraft, openingOf } from '~/composables/scheme/kept-draft'
import { sameValue } from '#shared/scheme/canonical'
import { record, startHistory, undo } from '#shared/scheme/history'
import { body } from './bodies'

const DAY = 24 * 3_600_000

/** A draft with so many steps to undo. */
function draft(n: number, more: Partial<KeptDraft> = {}, steps = 1): KeptDraft {
  const worked = Array.from({ length: steps }, (_, i) => i).reduce((history, i) => record(history, body(n, i + 20), { words: `Step ${i}`, field: null, at: i }), startHistory(body(n)))
  return { version: 3, base: body(n), isUnsaved: true, history: { past: [...worked.past], present: worked.present, future: [], last: null }, ...more }
}

let device: DraftDevice
let openTabs: Set<string>
let now: number
let count = 0
let old: Map<string, string>

function tab(name: string, personId = 'ann') {
  openTabs.add(name)
  return draftShelf({
    open: async () => device,
    tab: { name, isOpen: async each => openTabs.has(each) },
    personId,
    now: () => now,
    old: {
      getItem: key => old.get(key) ?? null,
      removeItem: (key) => {
        old.delete(key)
      },
    },
  })
}

beforeEach(async () => {
  device = await openDraftDevice(`drafts ${count++}`)
  openTabs = new Set()
  now = 100 * DAY
  old = new Map()
})

describe('drafts on the device', () => {
  it('come back as they were with all there is to undo, for the person who made them only', async () => {
    await tab('one').write('s1', draft(1, {}, 60))
    const found = await tab('one').read('s1')
    expect(found).toEqual(draft(1, {}, 60))
    let history = { ...found!.history, last: null }
    for (let i = 0; i < 60; i++) history = { ...undo(history), last: null } as typeof history
    expect(history.present).toEqual(body(1))
    openTabs.clear()
    expect(await tab('one', 'ben').read('s1')).toBeNull()
    expect(await tab('one').read('s2')).toBeNull()
  })

  it('of two tabs never lie in one slot: each finds its own', async () => {
    await tab('one').write('s1', draft(1))
    await tab('two').write('s1', draft(2))
    expect(await tab('one').read('s1')).toEqual(draft(1))
    expect(await tab('two').read('s1')).toEqual(draft(2))
  })

  it('that a tab left when it was killed are found by the next one, once', async () => {
    await tab('killed').write('s1', draft(1))
    openTabs.clear()
    expect(await tab('next').read('s1')).toEqual(draft(1))
    expect(await tab('other').read('s1')).toBeNull()
    expect(await device.count('slots')).toBe(1)
  })

  it('that an open tab works on are left to it', async () => {
    await tab('one').write('s1', draft(1))
    expect(await tab('two').read('s1')).toBeNull()
  })

  it('that cannot be read are as good as none, and stay where they are', async () => {
    await tab('one').write('s1', { ...draft(1), history: { past: [] } } as unknown as KeptDraft)
    expect(await tab('one').read('s1')).toBeNull()
    expect(await device.count('slots')).toBe(1)
  })

  it('are let go after two weeks when the server has them, and never while it does not', async () => {
    await tab('one').write('s1', draft(1, { isUnsaved: false }))
    await tab('one').write('s2', draft(2))
    now += UNDO_KEPT_MS + DAY
    expect(await tab('one').read('s1')).toBeNull()
    expect(await tab('one').read('s2')).toEqual(draft(2))
  })

  it('that were kept before there was undo are taken over, and leave their old place only then', async () => {
    old.set('countershade:draft:ann:s1', JSON.stringify({ version: 2, body: body(1, 2) }))
    expect(await tab('one').read('s1')).toMatchObject({ version: 2, base: null, isUnsaved: true, history: { present: body(1, 2), past: [] } })
    expect(old.size).toBe(0)
    expect((await tab('one').read('s1'))?.history.present).toEqual(body(1, 2))
    for (const text of ['{', '{"version":1}', 'null']) {
      old.set('countershade:draft:ann:s9', text)
      expect(await tab('one').read('s9')).toBeNull()
    }
  })
})

it('signing out takes every draft from the device, and first says how many are nowhere else', async () => {
  const here = await draftDevice()
  const shelf = draftShelf({ open: draftDevice, tab: { name: 'one', isOpen: async () => true }, personId: 'ann', now: () => now, old: { getItem: () => null, removeItem: () => undefined } })
  await shelf.write('s1', draft(1))
  await shelf.write('s2', draft(2, { isUnsaved: false }))
  expect(await draftsOnlyHere()).toBe(1)
  await emptyDrafts()
  expect([await draftsOnlyHere(), await here.count('slots')]).toEqual([0, 0])
})

describe('opening a scheme', () => {
  const server = { version: 3, body: body(1) }
  const kept = (more: Partial<KeptDraft>) => ({ ...draft(1, more) })

  it('goes on with what the device kept from this very version', () => {
    expect(openingOf(server, kept({}), sameValue).is).toBe('unsaved')
  })

  it('makes one of both when the device kept work made from an older version', () => {
    expect(openingOf(server, kept({ version: 2 }), sameValue).is).toBe('behind')
    expect(openingOf(server, kept({ version: 2, isUnsaved: false }), sameValue).is).toBe('behind')
    expect(openingOf(server, kept({ version: 2, isUnsaved: false, base: null }), sameValue).is).toBe('as saved')
  })

  it('has its undo again when nothing differs, whichever version it was made from', () => {
    const same = { history: { ...draft(1).history, present: body(1) } }
    expect(openingOf(server, null, sameValue)).toEqual({ is: 'as saved' })
    expect(openingOf(server, kept({ ...same, version: 2 }), sameValue).is).toBe('history')
  })
})
