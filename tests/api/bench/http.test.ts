import { beforeAll, describe, expect, it } from 'vitest'
import { testWorkshop } from '../factories'
import { type TestServer, testServer } from '../server'
import { act, publishedScheme } from './ground'

let server: TestServer
beforeAll(async () => {
  server = await testServer()
}, 300_000)

describe('a run over HTTP', () => {
  it('is started once by a request that is sent again with its key', async () => {
    const { ctx } = await testWorkshop()
    const { schemeId } = await publishedScheme(ctx)
    const headers = { 'idempotency-key': crypto.randomUUID() }
    const start = (pieces: number) => server.ask('POST', '/api/runs', { as: ctx, body: { schemeId, revision: 1, pieces }, headers })
    const [first, again] = [await start(6), await start(6)]
    expect([first.status, again.status]).toEqual([201, 201])
    expect(await again.json()).toEqual(await first.json())
    expect(await (await server.ask('GET', '/api/runs', { as: ctx })).json()).toMatchObject({ items: [{ number: 1 }], next: null })
    expect((await start(7)).status).toBe(422)
  })

  it('takes 1 to 200 pieces, and batches of no more than 200 acts', async () => {
    const { ctx } = await testWorkshop()
    const { schemeId } = await publishedScheme(ctx)
    const start = (pieces: number) => server.ask('POST', '/api/runs', { as: ctx, body: { schemeId, revision: 1, pieces } })
    expect(await Promise.all([0, 1, 200, 201, 1.5].map(async pieces => (await start(pieces)).status))).toEqual([422, 201, 201, 422, 422])
    const { id } = await (await start(6)).json() as { id: string }
    const hand = (count: number) => server.ask('POST', `/api/runs/${id}/events`, { as: ctx, body: { events: Array.from({ length: count }, () => act({ v: 1, kind: 'step-done', stepId: 'prepare' })) } })
    expect(await Promise.all([1, 200, 201].map(async count => (await hand(count)).status))).toEqual([200, 200, 422])
  })

  it('is listed page by page', async () => {
    const { ctx } = await testWorkshop()
    const { schemeId } = await publishedScheme(ctx)
    for (let n = 0; n < 3; n++) await server.ask('POST', '/api/runs', { as: ctx, body: { schemeId, revision: 1, pieces: 2 } })
    const page = async (query: string) => await (await server.ask('GET', `/api/runs?limit=2${query}`, { as: ctx })).json() as { items: { number: number }[], next: string | null }
    const first = await page('')
    const second = await page(`&after=${first.next}`)
    expect([first, second].map(({ items }) => items.map(run => run.number))).toEqual([[3, 2], [1]])
    expect(second.next).toBeNull()
  })
})
