import type { MaskForm, Stencil } from '#shared/scheme/mask'

const figure = (value: number) => String(Number(value.toFixed(2)))

/** A mask in a few words: what it is, and its figures in mm. */
export function maskWords(form: MaskForm): string {
  if (form.kind === 'mesh') return `${form.weave} net, ${figure(form.pitch)} mm from thread to thread, thread ${figure(form.thread)}`
  const count = form.outlines.length
  const what = form.does === 'opens' ? (count === 1 ? 'opening' : 'openings') : (count === 1 ? 'shield' : 'shields')
  return `${form.kind}, ${count} ${what}, ${edgeWords(form.soft)}`
}

/** How an edge of a softness in mm comes about (common practice): taped down, held on the work, or held off it. */
export function edgeWords(soft: Stencil['soft']): string {
  if (soft <= 0.15) return 'a sharp edge, as taped down'
  if (soft <= 0.45) return 'held on the work'
  return 'held off the work'
}
