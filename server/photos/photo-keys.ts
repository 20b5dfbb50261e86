/** Where a photo's files lie in the object store; the only place that knows. */
export const photoKeys = {
  folder: (workshopId: string, photoId: string) => `workshops/${workshopId}/photos/${photoId}/`,
  /** As it came, for the workshop's own safe keeping; never served. */
  original: (workshopId: string, photoId: string) => `${photoKeys.folder(workshopId, photoId)}original`,
  rendition: (workshopId: string, photoId: string, file: string) => `${photoKeys.folder(workshopId, photoId)}${file}`,
}

const KEY = /^workshops\/([0-9a-f-]{36})\/photos\/([0-9a-f-]{36})\//

/** Whose photo a file of the store is; undefined when it is no photo's. */
export function photoOfKey(key: string): { workshopId: string, photoId: string } | undefined {
  const [, workshopId, photoId] = KEY.exec(key) ?? []
  return workshopId && photoId ? { workshopId, photoId } : undefined
}
