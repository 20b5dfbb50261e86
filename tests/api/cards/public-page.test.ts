import sharp from 'sharp'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Ctx } from '#server/services/ctx'
import { objectStore } from '#server/photos/object-store'
import { takeInPhoto } from '#server/photos/photo-pool'
import { addCard } from '#server/services/cards/add-card'
import { changeCard } from '#server/services/cards/change-card'
import { revokeCard, shareCard } from '#server/services/cards/share-card'
import { addPhoto } from '#server/services/photos/add-photo'
import { changePhoto } from '#server/services/photos/change-photo'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { draftOf } from '#shared/cards/merge-drafts'
import { testWorkshop } from '../factories'
import { testScheme } from '../scheme/ground'
import { type TestServer, testServer } from '../server'

let server: TestServer
beforeAll(async () => {
  server = await testServer()
}, 600_000)

const UUID = /[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}/g
/** What differs from answer to answer by design: the nonce of the page's styles. */
const settled = (html: string) => html.replaceAll(/nonce="[^"]*"/g, '')

async function sharedCard(ctx: Ctx) {
  const { scheme } = await testScheme(ctx, { secret: 'planted secret' })
  await publishScheme(ctx, scheme.id, scheme.version, { note: 'planted note' })
  const file = await sharp({ create: { width: 90, height: 60, channels: 3, background: 'olive' } }).jpeg().toBuffer()
  const photo = await addPhoto(ctx, scheme.id, null, file, { store: objectStore(), process: takeInPhoto })
  await changePhoto(ctx, photo.id, { alt: 'left side' })
  const card = await addCard(ctx, scheme.id)
  const written = await changeCard(ctx, card.id, card.version, { ...draftOf(card), words: 'Bars <b>& scales</b>', price: '38' })
  const shared = await shareCard(ctx, written.id)
  return { card: shared, photo, schemeId: scheme.id, path: new URL(shared.link!).pathname }
}

describe('the page behind a card\'s link', () => {
  it('shows the card to somebody without an account, and ships no script', async () => {
    const { ctx } = await testWorkshop({ role: 'owner', name: 'Reed bench' })
    const { path, photo } = await sharedCard(ctx)
    const answer = await server.ask('GET', path)
    const html = await answer.text()
    expect(answer.status).toBe(200)
    expect(answer.headers.get('set-cookie')).toBeNull()
    for (const said of ['<h1', 'Perch in bars', 'Reed bench', 'Bars &lt;b&gt;&amp; scales&lt;/b&gt;', '38', '90', 'alt="left side"', `${path}/photo/${photo.id}/640.jpg`]) expect(html).toContain(said)
    expect(html).not.toMatch(/<script|modulepreload|javascript:|\son\w+=/)
    expect(html).not.toMatch(/\sstyle="/)
  })

  it('says nothing of the recipe, of who works there, nor any id but its photo\'s', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { path, photo, schemeId, card } = await sharedCard(ctx)
    const html = await (await server.ask('GET', path)).text()
    const secrets = ['planted', 'net planted', 'Opaque white', 'Test owner', 'bench.example', schemeId, card.id, ctx.workshopId, ctx.personId]
    expect(secrets.filter(word => html.includes(word))).toEqual([])
    expect(new Set(html.match(UUID))).toEqual(new Set([photo.id]))
  })

  it('is kept by nobody, found by no search engine, and tells no other site where it stands', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { path } = await sharedCard(ctx)
    const answer = await server.ask('GET', path)
    expect(answer.headers.get('cache-control')).toBe('private, no-store')
    expect(answer.headers.get('referrer-policy')).toBe('no-referrer')
    expect(answer.headers.get('content-security-policy')).toMatch(/script-src 'none'/)
    expect(await answer.text()).toMatch(/<meta name="robots" content="noindex/)
  })

  it('gives a link preview its words and a picture of the right size at a whole address', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { path } = await sharedCard(ctx)
    const html = await (await server.ask('GET', path)).text()
    const image = /<meta property="og:image" content="([^"]+)"/.exec(html)?.[1]
    expect(image).toBe(`${server.url}${path}/preview.jpg`)
    expect(html).toMatch(/<meta property="og:title" content="Perch in bars"/)
    const picture = await (await server.ask('GET', new URL(image!).pathname)).arrayBuffer()
    expect(await sharp(picture).metadata()).toMatchObject({ width: 1200, height: 630, format: 'jpeg' })
  })

  it('looks the same whether the link was revoked or never was, and ends within the second', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { path, card, photo } = await sharedCard(ctx)
    expect((await server.ask('GET', path)).status).toBe(200)
    await revokeCard(ctx, card.id)
    const [revoked, unknown] = await Promise.all([path, `/c/${'x'.repeat(32)}`].map(async (address) => {
      const answer = await server.ask('GET', address)
      return { status: answer.status, cache: answer.headers.get('cache-control'), html: settled(await answer.text()) }
    }))
    expect(revoked).toEqual(unknown)
    expect(revoked).toMatchObject({ status: 404, cache: 'private, no-store' })
    expect(revoked!.html).toContain('No card is shown at this address')
    for (const file of ['preview.jpg', `photo/${photo.id}/320.webp`]) expect((await server.ask('GET', `${path}/${file}`)).status).toBe(404)
  })
})
