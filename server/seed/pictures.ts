import type { PublishedDemo } from './finishes'
import { objectStore } from '#server/photos/object-store'
import { takeInPhoto } from '#server/photos/photo-pool'
import type { Ctx } from '#server/services/ctx'
import { addPhoto } from '#server/services/photos/add-photo'
import { changePhoto } from '#server/services/photos/change-photo'
import { drawLook } from '#server/services/picture/draw-look'
import { wishOf } from '#server/services/picture/wish-of'
import { lookOfScheme } from '#server/services/scheme/look-of-scheme'
import { wallPictureSize } from '#shared/picture/picture-size'
import type { PictureWish } from '#shared/picture/picture-options'
import { PictureQuery } from '#shared/scheme/scheme-input'

const SIZE = { width: 1280, height: 800, shadow: true, surround: 146 }

/** The sides a demo finish is shown from. */
const VIEWS: readonly { wish: PictureWish, side: string }[] = [
  { wish: { ...SIZE, light: 'bench' }, side: 'Left side' },
  { wish: { ...SIZE, light: 'face', roll: 35 }, side: 'From above the shoulder, into the light' },
]

/** Photos of the demo finishes, painted by our own renderer; `views` of each. */
export async function photographDemo(desk: Ctx, { schemeId, revision }: PublishedDemo, views: number): Promise<void> {
  for (const { wish, side } of VIEWS.slice(0, views)) {
    const { bytes } = await drawLook(desk, { body: revision.body, materials: revision.materials }, wish, 'jpeg')
    const photo = await addPhoto(desk, schemeId, null, bytes, { store: objectStore(), process: takeInPhoto })
    await changePhoto(desk, photo.id, { alt: side })
  }
}

/** Paints the picture that hangs on the wall, so that the wall is there when it is first looked at. */
export async function hangDemo(painter: Ctx, { schemeId, revision }: PublishedDemo): Promise<void> {
  const query = PictureQuery.parse(wallPictureSize(revision.materials.blank.shape))
  const { look } = await lookOfScheme(painter, schemeId, query)
  await drawLook(painter, look, wishOf(query))
}
