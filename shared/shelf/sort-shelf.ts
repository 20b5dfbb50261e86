import type { PaintBase, PaintKind, PaintKnown } from './paint'
import type { PaintListItem } from './paint-view'
import { BASE_WORDS, KNOWN_WORDS } from './paint-words'
import { lchFromLab } from '#shared/optics/colorimetry'

/** Below this chroma a colour is a grey and has no hue worth sorting by. */
const GREY_CHROMA = 6

/** What one looks for on the shelf; an empty string is anything. */
export interface ShelfSearch {
  words: string
  kind: PaintKind | ''
  base: PaintBase | ''
  how: PaintKnown['how'] | ''
  /** Retired paints: kept out, or the only ones shown. */
  retired: boolean
}

export const SHELF_ORDERS = ['name', 'colour', 'left', 'schemes'] as const
export type ShelfOrder = typeof SHELF_ORDERS[number]

/** A search that finds everything in use. */
export const ANYTHING: ShelfSearch = { words: '', kind: '', base: '', how: '', retired: false }

/** Whether a search leaves paints in use out. */
export function isNarrowed(search: ShelfSearch): boolean {
  return search.words.trim() !== '' || search.kind !== '' || search.base !== '' || search.how !== '' || search.retired
}

/** Paints that have every word somewhere in name, kind, carrier, way of knowing or colour, and all else that is asked. */
export function findPaints(paints: readonly PaintListItem[], search: ShelfSearch): PaintListItem[] {
  const words = search.words.toLowerCase().split(/\s+/).filter(Boolean)
  return paints.filter(paint => paint.retired === search.retired
    && (search.kind === '' || paint.kind === search.kind)
    && (search.base === '' || paint.base === search.base)
    && (search.how === '' || paint.known.how === search.how)
    && words.every(word => saidOf(paint).includes(word)))
}

/** The shelf in an order: by name, round the hues with greys last from light to dark, least left first, or most used first. */
export function sortPaints(paints: readonly PaintListItem[], order: ShelfOrder): PaintListItem[] {
  return paints.toSorted((a, b) => compare(a, b, order) || byName(a, b))
}

function compare(a: PaintListItem, b: PaintListItem, order: ShelfOrder): number {
  switch (order) {
    case 'name': return 0
    case 'colour': return placeInHues(a) - placeInHues(b)
    case 'left': return a.volumeLeft - b.volumeLeft
    case 'schemes': return b.schemes - a.schemes
  }
}

function placeInHues(paint: PaintListItem): number {
  const [L, chroma, hue] = lchFromLab([...paint.swatches.lab])
  return chroma < GREY_CHROMA ? 1000 - L : hue
}

function byName(a: PaintListItem, b: PaintListItem): number {
  return a.name.localeCompare(b.name, 'en')
}

function saidOf(paint: PaintListItem): string {
  return `${paint.name} ${paint.kind} ${BASE_WORDS[paint.base]} ${KNOWN_WORDS[paint.known.how]} ${paint.swatches.words}`.toLowerCase()
}
