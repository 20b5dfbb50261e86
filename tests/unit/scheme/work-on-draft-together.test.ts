import { beforeEach, describe, expect, it } from 'vitest'
import { body, coat, id, rows } from './bodies'
import { painter, Server } from './painter'

let server: Server
beforeEach(() => {
  server = new Server()
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
