import { describe, expect, it } from 'vitest'
import type { Ctx } from '#server/services/ctx'
import { objectStore } from '#server/photos/object-store'
import { photoKeys } from '#server/photos/photo-keys'
import { takeInPhoto } from '#server/photos/photo-pool'
import { addCard } from '#server/services/cards/add-card'
import { changeCard, revokeCard, shareCard } from '#server/services/cards/change-card'
import { getCard, listCards } from '#server/services/cards/list-cards'
import { publicCard, publicPhoto, publicPreview } from '#server/services/cards/public-card'
import { addPhoto } from '#server/services/photos/add-photo'
import { orderPhotos, removePhoto } from '#server/services/photos/change-photo'
import { listPhotos } from '#server/services/photos/list-photos'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import type { CardView } from '#shared/cards/card'
import { cameraPhoto, PLANTED } from '../../fixtures/camera-photo'
import { asOwner, testDatabase } from '../database'
import { testPerson, testWorkshop } from '../factories'
import { testScheme } from '../scheme/ground'

const tools = { store: objectStore(), process: takeInPhoto }
const tokenOf = (card: CardView) => card.link!.split('/c/')[1]!
const draftOf = ({ title, words, fish, sizes, price, leadTime, photoIds, showsChips }: CardView) =>
  ({ title, words, fish, sizes, price, leadTime, photoIds, showsChips })

async function publishedScheme(ctx: Ctx, secret = 'base'): Promise<string> {
  const { scheme } = await testScheme(ctx, { secret })
  await publishScheme(ctx, scheme.id, scheme.version, { note: secret })
  return scheme.id
}

async function sharedCard(ctx: Ctx, secret = 'base') {
  const schemeId = await publishedScheme(ctx, secret)
  const photo = await addPhoto(ctx, schemeId, null, await cameraPhoto({ width: 400, height: 300 }), tools)
  const card = await addCard(ctx, schemeId)
  return { schemeId, photo, card: await shareCard(ctx, card.id) }
}

describe('photos of a scheme', () => {
  it('stand in the order they were given, and the same file again is the same photo', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const schemeId = await publishedScheme(ctx)
    const file = await cameraPhoto({ width: 300, height: 200 })
    const one = await addPhoto(ctx, schemeId, null, file, tools)
    const two = await addPhoto(ctx, schemeId, null, await cameraPhoto({ width: 320, height: 200 }), tools)
    expect((await addPhoto(ctx, schemeId, null, file, tools)).id).toBe(one.id)
    await orderPhotos(ctx, schemeId, [two.id, one.id])
    expect((await listPhotos(ctx, schemeId)).map(photo => photo.id)).toEqual([two.id, one.id])
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
    await expect(addPhoto(stranger, schemeId, null, await cameraPhoto(), tools)).rejects.toMatchObject({ data: { code: 'scheme/not-found' } })
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
    const { card, photo, schemeId } = await sharedCard(ctx, 'planted secret')
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
    const other = await addPhoto(ctx, schemeId, null, await cameraPhoto({ width: 310, height: 210 }), tools)
    await expect(publicPhoto(await testDatabase(), tokenOf(card), other.id, '320.webp', objectStore())).rejects.toMatchObject({ data: { code: 'photo/not-found' } })
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
