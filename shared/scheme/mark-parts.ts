import type { Mark, OnlySide, Place } from './mark'

/** One thing drawn by hand, by its places in a coat: which mark, and which stroke or dot of it. */
export interface PartAt { mark: number, part: number }

/** What a part is, for words and for what can be changed about it. */
export type PartKind = 'airbrush line' | 'dagger stroke' | 'brush line' | 'dot' | 'fin rays' | 'filled shape'

/** A stroke, a dot, a fan or a filled outline as it is worked on. */
export interface MarkPart {
  at: PartAt
  kind: PartKind
  /** Its own places: a line's, an outline's; a dot's middle; a fan's root. */
  points: readonly Place[]
  isClosed: boolean
  /** mm at its start and its end: a gun's bell (σ), a brush's half width, a dot's radius; a ray's at a body of 100 mm. */
  width: readonly [number, number]
  /** The one flank that carries it; both when there is none. */
  only?: OnlySide
}

/** A coat carries so many marks (a sheet of strokes is one). */
export const MARKS_MAX = 60

/** Everything drawn by hand that has places of its own; what falls from a seed has none. */
export function markParts(marks: readonly Mark[]): MarkPart[] {
  return marks.flatMap((mark, place): MarkPart[] => {
    const only = 'only' in mark && mark.only ? { only: mark.only } : {}
    switch (mark.kind) {
      case 'strokes': return mark.strokes.map(({ points, width }, part) => ({
        at: { mark: place, part }, kind: mark.with === 'brush' ? 'brush line' : Math.abs(width[0] - width[1]) < 1e-9 ? 'airbrush line' : 'dagger stroke', points, isClosed: false, width, ...only,
      }))
      case 'dots': return mark.dots.map(([u, v, radius], part) => ({ at: { mark: place, part }, kind: 'dot', points: [[u, v]], isClosed: false, width: [radius, radius], ...only }))
      case 'fan': return [{ at: { mark: place, part: 0 }, kind: 'fin rays', points: [mark.root], isClosed: false, width: mark.width, ...only }]
      case 'outline': return [{ at: { mark: place, part: 0 }, kind: 'filled shape', points: mark.points, isClosed: true, width: [mark.soft, mark.soft], ...only }]
      case 'scatter':
      case 'worm tracks':
      case 'torn sponge':
        return []
    }
  })
}

/** The part at a place; null where there is none. */
export function partAt(marks: readonly Mark[], at: PartAt): MarkPart | null {
  return markParts(marks).find(part => part.at.mark === at.mark && part.at.part === at.part) ?? null
}

/** The marks with every place of one part put elsewhere. */
export function withPlaces(marks: readonly Mark[], at: PartAt, put: (place: Place, order: number) => Place): Mark[] {
  return changed(marks, at, (mark) => {
    switch (mark.kind) {
      case 'strokes': return { ...mark, strokes: mark.strokes.map((stroke, i) => i === at.part ? { ...stroke, points: stroke.points.map(put) } : stroke) }
      case 'dots': return { ...mark, dots: mark.dots.map((dot, i) => i === at.part ? [...put([dot[0], dot[1]], 0), dot[2]] : dot) }
      case 'fan': return { ...mark, root: put(mark.root, 0) }
      case 'outline': return { ...mark, points: mark.points.map(put) }
      case 'scatter':
      case 'worm tracks':
      case 'torn sponge':
        return mark
    }
  })
}

const WIDTHS = { strokes: [0.02, 40], dots: [0.02, 30], outline: [0.02, 10], fan: [0.02, 40] } as const

/** The marks with one part of other widths (mm), held to what a tool can do. */
export function withWidth(marks: readonly Mark[], at: PartAt, width: readonly [number, number]): Mark[] {
  return changed(marks, at, (mark) => {
    if (!(mark.kind in WIDTHS)) return mark
    const [least, most] = WIDTHS[mark.kind as keyof typeof WIDTHS]
    const [start, end] = width.map(each => Math.min(most, Math.max(least, each))) as [number, number] // two
    switch (mark.kind) {
      case 'strokes': return { ...mark, strokes: mark.strokes.map((stroke, i) => i === at.part ? { ...stroke, width: [start, end] } : stroke) }
      case 'dots': return { ...mark, dots: mark.dots.map((dot, i) => i === at.part ? [dot[0], dot[1], start] : dot) }
      case 'fan': return { ...mark, width: [start, end] }
      case 'outline': return { ...mark, soft: start }
      case 'scatter':
      case 'worm tracks':
      case 'torn sponge':
        return mark
    }
  })
}

/** Rays from one root. */
export type Fan = Extract<Mark, { kind: 'fan' }>

/** The marks with one fan otherwise. */
export function withFan(marks: readonly Mark[], at: PartAt, change: Partial<Pick<Fan, 'count' | 'length' | 'angle'>>): Mark[] {
  return changed(marks, at, mark => mark.kind === 'fan' ? { ...mark, ...change } : mark)
}

/** The marks with the mark of one part on both flanks, or on one alone: strokes and dots of one sheet go together. */
export function withSide(marks: readonly Mark[], at: PartAt, only: OnlySide): Mark[] {
  return changed(marks, at, (mark) => {
    if (mark.kind === 'scatter' || mark.kind === 'worm tracks' || mark.kind === 'torn sponge') return mark
    const { only: _, ...both } = mark
    return only ? { ...both, only } : both
  })
}

/** The marks without one part; a mark left without any goes too. */
export function withoutPart(marks: readonly Mark[], at: PartAt): Mark[] {
  return marks.flatMap((mark, place): Mark[] => {
    if (place !== at.mark) return [mark]
    switch (mark.kind) {
      case 'strokes': {
        const strokes = mark.strokes.filter((_, i) => i !== at.part)
        return strokes.length > 0 ? [{ ...mark, strokes }] : []
      }
      case 'dots': {
        const dots = mark.dots.filter((_, i) => i !== at.part)
        return dots.length > 0 ? [{ ...mark, dots }] : []
      }
      case 'fan':
      case 'outline':
      case 'scatter':
      case 'worm tracks':
      case 'torn sponge':
        return []
    }
  })
}

function changed(marks: readonly Mark[], at: PartAt, change: (mark: Mark) => Mark): Mark[] {
  return marks.map((mark, place) => place === at.mark ? change(mark) : mark)
}
