import sharp from 'sharp'
import { describe, expect, it } from 'vitest'
import type { Ctx } from '#server/services/ctx'
import { objectStore } from '#server/photos/object-store'
import { photoKeys, photoOfKey } from '#server/photos/photo-keys'
import { takeInPhoto } from '#server/photos/photo-pool'
import { addCard } from '#server/services/cards/add-card'
import { changeCard } from '#server/services/cards/change-card'
import { getCard, listCards } from '#server/services/cards/list-cards'
import { publicCard, publicPhoto, publicPreview } from '#server/services/cards/public-card'
import { retellFinish } from '#server/services/cards/retell-finish'
import { revokeCard, shareCard } from '#server/services/cards/share-card'
import { addPhoto } from '#server/services/photos/add-photo'
import { listPhotos } from '#server/services/photos/list-photos'
import { orderPhotos } from '#server/services/photos/order-photos'
import { removePhoto } from '#server/services/photos/remove-photo'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { sweepPhotoFiles } from '#server/services/photos/sweep-photo-files'
import type { CardView } from '#shared/cards/card'
import { draftOf } from '#shared/cards/merge-drafts'
import { cameraPhoto, PLANTED } from '../../fixtures/camera-photo'
import { asOwner, testDatabase } from '../database'
import { testPerson, testWorkshop } from '../factories'
import { testScheme } from '../scheme/ground'

const tools = { store: objectStore(), process: takeInPhoto }
const tokenOf = (card: CardView) => card.link!.split('/c/')[1]!
/** A small photo without metadata, another for each width. */
const plainPhoto = (width: number) => sharp({ create: { width, height: 40, channels: 3, background: 'grey' } }).jpeg().toBuffer()

async function publishedScheme(ctx: Ctx, secret = 'base'): Promise<string> {
  const { scheme } = await testScheme(ctx, { secret })
  await publishScheme(ctx, scheme.id, scheme.version, { note: secret })
  return scheme.id
}

async function sharedCard(ctx: Ctx, secret = 'base', file?: Buffer) {
  const schemeId = await publishedScheme(ctx, secret)
  const photo = await addPhoto(ctx, schemeId, null, file ?? await plainPhoto(60), tools)
  const card = await addCard(ctx, schemeId)
  return { schemeId, photo, card: await shareCard(ctx, card.id) }
}

describe('photos of a scheme', () => {
  it('stand in the order they were given, and the same file again is the same photo', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const schemeId = await publishedScheme(ctx)
    const file = await plainPhoto(60)
    const one = await addPhoto(ctx, schemeId, null, file, tools)
    const two = await addPhoto(ctx, schemeId, null, await plainPhoto(64), tools)
    expect((await addPhoto(ctx, schemeId, null, file, tools)).id).toBe(one.id)
    await orderPhotos(ctx, schemeId, [two.id, one.id])
    expect((await listPhotos(ctx, schemeId)).map(photo => photo.id)).toEqual([two.id, one.id])
  })

  it('are one photo when the same file is sent twice at the same time, and leave no copies behind', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const schemeId = await publishedScheme(ctx)
    const file = await plainPhoto(60)
    const sent = await Promise.all([1, 2, 3].map(() => addPhoto(ctx, schemeId, null, file, tools)))
    expect(new Set(sent.map(photo => photo.id)).size).toBe(1)
    expect(await listPhotos(ctx, schemeId)).toHaveLength(1)
    const folders = new Set<string | undefined>()
    for await (const { key } of objectStore().list(`workshops/${ctx.workshopId}/photos/`)) folders.add(photoOfKey(key)?.photoId)
    expect([...folders]).toEqual([sent[0]!.id])
  })

  it('keep every photo in its place when one is added while others are put in order', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const schemeId = await publishedScheme(ctx)
    const [a, b] = [await addPhoto(ctx, schemeId, null, await plainPhoto(61), tools), await addPhoto(ctx, schemeId, null, await plainPhoto(62), tools)]
    const added = await Promise.all([
      addPhoto(ctx, schemeId, null, await plainPhoto(63), tools), orderPhotos(ctx, schemeId, [b.id, a.id]), addPhoto(ctx, schemeId, null, await plainPhoto(64), tools),
    ])
    const late = new Set([added[0].id, added[2].id])
    const standing = (await listPhotos(ctx, schemeId)).map(photo => photo.id)
    expect(standing.slice(0, 2)).toEqual([b.id, a.id])
    expect(new Set(standing.slice(2))).toEqual(late)
    const places = await asOwner<{ position: number }>('select position from photos where scheme_id = $1 order by position', [schemeId])
    expect(places.map(row => row.position)).toEqual([0, 1, 2, 3])
  })

  it('leave no file behind when they cannot be taken in, and what is left of them all the same is swept a day later', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const schemeId = await publishedScheme(ctx)
    const photo = await addPhoto(ctx, schemeId, null, await plainPhoto(61), tools)
    const orphan = photoKeys.original(ctx.workshopId, crypto.randomUUID())
    await objectStore().put(orphan, new Uint8Array([1]), 'application/octet-stream')
    const picture = `workshops/${ctx.workshopId}/pictures/kept.webp`
    await objectStore().put(picture, new Uint8Array([1]), 'image/webp')
    const db = await testDatabase()
    await sweepPhotoFiles(db, objectStore(), new Date())
    expect(await objectStore().has(orphan)).toBe(true)
    await sweepPhotoFiles(db, objectStore(), new Date(Date.now() + 25 * 3600 * 1000))
    expect(await objectStore().has(orphan)).toBe(false)
    expect(await objectStore().has(picture)).toBe(true)
    expect(await objectStore().has(photoKeys.original(ctx.workshopId, photo.id))).toBe(true)
  })

  it('take all their files with them when they go, the original too', async () => {
    const { ctx } = await testWorkshop({ role: 'desk' })
    const owner = (await testPerson({ workshopId: ctx.workshopId, role: 'owner' })).ctx
    const { photo } = await sharedCard(owner)
    const original = photoKeys.original(ctx.workshopId, photo.id)
    expect(await objectStore().has(original)).toBe(true)
    await removePhoto(ctx, photo.id, objectStore())
    expect(await objectStore().has(original)).toBe(false)
    expect(await objectStore().has(photoKeys.rendition(ctx.workshopId, photo.id, '640.webp'))).toBe(false)
  })

  it('are not found by another workshop', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { ctx: stranger } = await testWorkshop({ role: 'owner' })
    const { schemeId, photo } = await sharedCard(ctx)
    await expect(listPhotos(stranger, schemeId)).rejects.toMatchObject({ data: { code: 'scheme/not-found' } })
    await expect(removePhoto(stranger, photo.id, objectStore())).rejects.toMatchObject({ data: { code: 'photo/not-found' } })
    await expect(addPhoto(stranger, schemeId, null, await plainPhoto(60), tools)).rejects.toMatchObject({ data: { code: 'scheme/not-found' } })
  })
})

describe('a card', () => {
  it('starts with what a customer may know, and shows it by its link', async () => {
    const { ctx } = await testWorkshop({ role: 'owner', name: 'Reed bench' })
    const { card, photo } = await sharedCard(ctx)
    const seen = await publicCard(await testDatabase(), tokenOf(card))
    expect(seen).toMatchObject({ workshop: 'Reed bench', title: 'Perch in bars', fish: 'Perch', sizes: '90 mm', photos: [{ id: photo.id }] })
    expect(seen.chips.map(chip => chip.where)).toContain('back')
    expect((await publicPhoto(await testDatabase(), tokenOf(card), photo.id, '320.webp', objectStore())).contentType).toBe('image/webp')
    expect((await publicPreview(await testDatabase(), tokenOf(card), objectStore())).contentType).toBe('image/jpeg')
  })

  it('gives nothing of the recipe away, whatever the recipe says', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { card, photo, schemeId } = await sharedCard(ctx, 'planted secret', await cameraPhoto({ width: 400, height: 300 }))
    const db = await testDatabase()
    const said = JSON.stringify(await publicCard(db, tokenOf(card)))
    const recipe = ['planted secret', 'net planted', 'scales', 'Opaque white', schemeId, ctx.workshopId, ctx.personId, card.id]
    expect(recipe.filter(word => said.includes(word))).toEqual([])
    for (const file of ['320.webp', '1600.jpg', 'preview.jpg']) {
      const { bytes } = await publicPhoto(db, tokenOf(card), photo.id, file, objectStore())
      const text = Buffer.from(bytes).toString('latin1')
      expect(PLANTED.filter(word => text.includes(word))).toEqual([])
    }
  })

  it('ends at once when it is revoked, and a new link does not open the old one', async () => {
    const { ctx } = await testWorkshop({ role: 'desk' })
    const owner = (await testPerson({ workshopId: ctx.workshopId, role: 'owner' })).ctx
    const { card, photo } = await sharedCard(owner)
    const db = await testDatabase()
    const gone = { data: { code: 'card/not-found' } }
    expect(await revokeCard(ctx, card.id)).toMatchObject({ state: 'revoked', link: null })
    await expect(publicCard(db, tokenOf(card))).rejects.toMatchObject(gone)
    await expect(publicPhoto(db, tokenOf(card), photo.id, '320.webp', objectStore())).rejects.toMatchObject(gone)
    const again = await shareCard(ctx, card.id)
    expect(tokenOf(again)).not.toBe(tokenOf(card))
    await expect(publicCard(db, tokenOf(card))).rejects.toMatchObject(gone)
    expect((await publicCard(db, tokenOf(again))).title).toBe('Perch in bars')
  })

  it('has a link that nobody can guess, of which the database holds a hash only', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { card } = await sharedCard(ctx)
    const token = tokenOf(card)
    expect(Buffer.from(token, 'base64url').byteLength * 8).toBeGreaterThanOrEqual(128)
    const rows = await asOwner('select to_jsonb(c)::text as whole from cards c where id = $1', [card.id])
    expect(JSON.stringify(rows)).not.toContain(token)
    expect((await getCard(ctx, card.id)).link).toBe(card.link)
  })

  it('shows no photo that is not on it, though the scheme has more', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { card, schemeId } = await sharedCard(ctx)
    const other = await addPhoto(ctx, schemeId, null, await plainPhoto(65), tools)
    await expect(publicPhoto(await testDatabase(), tokenOf(card), other.id, '320.webp', objectStore())).rejects.toMatchObject({ data: { code: 'photo/not-found' } })
  })

  it('says what the workshop is called today, and nobody reads its old name', async () => {
    const { ctx } = await testWorkshop({ role: 'owner', name: 'Old name' })
    const { card } = await sharedCard(ctx)
    await asOwner('update workshops set name = $2 where id = $1', [ctx.workshopId, 'New name'])
    expect((await publicCard(await testDatabase(), tokenOf(card))).workshop).toBe('New name')
    expect((await getCard(ctx, card.id)).workshop).toBe('New name')
  })

  it('has one link that works however many people share it at once', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { card } = await sharedCard(ctx)
    const shared = await Promise.all([1, 2, 3].map(() => shareCard(ctx, card.id)))
    const db = await testDatabase()
    const opened = await Promise.allSettled(shared.map(one => publicCard(db, tokenOf(one))))
    expect(opened.filter(one => one.status === 'fulfilled')).toHaveLength(1)
    expect(new Set(shared.map(one => one.version)).size).toBe(3)
    expect((await publicCard(db, tokenOf(await getCard(ctx, card.id)))).title).toBe('Perch in bars')
  })

  it('keeps a photo while it is shared, and shows each only once', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { card, photo } = await sharedCard(ctx)
    await expect(changeCard(ctx, card.id, card.version, { ...draftOf(card), photoIds: [] })).rejects.toMatchObject({ data: { code: 'card/no-photo' } })
    expect((await changeCard(ctx, card.id, card.version, { ...draftOf(card), photoIds: [photo.id, photo.id] })).photoIds).toEqual([photo.id])
  })

  it('tells the blank and colours of what was published, takes them anew when asked, and keeps what was written', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { card } = await sharedCard(ctx)
    const written = await changeCard(ctx, card.id, card.version, { ...draftOf(card), words: 'mine' })
    await asOwner('update cards set content = content || $2 where id = $1', [card.id, JSON.stringify({ blank: 'Old', chips: [] })])
    const told = await retellFinish(ctx, card.id)
    expect(told).toMatchObject({ words: 'mine', blank: card.blank, chips: card.chips, link: card.link, version: written.version + 1 })
    expect(told.chips.length).toBeGreaterThan(2)
  })

  it('is not revoked before it was shared', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const card = await addCard(ctx, await publishedScheme(ctx))
    expect(await revokeCard(ctx, card.id)).toMatchObject({ state: 'not shared', version: card.version })
  })

  it('is not overwritten by somebody who saw an older version', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const card = await addCard(ctx, await publishedScheme(ctx))
    await changeCard(ctx, card.id, card.version, { ...draftOf(card), words: 'mine' })
    await expect(changeCard(ctx, card.id, card.version, { ...draftOf(card), words: 'theirs' })).rejects.toMatchObject({ data: { code: 'card/changed-meanwhile' } })
    expect((await getCard(ctx, card.id)).words).toBe('mine')
  })

  it('is not shared without a photo, nor started before there is a revision', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const card = await addCard(ctx, await publishedScheme(ctx))
    await expect(shareCard(ctx, card.id)).rejects.toMatchObject({ data: { code: 'card/no-photo' } })
    const { scheme } = await testScheme(ctx)
    await expect(addCard(ctx, scheme.id)).rejects.toMatchObject({ data: { code: 'scheme/never-published' } })
  })

  it('takes no photo of another scheme or workshop', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { ctx: stranger } = await testWorkshop({ role: 'owner' })
    const { photo } = await sharedCard(stranger)
    const card = await addCard(ctx, await publishedScheme(ctx))
    expect((await changeCard(ctx, card.id, card.version, { ...draftOf(card), photoIds: [photo.id] })).photoIds).toEqual([])
    expect(await listCards(stranger)).toHaveLength(1)
  })
})
