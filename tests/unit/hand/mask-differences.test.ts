import { expect, it } from 'vitest'
import { maskDifferences } from '~/composables/mask/mask-differences'
import { STARTER_MASKS } from '#shared/scheme/starter-masks'
import type { MaskDraft } from '#shared/scheme/mask-view'

const drafts = STARTER_MASKS.map(({ name, form }): MaskDraft => ({ name, form }))
const net = drafts.find(draft => draft.form.kind === 'mesh')!
const plate = drafts.find(draft => draft.form.kind === 'stencil')!

it('a mask does not differ from itself', () => {
  for (const draft of drafts) expect(maskDifferences(draft, structuredClone(draft))).toEqual([])
})

it('says which line of a net differs, and how it stands in both', () => {
  if (net.form.kind !== 'mesh') throw new Error('no net')
  const stretch = net.form.stretch + 0.3
  expect(maskDifferences({ ...net, form: { ...net.form, stretch } }, net)).toEqual([{ what: 'Stretched along', mine: String(stretch), theirs: String(net.form.stretch) }])
})

it('sees an outline that was moved, though no word of it changed', () => {
  if (plate.form.kind === 'mesh') throw new Error('no stencil')
  const outlines = plate.form.outlines.map(outline => outline.map(([u, v]): [number, number] => [u, v + 0.01]))
  expect(maskDifferences({ ...plate, form: { ...plate.form, outlines } }, plate).map(line => line.what)).toEqual(['Outlines'])
})

it('shows what one has and the other has not, when a net became a stencil', () => {
  const lines = maskDifferences(net, plate)
  expect(lines.find(line => line.what === 'Turned by')).toMatchObject({ theirs: 'none' })
  expect(lines.find(line => line.what === 'Edge')).toMatchObject({ mine: 'none' })
})
