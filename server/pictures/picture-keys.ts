import { ENGINE_VERSION } from '#shared/optics/engine-version'
import { PICTURE_VERSION } from '#shared/picture/picture-hash'
import type { PictureFormat } from './encode-picture'

/** The versions a picture was worked out and drawn by: another of either draws the same look otherwise. */
export const DRAWN_BY = `${ENGINE_VERSION}-${PICTURE_VERSION}`

/** Where the file of a picture lies in the object store; the only place that knows. */
export const pictureKey = (workshopId: string, hash: string, format: PictureFormat) => `workshops/${workshopId}/pictures/${DRAWN_BY}/${hash}.${format}`

const KEY = /^workshops\/([0-9a-f-]{36})\/pictures\/(?:([^/]+)\/)?([0-9a-f]{64})\.\w+$/

/** Whose picture a file of the store is, and the versions it was drawn by (none for files that say none); undefined when it is no picture's. */
export function pictureOfKey(key: string): { workshopId: string, hash: string, drawnBy: string | undefined } | undefined {
  const [, workshopId, drawnBy, hash] = KEY.exec(key) ?? []
  return workshopId && hash ? { workshopId, hash, drawnBy } : undefined
}
