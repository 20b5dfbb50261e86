import type { ObjectStore } from '#server/photos/object-store'
import { photoKeys } from '#server/photos/photo-keys'

/** Forgets every file of a photo: the original and all copies, whatever they are called. */
export async function removePhotoFiles(workshopId: string, photoId: string, store: ObjectStore): Promise<void> {
  const keys: string[] = []
  for await (const { key } of store.list(photoKeys.folder(workshopId, photoId))) keys.push(key)
  if (keys.length > 0) await store.remove(keys)
}
