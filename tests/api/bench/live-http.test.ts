import { beforeAll, describe, expect, it } from 'vitest'
import type { Ctx } from '#server/services/ctx'
import { removePerson } from '#server/services/people/change-role'
import { testPerson, testWorkshop } from '../factories'
import { type TestServer, testServer } from '../server'
import { act, pass, testRun } from './ground'

let servers: TestServer[]
beforeAll(async () => {
  servers = [await testServer(), await testServer()]
}, 600_000)

interface Told { name: string, id: string, data: { events?: { id: string }[], because?: string } }

/** Reads server-sent events as they come. */
class Reader {
  private text = ''
  private readonly bytes: ReadableStreamDefaultReader<Uint8Array>

  private constructor(readonly status: number, readonly type: string | null, body: ReadableStream<Uint8Array>) {
    this.bytes = body.getReader()
  }

  static async open(server: TestServer, ctx: Ctx | null, runId: string, headers: Record<string, string> = {}): Promise<Reader> {
    const response = await server.ask('GET', `/api/runs/${runId}/live`, { as: ctx, headers })
    return new Reader(response.status, response.headers.get('content-type'), response.body!)
  }

  /** The next event; null when the stream is over. */
  async next(): Promise<Told | null> {
    for (;;) {
      const end = this.text.indexOf('\n\n')
      if (end >= 0) {
        const lines = this.text.slice(0, end).split('\n')
        this.text = this.text.slice(end + 2)
        const field = (name: string) => lines.find(line => line.startsWith(`${name}: `))?.slice(name.length + 2) ?? ''
        if (field('event') !== '') return { name: field('event'), id: field('id'), data: JSON.parse(field('data')) as Told['data'] }
        continue
      }
      const { value, done } = await this.bytes.read()
      if (done) return null
      this.text += new TextDecoder().decode(value)
    }
  }

  async close(): Promise<void> {
    await this.bytes.cancel()
  }
}

const ids = (told: Told | null) => told?.data.events?.map(event => event.id)

describe('a server that is told to stop while somebody follows a run', () => {
  it('ends the stream and its process, and is not held up for the hours a stream may last', async () => {
    const server = await testServer()
    const { ctx } = await testWorkshop()
    const { run } = await testRun(ctx)
    const reader = await Reader.open(server, ctx, run.id)
    await reader.next()
    const stopped = server.stop()
    // A stream that held it up would run into the end of this test.
    expect(await reader.next().catch(() => null)).toBeNull()
    await stopped
    await expect(server.ask('GET', '/api/session')).rejects.toThrow()
  }, 30_000)
})

describe('two painters on two processes', () => {
  it('see each other\'s acts as they are done, and nothing twice after a break', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    const { run, coatIds } = await testRun(ctx)
    const [here, there] = servers as [TestServer, TestServer]
    const post = (server: TestServer, as: Ctx, events: unknown[]) => server.ask('POST', `/api/runs/${run.id}/events`, { as, body: { events } })
    const reader = await Reader.open(here, ctx, run.id)
    expect([reader.status, reader.type]).toEqual([200, 'text/event-stream; charset=utf-8'])
    expect(ids(await reader.next())).toEqual([])

    const [first, second] = [pass(coatIds[0]!, [1]), pass(coatIds[0]!, [2])]
    expect((await post(there, bench, [first])).status).toBe(200)
    const told = await reader.next()
    expect(ids(told)).toEqual([first.id])
    await reader.close()

    await post(here, bench, [second])
    const again = await Reader.open(there, ctx, run.id, { 'last-event-id': told!.id })
    expect(ids(await again.next())).toEqual([second.id])
    const end = act({ v: 1, kind: 'run-finished' })
    await post(here, bench, [end])
    expect(ids(await again.next())).toEqual([end.id])
    expect(await again.next()).toMatchObject({ name: 'over', data: { because: 'finished' } })
    expect(await again.next()).toBeNull()
  })

  it('are told no more once they left, whichever process took their place away', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    const { run, coatIds } = await testRun(ctx)
    const reader = await Reader.open(servers[0]!, bench, run.id)
    await reader.next()
    await removePerson(ctx, bench.personId)
    await servers[1]!.ask('POST', `/api/runs/${run.id}/events`, { as: ctx, body: { events: [pass(coatIds[0]!, [1])] } })
    expect(await reader.next()).toMatchObject({ name: 'over', data: { because: 'no longer here' } })
    expect(await reader.next()).toBeNull()
  })
})
