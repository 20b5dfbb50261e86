import { beforeEach, describe, expect, it } from 'vitest'
import { watch } from 'vue'
import type { KeptDraft } from '~/composables/scheme/kept-draft'
import { workOnDraft } from '~/composables/scheme/work-on-draft'
import { openDraft } from '~/stores/scheme-draft'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import { Problem } from '#shared/errors/problem'
import { SchemeBody } from '#shared/scheme/body'
import type { RevisionView, SchemeView } from '#shared/scheme/scheme-view'
import { body, coat, id, paint, rows } from './bodies'

const SCHEME = id('blank', 77)
const materials = (blankId: string) => ({ paints: [paint(1)], blank: { id: blankId, shape: builtInBlank('minnow-90') } })

/** The server's one scheme, and a line to it that can break. */
class Server {
  version = 1
  draft: SchemeBody = body(1)
  online = true
  losesAnswers = false
  published: { note: string, draft: SchemeBody }[] = []

  view(): SchemeView {
    return {
      id: SCHEME, name: 'Perch', fish: '', version: this.version, draft: structuredClone(this.draft), materials: materials(this.draft.blankId), headNumber: 0,
      savedAt: `v${this.version}`, savedBy: null, retired: false, origin: null, revisions: [],
    }
  }

  private reach() {
    if (!this.online) throw new TypeError('Failed to fetch')
  }

  async save(draft: SchemeBody, version: number) {
    this.reach()
    if (version !== this.version) throw new Problem({ code: 'scheme/changed-meanwhile', version: this.version })
    this.version++
    this.draft = SchemeBody.parse(draft)
    if (this.losesAnswers) throw new TypeError('Failed to fetch')
    return { version: this.version, savedAt: `v${this.version}` }
  }

  async publish(note: string, version: number): Promise<RevisionView> {
    this.reach()
    if (version !== this.version) throw new Problem({ code: 'scheme/changed-meanwhile', version: this.version })
    this.published.push({ note, draft: this.draft })
    return { id: SCHEME, number: 1, note, coats: 1, publishedAt: '', publishedBy: null, schemeId: SCHEME, schemeName: '', body: this.draft, materials: materials(this.draft.blankId), engineVersion: '1' }
  }

  async read() {
    this.reach()
    return this.view()
  }
}

/** One painter with a page and a device. Time passes only when `wait` is called. */
async function painter(server: Server, device: { kept: KeptDraft | null } = { kept: null }, mayChange = true) {
  const scheme = server.view()
  const draft = openDraft(scheme)
  let timers: (() => void)[] = []
  let clock = 0
  const work = workOnDraft(scheme, draft, {
    readScheme: () => server.read(),
    readRevision: async () => ({ ...await server.publish('', server.version), body: body(7) }),
    readMaterials: async blankId => materials(blankId),
    save: (unsaved, version) => server.save(unsaved, version),
    publish: (note, version) => server.publish(note, version),
    now: () => clock += 10_000,
  }, mayChange)
  const states: string[] = []
  watch(draft.saveState, state => states.push(state.is), { flush: 'sync' })
  await work.start({
    openShelf: async () => ({
      read: async () => structuredClone(device.kept),
      write: async (_, kept) => {
        device.kept = structuredClone(kept)
      },
    }),
    later: (_, run) => {
      timers.push(run)
      return () => {
        timers = timers.filter(each => each !== run)
      }
    },
  })
  return {
    ...work,
    device,
    states,
    lay: (n: number) => work.do({ do: 'add-coat', coat: coat(n), row: work.body.value.stack.length }),
    async wait() {
      for (const run of timers.splice(0)) run()
      for (let i = 0; i < 5; i++) await new Promise(resolve => setImmediate(resolve))
    },
  }
}

let server: Server
beforeEach(() => {
  server = new Server()
})

describe('one painter', () => {
  it('sees an edit at once, and it is saved by itself', async () => {
    const ann = await painter(server)
    expect(ann.lay(2)).toBeNull()
    expect(rows(ann.body.value)).toEqual([1, 2])
    await ann.wait()
    expect(rows(server.draft)).toEqual([1, 2])
    expect(ann.saveState.value).toEqual({ is: 'saved', at: 'v2' })
  })

  it('is told why an edit cannot be done, and nothing is saved for it', async () => {
    const ann = await painter(server)
    expect(ann.do({ do: 'carry-coat', coatId: id('coat', 1), way: 'down' })).toBe('It lies on the ground already: nothing is below it.')
    await ann.wait()
    expect(server.version).toBe(1)
  })

  it('undoes and redoes, in words, and both are saved', async () => {
    const ann = await painter(server)
    ann.lay(2)
    expect([ann.undoWords.value, ann.canRedo.value]).toEqual(['Lay a coat', false])
    ann.undo()
    await ann.wait()
    expect(rows(server.draft)).toEqual([1])
    ann.redo()
    await ann.wait()
    expect(rows(server.draft)).toEqual([1, 2])
  })

  it('publishes what is on the page, saved or not', async () => {
    const ann = await painter(server)
    ann.lay(2)
    await ann.publish('done')
    expect(server.published.map(each => [each.note, rows(each.draft)])).toEqual([['done', [1, 2]]])
  })

  it('cannot publish an older draft than the page shows when the line is down', async () => {
    const ann = await painter(server)
    ann.lay(2)
    server.online = false
    await expect(ann.publish('done')).rejects.toThrow('Failed to fetch')
    server.online = true
    expect(server.published).toEqual([])
  })

  it('gets an older revision back, one undo away from the present', async () => {
    const ann = await painter(server)
    await ann.restore(1)
    expect(rows(server.draft)).toEqual([7])
    ann.undo()
    await ann.wait()
    expect(rows(server.draft)).toEqual([1])
  })

  it('who may only read changes nothing', async () => {
    const bench = await painter(server, undefined, false)
    expect(bench.lay(2)).toMatch(/^Your role/)
    expect(rows(bench.body.value)).toEqual([1])
    await expect(bench.restore(1)).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
  })

  it('draws another blank with that blank\'s materials', async () => {
    const ann = await painter(server)
    ann.do({ do: 'choose-blank', blankId: id('blank', 2) })
    await ann.refreshMaterials()
    expect(ann.materials.value.blank.id).toBe(id('blank', 2))
  })
})

describe('after a sudden end', () => {
  it('the work goes on where it was, with its undo, and is saved', async () => {
    const before = await painter(server)
    server.online = false
    before.lay(2)
    before.lay(3)
    before.undo()
    await before.wait()
    server.online = true
    const after = await painter(server, before.device)
    expect(rows(after.body.value)).toEqual([1, 2])
    expect([after.undoWords.value, after.redoWords.value]).toEqual(['Lay a coat', 'Lay a coat'])
    await after.wait()
    expect(rows(server.draft)).toEqual([1, 2])
    expect(after.device.kept?.isUnsaved).toBe(false)
    after.undo()
    await after.wait()
    expect(rows(server.draft)).toEqual([1])
  })

  it('more than fifty steps can be undone though all of them were saved', async () => {
    const before = await painter(server)
    for (let n = 2; n < 57; n++) before.lay(n)
    await before.wait()
    const after = await painter(server, before.device)
    for (let n = 2; n < 57; n++) after.undo()
    expect(rows(after.body.value)).toEqual([1])
    for (let n = 2; n < 57; n++) after.redo()
    expect(after.body.value).toEqual(before.body.value)
  })

  it('undo of what was saved leaves alone what others saved since', async () => {
    const before = await painter(server)
    before.lay(2)
    await before.wait()
    await server.save(body(9, 1, 2), server.version)
    const after = await painter(server, before.device)
    expect(rows(after.body.value)).toEqual([9, 1, 2])
    after.undo()
    await after.wait()
    expect(rows(server.draft)).toEqual([9, 1])
  })

  it('work made from an older version waits for a choice where both did the same thing, and neither is lost', async () => {
    const before = await painter(server)
    server.online = false
    before.lay(2)
    await before.wait()
    server.online = true
    await server.save(body(1, 3), 1)
    const after = await painter(server, before.device)
    expect(after.conflict.value && [after.conflict.value.mine, after.conflict.value.theirs.draft].map(rows)).toEqual([[1, 2], [1, 3]])
    await after.wait()
    expect(rows(server.draft)).toEqual([1, 3])
    after.settle('mine')
    await after.wait()
    expect(rows(server.draft)).toEqual([1, 3, 2])
  })

  it('nothing is changed while what the device kept is still being read', async () => {
    const draft = openDraft(server.view())
    const work = workOnDraft(server.view(), draft, {} as Parameters<typeof workOnDraft>[2], true)
    expect(work.do({ do: 'take-out-coat', coatId: id('coat', 1) })).toMatch(/still being opened/)
  })
})

describe('two painters on one draft', () => {
  async function bothSaved() {
    const ann = await painter(server)
    const ben = await painter(server)
    ann.lay(2)
    ben.lay(3)
    await ann.wait()
    await ben.wait()
    return { ann, ben }
  }

  it('who worked on different coats both keep their work, are not asked, and the second is told', async () => {
    const ann = await painter(server)
    const ben = await painter(server)
    ann.do({ do: 'add-coat', coat: coat(2), row: 0 })
    await ann.wait()
    ben.do({ do: 'set-passes', coatId: id('coat', 1), passes: 9 })
    await ben.wait()
    await ben.wait()
    expect(rows(server.draft)).toEqual([2, 1])
    expect(server.draft.stack.at(-1)).toMatchObject({ coat: { passes: 9 } })
    expect(ben.states).not.toContain('conflict')
    expect(ben.takenIn.value?.words).toEqual(['Coat 1 is new.'])
    ben.undo()
    await ben.wait()
    expect(rows(server.draft)).toEqual([2, 1])
  })

  it('see what the other saved as soon as word of it comes', async () => {
    const ann = await painter(server)
    const ben = await painter(server)
    ann.lay(2)
    await ann.wait()
    ben.heard(server.version)
    await ben.wait()
    expect(rows(ben.body.value)).toEqual([1, 2])
    expect([ben.saveState.value.is, ben.canUndo.value]).toEqual(['saved', false])
  })

  it('the second sees both versions and overwrites nothing', async () => {
    const { ben } = await bothSaved()
    expect(rows(server.draft)).toEqual([1, 2])
    expect([ben.conflict.value!.mine, ben.conflict.value!.theirs.draft].map(rows)).toEqual([[1, 3], [1, 2]])
    expect(ben.lay(4)).toMatch(/^Somebody else changed/)
    expect(ben.device.kept && rows(ben.device.kept.history.present)).toEqual([1, 3])
  })

  it('may take theirs where both did the same thing, and have the own one back by undo', async () => {
    const { ben } = await bothSaved()
    ben.settle('theirs')
    await ben.wait()
    expect([rows(ben.body.value), rows(server.draft)]).toEqual([[1, 3, 2], [1, 3, 2]])
    ben.undo()
    await ben.wait()
    expect(rows(server.draft)).toEqual([1, 2, 3])
  })

  it('may keep the own one, and have theirs back by undo', async () => {
    const { ben } = await bothSaved()
    ben.settle('mine')
    await ben.wait()
    expect(rows(server.draft)).toEqual([1, 2, 3])
    ben.undo()
    await ben.wait()
    expect(rows(server.draft)).toEqual([1, 3, 2])
  })

  it('publish nothing they have not looked at: what the other saved comes in first', async () => {
    const ann = await painter(server)
    await server.save(body(9, 1), 1)
    await expect(ann.publish('done')).rejects.toMatchObject({ data: { code: 'scheme/changed-meanwhile' } })
    await ann.wait()
    expect(rows(ann.body.value)).toEqual([9, 1])
    ann.lay(2)
    await server.save(body(9, 8, 1), server.version)
    await expect(ann.publish('done')).rejects.toMatchObject({ data: { code: 'scheme/changed-meanwhile' } })
    expect(server.published).toEqual([])
    await ann.publish('done')
    expect(server.published.map(each => rows(each.draft))).toEqual([[9, 8, 1, 2]])
  })

  it('are not asked when both did the same, or when only the name was changed', async () => {
    const ann = await painter(server)
    server.version = 2
    ann.lay(2)
    await ann.wait()
    expect(ann.states).not.toContain('conflict')
    await ann.wait()
    expect([rows(server.draft), server.version]).toEqual([[1, 2], 3])
  })

  it('are not asked because of a space after a name, which the server takes off', async () => {
    const ann = await painter(server)
    ann.do({ do: 'change-coat', coatId: id('coat', 1), change: { name: 'bars ' } })
    await ann.wait()
    server.version++
    ann.lay(2)
    await ann.wait()
    await ann.wait()
    expect(ann.conflict.value).toBeNull()
    expect(rows(server.draft)).toEqual([1, 2])
  })

  it('are not asked about one\'s own save whose answer got lost', async () => {
    const ann = await painter(server)
    ann.lay(2)
    server.losesAnswers = true
    await ann.wait()
    expect(ann.saveState.value.is).toBe('on this device')
    server.losesAnswers = false
    ann.lay(3)
    for (let i = 0; i < 3; i++) await ann.wait()
    expect(ann.conflict.value).toBeNull()
    expect(rows(server.draft)).toEqual([1, 2, 3])
  })

  it('a conflict met while the line breaks is read when it is back', async () => {
    const { ann } = { ann: await painter(server) }
    await server.save(body(1, 9), 1)
    const read = server.read.bind(server)
    server.read = async () => {
      throw new TypeError('Failed to fetch')
    }
    ann.lay(2)
    await ann.wait()
    expect([ann.saveState.value.is, ann.conflict.value]).toEqual(['on this device', null])
    server.read = read
    await ann.saveNow()
    expect(rows(ann.conflict.value!.theirs.draft)).toEqual([1, 9])
  })
})
