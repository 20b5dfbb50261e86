import { type CutWish, cutStencil, usualCut } from './stencil-forms'
import { type MaskForm, Mesh, type Stencil } from '#shared/scheme/mask'

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
}

/** A wish for a new mask. */
export function newMaskWish(): MaskWish {
  return {
    name: '', kind: 'mesh', mesh: Mesh.parse({ kind: 'mesh', weave: 'hexagon', pitch: 2, thread: 0.3 }),
    edge: { does: 'opens', soft: 0.3, wobble: 0 }, cut: usualCut('bars'), isCutAnew: true, kept: null,
  }
}

/** A wish that says what a mask is now. */
export function maskWishOf(name: string, form: MaskForm): MaskWish {
  const usual = newMaskWish()
  if (form.kind === 'mesh') return { ...usual, name, mesh: { ...form } }
  const { does, soft, wobble } = form
  return { ...usual, name, kind: 'stencil', edge: { does, soft, wobble }, isCutAnew: false, kept: form }
}

/** The form a wish asks for. */
export function formOfWish({ kind, mesh, edge, cut, isCutAnew, kept }: MaskWish): MaskForm {
  if (kind === 'mesh') return { ...mesh, thread: Math.min(mesh.thread, mesh.pitch * 0.9) }
  return kept && !isCutAnew ? { ...kept, ...edge } : cutStencil(cut, edge)
}
