import { type CutWish, cutStencil, usualCut } from './stencil-forms'
import { type DrawnOutlines, flatOutlines, outlinePlaces } from './drawn-outlines'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { type MaskForm, Mesh, type Stencil } from '#shared/scheme/mask'
import { AS_THEY_CAME } from '#shared/scheme/outline/placing'

/** A mask as it is being written. */
export interface MaskWish {
  name: string
  kind: 'mesh' | 'stencil'
  mesh: Mesh
  edge: Pick<Stencil, 'does' | 'soft' | 'wobble'>
  cut: CutWish
  /** Cut anew by numbers; otherwise the outlines it came with stay. */
  isCutAnew: boolean
  /** The stencil it came as. */
  kept: Stencil | null
  /** Outlines drawn or brought in, which count instead of all that while there are any; null otherwise. */
  drawn: DrawnOutlines | null
}

/** A wish for a new mask. */
export function newMaskWish(): MaskWish {
  return {
    name: '', kind: 'mesh', mesh: Mesh.parse({ kind: 'mesh', weave: 'hexagon', pitch: 2, thread: 0.3 }),
    edge: { does: 'opens', soft: 0.3, wobble: 0 }, cut: usualCut('bars'), isCutAnew: true, kept: null, drawn: null,
  }
}

/** A wish that says what a mask is now. */
export function maskWishOf(name: string, form: MaskForm): MaskWish {
  const usual = newMaskWish()
  if (form.kind === 'mesh') return { ...usual, name, mesh: { ...form } }
  const { does, soft, wobble } = form
  return { ...usual, name, kind: 'stencil', edge: { does, soft, wobble }, isCutAnew: false, kept: form }
}

/** A wish whose outlines are drawn, starting with those it has now; they lie flat on the blank they are shown on. */
export function drawnWish(wish: MaskWish, blank: PreparedBlank): MaskWish {
  const now = wish.kept ? flatOutlines(blank, wish.kept.outlines) : []
  return { ...wish, isCutAnew: false, drawn: { outlines: now, placing: AS_THEY_CAME } }
}

/** The form a wish asks for; drawn outlines are laid on `blank`. Null while nothing is drawn yet. */
export function formOfWish(wish: MaskWish): MaskForm
export function formOfWish(wish: MaskWish, blank: PreparedBlank): MaskForm | null
export function formOfWish({ kind, mesh, edge, cut, isCutAnew, kept, drawn }: MaskWish, blank?: PreparedBlank): MaskForm | null {
  if (kind === 'mesh') return { ...mesh, thread: Math.min(mesh.thread, mesh.pitch * 0.9) }
  if (drawn && blank) {
    const outlines = outlinePlaces(blank, drawn)
    return outlines.length === 0 ? null : { kind: kept?.kind ?? 'stencil', ...edge, outlines }
  }
  return kept && !isCutAnew ? { ...kept, ...edge } : cutStencil(cut, edge)
}
