import { beforeAll, describe, expect, it } from 'vitest'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { SchemeListPage, SchemeView } from '#shared/scheme/scheme-view'
import { testPerson, testWorkshop } from '../factories'
import { type TestServer, testServer } from '../server'
import { addTestBlank, testScheme, withPasses } from './ground'

let server: TestServer
beforeAll(async () => {
  server = await testServer()
}, 300_000)

describe('a draft over the network', () => {
  it('is read with its version and saved against it', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    const read = await server.ask('GET', `/api/schemes/${scheme.id}`, { as: ctx })
    expect(read.headers.get('etag')).toBe('"v1"')
    expect(SchemeView.parse(await read.json())).toEqual(scheme)

    const save = (ifMatch: Record<string, string>) => server.ask('PUT', `/api/schemes/${scheme.id}/draft`, { as: ctx, body: { body: withPasses(body, 9) }, headers: ifMatch })
    expect((await save({})).status).toBe(428)
    const saved = await save({ 'if-match': '"v1"' })
    expect([saved.status, saved.headers.get('etag'), await saved.json()]).toMatchObject([200, '"v2"', { version: 2 }])
    const late = await save({ 'if-match': '"v1"' })
    expect([late.status, await late.json()]).toMatchObject([412, { code: 'scheme/changed-meanwhile', version: 2 }])
  })

  it('that does not fit its form is refused with the fields that do not', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    const answer = await server.ask('PUT', `/api/schemes/${scheme.id}/draft`, { as: ctx, body: { body: withPasses(body, 99) }, headers: { 'if-match': '"v1"' } })
    expect([answer.status, await answer.json()]).toMatchObject([422, { code: 'input/invalid', fields: [{ path: 'body.stack.0.coat.passes' }] }])
  })
})

it('a scheme asked for twice with one key is started once', async () => {
  const { ctx } = await testWorkshop({ role: 'painter' })
  const body = { name: 'Once', blankId: await addTestBlank(ctx) }
  const start = async () => (await server.ask('POST', '/api/schemes', { as: ctx, body, headers: { 'idempotency-key': 'start-once-please' } })).json() as Promise<SchemeView>
  expect((await start()).id).toBe((await start()).id)
})

it('the list comes in pages that meet', async () => {
  const { ctx } = await testWorkshop({ role: 'painter' })
  for (const name of ['one', 'two', 'three']) await testScheme(ctx, { name })
  const page = async (query: string) => SchemeListPage.parse(await (await server.ask('GET', `/api/schemes?limit=2${query}`, { as: ctx })).json())
  const first = await page('')
  const second = await page(`&after=${first.next}`)
  expect([...first.items, ...second.items].map(item => item.name)).toEqual(['three', 'two', 'one'])
  expect(second.next).toBeNull()
})

describe('a picture', () => {
  it('of a revision is kept for good under its own address, and asked about again costs nothing', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme } = await testScheme(ctx)
    await publishScheme(ctx, scheme.id, 1, { note: '' })
    const address = `/api/schemes/${scheme.id}/picture?width=64&revision=1`
    const picture = await server.ask('GET', address, { as: ctx })
    expect([picture.status, picture.headers.get('content-type'), picture.headers.get('cache-control')]).toEqual([200, 'image/webp', 'private, max-age=31536000, immutable'])
    expect(new TextDecoder().decode((await picture.bytes()).slice(8, 12))).toBe('WEBP')
    const again = await server.ask('GET', address, { as: ctx, headers: { 'if-none-match': picture.headers.get('etag')! } })
    expect([again.status, (await again.bytes()).length]).toEqual([304, 0])
  })

  it('for the front desk is the finished look only, under a tag that is not the recipe\'s hash', async () => {
    const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
    const { ctx: desk } = await testPerson({ workshopId, role: 'desk' })
    const { scheme, body } = await testScheme(ctx)
    const first = body.stack[0]!
    const ask = (query: string) => server.ask('GET', `/api/schemes/${scheme.id}/picture?width=64${query}`, { as: desk })
    expect((await ask('')).status).toBe(404)
    await publishScheme(ctx, scheme.id, 1, { note: '' })
    expect((await ask('')).status).toBe(200)
    for (const query of ['&upTo=ground', `&upTo=${first.act === 'coat' ? first.coat.id : ''}`, '&clear=false', '&revision=1']) expect((await ask(query)).status).toBe(403)
  })
})
