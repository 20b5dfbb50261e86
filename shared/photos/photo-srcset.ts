import { RENDITION_WIDTHS, type RENDITION_FORMATS } from './photo-limits'

interface Sized { readonly id: string, readonly width: number, readonly height: number }

/** The copies of a photo for a browser to choose from, each with its true width; `base` is the address its copies lie under. */
export function photoSrcset(base: string, photo: Sized, format: (typeof RENDITION_FORMATS)[number]): string {
  const long = Math.max(photo.width, photo.height)
  const byWidth = new Map<number, (typeof RENDITION_WIDTHS)[number]>()
  for (const edge of RENDITION_WIDTHS) {
    const width = Math.max(1, Math.round(photo.width * Math.min(1, edge / long)))
    if (!byWidth.has(width)) byWidth.set(width, edge)
  }
  return [...byWidth].map(([width, edge]) => `${photoAddress(base, photo.id, edge, format)} ${width}w`).join(', ')
}

/** Where one copy of a photo lies, by the length of its long edge. */
export function photoAddress(base: string, photoId: string, edge: (typeof RENDITION_WIDTHS)[number], format: (typeof RENDITION_FORMATS)[number]): string {
  return `${base}/${photoId}/${edge}.${format}`
}
