import type { Place } from '#shared/scheme/mark'
import { MaskForm, type Stencil } from '#shared/scheme/mask'
import { bar, STARTER_MASKS } from '#shared/scheme/starter-masks'

/** Forms a stencil can be cut in by numbers. */
export const CUTS = ['bars', 'spots', 'rows', 'flames'] as const
export type Cut = typeof CUTS[number]

/** What one says about a stencil that is cut by numbers. */
export interface CutWish {
  cut: Cut
  count: number
  /** Size of one opening, per cent of the usual. */
  size: number
  /** Where the first and the last stand, per cent of the length from the nose. */
  from: number
  to: number
}

export const COUNT_MOST = 40

/** A usual cut of a form. */
export function usualCut(cut: Cut): CutWish {
  switch (cut) {
    case 'bars': return { cut, count: 7, size: 100, from: 30, to: 83 }
    case 'spots': return { cut, count: 22, size: 100, from: 30, to: 90 }
    case 'rows': return { cut, count: 10, size: 100, from: 30, to: 84 }
    case 'flames': return { cut, count: 5, size: 100, from: 22, to: 30 }
  }
}

/** The outlines of a stencil cut by numbers. Shares of length and girth, so that it fits every blank. */
export function cutOutlines({ cut, count, size, from, to }: CutWish): Place[][] {
  const share = (k: number) => count === 1 ? 0.5 : k / (count - 1)
  const along = (k: number) => (from + (to - from) * share(k)) / 100
  const grow = size / 100
  return Array.from({ length: count }, (_, k): Place[] => {
    switch (cut) {
      // A bar narrows toward the tail, as the body does.
      case 'bars': return bar(along(k), 0.01, 0.72 - 0.06 * share(k), grow * (0.030 - 0.008 * share(k)), grow * 0.011, 0.006 - 0.010 * share(k))
      case 'spots': return moved(motif('Spots'), along(k), 0.24 + 0.115 * (k % 3), grow)
      case 'rows': return moved(motif('Scale row'), along(k), 0.47, grow)
      case 'flames': return moved(motif('Flames'), along(k) + 0.18, 0.235 + 0.49 * share(k), grow)
    }
  }).map(outline => outline.map(held))
}

/** A stencil cut by numbers, with a softness of edge in mm. */
export function cutStencil(wish: CutWish, edge: Pick<Stencil, 'does' | 'soft' | 'wobble'>): Stencil {
  return MaskForm.parse({ kind: 'stencil', outlines: cutOutlines(wish), ...edge }) as Stencil // a stencil goes in, so one comes out
}

const middle = (outline: readonly Place[]): Place => [
  outline.reduce((sum, [u]) => sum + u, 0) / outline.length, outline.reduce((sum, [, v]) => sum + v, 0) / outline.length,
]

/** The first opening of a starter stencil: what is repeated. */
function motif(name: string): readonly Place[] {
  const form = STARTER_MASKS.find(mask => mask.name === name)?.form
  return form?.kind === 'stencil' ? form.outlines[0] ?? [] : []
}

function moved(outline: readonly Place[], u: number, v: number, grow: number): Place[] {
  const [mu, mv] = middle(outline)
  return outline.map(([pu, pv]): Place => [u + grow * (pu - mu), v + grow * (pv - mv)])
}

const round = (value: number) => Math.round(value * 1e4) / 1e4

/** Within what a place on a body may be. */
function held([u, v]: Place): Place {
  return [round(Math.min(1.2, Math.max(-0.2, u))), round(Math.min(1.5, Math.max(-0.5, v)))]
}
