import sharp from 'sharp'
import { expect, it } from 'vitest'
import { objectStore } from '#server/photos/object-store'
import { drawLook } from '#server/services/picture/draw-look'
import { sweepPictures } from '#server/services/picture/sweep-pictures'
import { ember } from '../../fixtures/demo-looks'
import { asOwner } from '../database'
import { testWorkshop } from '../factories'

const SIZE = { width: 160, height: 80 }
const rowsOf = (workshopId: string) => asOwner<{ hash: string, object_key: string }>('select hash, object_key from pictures where workshop_id = $1', [workshopId])

it('paints a look once and then takes it from the store', async () => {
  const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
  const first = await drawLook(ctx, ember, SIZE)
  const again = await drawLook(ctx, ember, SIZE)

  expect(first.contentType).toBe('image/webp')
  expect(await sharp(first.bytes).metadata()).toMatchObject({ format: 'webp', ...SIZE })
  expect(Buffer.from(again.bytes).equals(Buffer.from(first.bytes))).toBe(true)
  expect((await rowsOf(workshopId)).map(row => row.hash)).toEqual([first.hash])
})

it('paints once for all who ask at the same moment', async () => {
  const { ctx, workshopId } = await testWorkshop({ role: 'bench' })
  const all = await Promise.all([1, 2, 3].map(() => drawLook(ctx, ember, SIZE)))
  expect(new Set(all.map(({ hash }) => hash)).size).toBe(1)
  expect(await rowsOf(workshopId)).toHaveLength(1)
})

it('paints again what the store has lost', async () => {
  const { ctx, workshopId } = await testWorkshop({ role: 'owner' })
  const first = await drawLook(ctx, ember, SIZE)
  const [row] = await rowsOf(workshopId)
  await objectStore().remove([row!.object_key])
  const again = await drawLook(ctx, ember, SIZE)
  expect(again.hash).toBe(first.hash)
  expect(again.bytes.byteLength).toBeGreaterThan(500)
  expect(await rowsOf(workshopId)).toHaveLength(1)
})

it('forgets what another version has drawn, file and row, and keeps its own', async () => {
  const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
  const own = await drawLook(ctx, ember, SIZE)
  const olderKey = (hash: string, folder: string) => `workshops/${workshopId}/pictures/${folder}${hash}.webp`
  const older = [olderKey('a'.repeat(64), '0-1/'), olderKey('b'.repeat(64), '')]
  for (const key of older) await objectStore().put(key, own.bytes, 'image/webp')
  await asOwner('insert into pictures (hash, workshop_id, engine_version, object_key) values ($1, $2, $3, $4)', ['a'.repeat(64), workshopId, '0-1', older[0]])

  await sweepPictures(ctx.db, objectStore(), new Date())
  expect(await rowsOf(workshopId), 'a server that is being taken over from still shows them').toHaveLength(2)

  const later = new Date(Date.now() + 2 * 3600 * 1000)
  expect(await sweepPictures(ctx.db, objectStore(), later, 1), 'no more than asked for in one go').toBe(1)
  await sweepPictures(ctx.db, objectStore(), later)
  expect((await rowsOf(workshopId)).map(({ hash }) => hash)).toEqual([own.hash])
  for (const key of older) expect(await objectStore().get(key)).toBeUndefined()
  expect(Buffer.from((await drawLook(ctx, ember, SIZE)).bytes).equals(Buffer.from(own.bytes))).toBe(true)

  await sweepPictures(ctx.db, objectStore(), new Date(Date.now() + 91 * 24 * 3600 * 1000))
  expect(await rowsOf(workshopId), 'what has hung for a season is painted again should somebody ask').toHaveLength(0)
})

it('keeps the pictures of each workshop apart', async () => {
  const [one, other] = [await testWorkshop({ role: 'desk' }), await testWorkshop({ role: 'desk' })]
  await drawLook(one.ctx, ember, SIZE)
  await drawLook(other.ctx, ember, SIZE)
  const [[mine], [theirs]] = [await rowsOf(one.workshopId), await rowsOf(other.workshopId)]
  expect(mine!.hash).toBe(theirs!.hash)
  expect(mine!.object_key).not.toBe(theirs!.object_key)
})

it('makes a JPEG on the surround for link previews', async () => {
  const { ctx } = await testWorkshop({ role: 'desk' })
  const { bytes, contentType } = await drawLook(ctx, ember, { ...SIZE, surround: 146 }, 'jpeg')
  expect(contentType).toBe('image/jpeg')
  const { data } = await sharp(bytes).raw().toBuffer({ resolveWithObject: true })
  for (const channel of data.subarray(0, 3)) expect(Math.abs(channel - 146)).toBeLessThanOrEqual(1)
})
