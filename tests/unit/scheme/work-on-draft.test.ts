import { beforeEach, describe, expect, it } from 'vitest'
import { workOnDraft } from '~/composables/scheme/work-on-draft'
import { openDraft } from '~/stores/scheme-draft'
import { body, id, rows } from './bodies'
import { painter, Server } from './painter'

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
