import type { PictureSize } from '#shared/picture/picture-size'

/** Address of a scheme's picture, painted by the server. */
export function pictureAddress(schemeId: string, { width, height }: PictureSize, more: Readonly<Record<string, string | number>> = {}): string {
  const query = new URLSearchParams({ width: String(width), height: String(height) })
  for (const [name, value] of Object.entries(more)) query.set(name, String(value))
  return `/api/schemes/${schemeId}/picture?${query.toString()}`
}
