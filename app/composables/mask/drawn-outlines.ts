import { flatOf, placeOfFlat } from '~/composables/hand/flat-blank'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { type Place, POINTS_MAX } from '#shared/scheme/mark'
import type { FlatPoint } from '#shared/scheme/outline/flat'
import { placed, type Placing } from '#shared/scheme/outline/placing'
import { simplifyTo } from '#shared/scheme/outline/simplify-line'

/** A stencil has so many outlines. */
export const OUTLINES_MAX = 120
/** How far a kept outline may lie from what was drawn or brought, mm. */
const TOLERANCE = 0.02

/** Outlines that were drawn or brought in, mm on the flat skin of a blank, and how they are laid there. */
export interface DrawnOutlines { outlines: readonly (readonly FlatPoint[])[], placing: Placing }

/** They as places of the blank they lie on, with no more of them than a stencil holds. */
export function outlinePlaces(blank: PreparedBlank, { outlines, placing }: DrawnOutlines): Place[][] {
  return placed(outlines, placing).slice(0, OUTLINES_MAX).map((ring) => {
    const { kept } = simplifyTo(ring, TOLERANCE, POINTS_MAX, true)
    return kept.flatMap(i => ring[i] ? [placeOfFlat(blank, ring[i])] : [])
  })
}

/** Outlines of a stencil as they lie flat on a blank, mm. */
export function flatOutlines(blank: PreparedBlank, outlines: readonly (readonly Place[])[]): FlatPoint[][] {
  return outlines.map(outline => outline.map(place => flatOf(blank, place)))
}

/** Outlines with more of them, or a sentence why they do not all go in: then none does. */
export function withOutlines(now: readonly (readonly FlatPoint[])[], more: readonly (readonly FlatPoint[])[]): { ok: true, outlines: (readonly FlatPoint[])[] } | { ok: false, because: string } {
  const count = now.length + more.length
  return count > OUTLINES_MAX
    ? { ok: false, because: `A stencil has at most ${OUTLINES_MAX} outlines; that would make ${count}. Take some out, or make two stencils of them.` }
    : { ok: true, outlines: [...now, ...more] }
}

/** What came in from a file, in a sentence. */
export function broughtWords(count: number, { tooSmall, islands }: { tooSmall: number, islands: number }): string {
  const parts = [`${count} ${count === 1 ? 'outline' : 'outlines'} brought in at true size`]
  if (tooSmall > 0) parts.push(`${tooSmall} ${tooSmall === 1 ? 'line that encloses' : 'lines that enclose'} nothing left out`)
  if (islands > 0) parts.push(`${islands} ${islands === 1 ? 'lies' : 'lie'} inside another and ${islands === 1 ? 'falls' : 'fall'} out with it unless you leave a bridge`)
  return `${parts.join('; ')}.`
}
