import sharp from 'sharp'
import { beforeAll, describe, expect, it } from 'vitest'
import { recordActs } from '#server/services/bench/record-acts'
import { getRun } from '#server/services/bench/get-run'
import { runState } from '#shared/bench/run-state'
import { testPerson, testWorkshop } from '../factories'
import { type TestServer, testServer } from '../server'
import { act, testRun } from './ground'

let server: TestServer
beforeAll(async () => {
  server = await testServer()
}, 600_000)

const file = (background: string) => sharp({ create: { width: 60, height: 40, channels: 3, background } }).jpeg().toBuffer()
const code = async (answer: Response) => [answer.status, (await answer.json() as { code?: string }).code]

describe('a photo taken at the bench', () => {
  it('lies under the id its tablet gave it, however often it is sent, and belongs to its act', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    const { run, schemeId } = await testRun(ctx)
    const photoId = crypto.randomUUID()
    const send = async (background: string) => server.ask('POST', `/api/schemes/${schemeId}/photos?runId=${run.id}&photoId=${photoId}`, { as: bench, body: await file(background), headers: { 'content-type': 'application/octet-stream' } })

    // The act goes ahead of its photo.
    await recordActs(bench, run.id, [act({ v: 1, kind: 'photo-taken', photoId, stepId: 'prepare', pieces: [2] })])
    const first = await send('grey')
    expect([first.status, await first.json()]).toMatchObject([201, { id: photoId, schemeId, run: { id: run.id, number: run.number } }])
    // Sent again, even from a camera that wrote other bytes: one photo.
    for (const background of ['grey', 'black']) expect(await (await send(background)).json()).toMatchObject({ id: photoId })
    const listed = await server.ask('GET', `/api/schemes/${schemeId}/photos`, { as: ctx })
    expect(await listed.json()).toHaveLength(1)
    expect((await server.ask('GET', `/api/photos/${photoId}/320.webp`, { as: bench })).status).toBe(200)
    expect(runState((await getRun(ctx, run.id)).events).photos).toMatchObject([{ photoId, pieces: [2] }])
  })

  it('is refused under an id that is none, of a run of another scheme, and for another workshop', async () => {
    const { ctx } = await testWorkshop()
    const [{ run, schemeId }, other] = [await testRun(ctx), await testRun(ctx)]
    const { ctx: stranger } = await testWorkshop()
    const send = async (as: typeof ctx, query: string) => code(await server.ask('POST', `/api/schemes/${schemeId}/photos?${query}`, { as, body: await file('white'), headers: { 'content-type': 'application/octet-stream' } }))
    expect(await send(ctx, `runId=${run.id}&photoId=17`)).toEqual([422, 'input/invalid'])
    expect(await send(ctx, `runId=${other.run.id}&photoId=${crypto.randomUUID()}`)).toEqual([404, 'run/not-found'])
    expect(await send(stranger, `photoId=${crypto.randomUUID()}`)).toEqual([404, 'scheme/not-found'])
  })
})
