import { PaintDraft } from '#shared/shelf/paint'

/** A paint as somebody may type it; every field but the given ones as usual. */
export function paintDraft(more: Partial<PaintDraft> = {}): PaintDraft {
  return PaintDraft.parse({
    name: 'Opaque tan, water-based', kind: 'opaque', base: 'water',
    known: { how: 'masstone-hide', masstone: [66, 8, 30], passesToHide: 4 },
    volumeLeft: 48, pricePerMl: 0.12, hazards: ['H317'], note: 'from the second tin', ...more,
  })
}
