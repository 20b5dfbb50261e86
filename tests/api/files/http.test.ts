import { beforeAll, describe, expect, it } from 'vitest'
import { SCHEME_FILE_MAX, SchemeFile } from '#shared/files/scheme-file'
import { TakenIn } from '#shared/files/take-in-plan'
import { PaintsPlan } from '#shared/files/paints-plan'
import { addPaint } from '#server/services/shelf/add-paint'
import { asOwner } from '../database'
import { testWorkshop } from '../factories'
import { type TestServer, testServer } from '../server'
import { paintDraft } from '../shelf/ground'
import { type Carried, carriedScheme } from './ground'

let server: TestServer
beforeAll(async () => {
  server = await testServer()
}, 300_000)

const PLAIN: Carried = { name: 'Perch in bars', coats: [{ paint: 0, passes: 3, reducer: 5, byHand: false, note: '' }], masked: true, ownMask: true, eyes: true, revisions: 1, ahead: false }
const schemesOf = (workshopId: string) => asOwner<{ id: string }>('select id from schemes where workshop_id = $1', [workshopId])

describe('a scheme file over the network', () => {
  it('is a download by the scheme\'s name, is looked at without being taken in, and is taken in once by one key', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { ctx: there, workshopId } = await testWorkshop({ role: 'painter' })
    const answer = await server.ask('GET', `/api/schemes/${await carriedScheme(ctx, PLAIN)}/file`, { as: ctx })
    expect([answer.status, answer.headers.get('content-disposition'), answer.headers.get('cache-control')]).toEqual([200, 'attachment; filename="perch-in-bars.scheme.json"', 'private, no-store'])
    const file = SchemeFile.parse(await answer.json())

    const looked = await server.ask('POST', '/api/schemes/file?dryRun=true', { as: there, body: file })
    expect([looked.status, TakenIn.parse(await looked.json()).schemeId]).toEqual([200, null])
    expect(await schemesOf(workshopId)).toEqual([])

    const bring = async () => server.ask('POST', '/api/schemes/file', { as: there, body: file, headers: { 'idempotency-key': 'bring-in-once' } })
    const first = await bring()
    expect(first.status).toBe(201)
    const { schemeId } = TakenIn.parse(await first.json())
    expect(TakenIn.parse(await (await bring()).json()).schemeId).toBe(schemeId)
    expect(await schemesOf(workshopId)).toEqual([{ id: schemeId }])
  })

  it('of two or three megabytes is read, of more than twelve refused', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const file = SchemeFile.parse(await (await server.ask('GET', `/api/schemes/${await carriedScheme(ctx, PLAIN)}/file`, { as: ctx })).json())
    const heavy = { ...file, pictures: [{ ...file.pictures[0], base64: 'A'.repeat(2_400_000) }] }
    expect((await server.ask('POST', '/api/schemes/file?dryRun=true', { as: ctx, body: heavy })).status).toBe(200)
    const tooHeavy = await server.ask('POST', '/api/schemes/file?dryRun=true', { as: ctx, body: { pad: 'A'.repeat(SCHEME_FILE_MAX) } })
    expect([tooHeavy.status, await tooHeavy.json()]).toMatchObject([413, { code: 'request/too-large' }])
  })

  it('that is none is refused with each place', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    for (const [body, path] of [[{ format: 'other' }, 'format'], [{ format: 'countershade-scheme', version: 7 }, 'version'], ['{"format": ', '']] as const) {
      const answer = await server.ask('POST', '/api/schemes/file', { as: ctx, body, headers: { 'content-type': 'application/json' } })
      expect([answer.status, await answer.json()]).toMatchObject([422, { code: 'input/invalid', fields: [{ path }] }])
    }
  })

  it('nested a hundred thousand deep harms nobody', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const deep = `{"format":"countershade-scheme","version":1,"draft":${'['.repeat(100_000)}${']'.repeat(100_000)}}`
    expect((await server.ask('POST', '/api/schemes/file', { as: ctx, body: deep, headers: { 'content-type': 'application/json' } })).status).toBe(422)
  })
})

it('a shelf over the network is a table that a spreadsheet opens, and comes back as one', async () => {
  const { ctx } = await testWorkshop({ role: 'painter' })
  await addPaint(ctx, paintDraft({ name: 'Grün, "matt"' }))
  const answer = await server.ask('GET', '/api/paints/file?form=semicolon', { as: ctx })
  expect([answer.headers.get('content-type'), answer.headers.get('content-disposition')]).toEqual(['text/csv; charset=utf-8', 'attachment; filename="shelf.csv"'])
  const bytes = await answer.bytes()
  expect([...bytes.slice(0, 3)]).toEqual([0xEF, 0xBB, 0xBF])
  const csv = new TextDecoder('utf-8', { ignoreBOM: true }).decode(bytes)
  expect(csv).toContain('"Grün, ""matt"""')
  const plan = PaintsPlan.parse(await (await server.ask('POST', '/api/paints/file?dryRun=true', { as: ctx, body: { csv } })).json())
  expect(plan.rows.map(row => row.does)).toEqual(['stays'])
})
