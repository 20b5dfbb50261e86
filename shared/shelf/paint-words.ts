import { spreadWords } from '#shared/optics/spread-words'
import type { PaintSwatches } from './paint-view'
import type { PaintBase, PaintKind, PaintKnown, TwoPart } from './paint'

/** A paint's carrier as a painter says it. */
export const BASE_WORDS: Readonly<Record<PaintBase, string>> = {
  'water': 'water-based',
  'solvent': 'solvent-based',
  'epoxy': 'epoxy',
  'uv-resin': 'UV resin',
  'moisture-cure': 'moisture-cure',
  'two-part-urethane': 'two-part urethane',
}

/** What a kind of paint does in a film, for somebody choosing one. */
export const KIND_PURPOSE: Readonly<Record<PaintKind, string>> = {
  'sealer': 'Closes the pores of the wood.',
  'primer': 'Gives grip and an even ground.',
  'opaque': 'Hides what is below.',
  'semi-opaque': 'Hides partly.',
  'transparent': 'Tints without hiding.',
  'candy': 'Strong transparent colour over a bright ground.',
  'pearl': 'A sheen of mica-type flakes.',
  'interference': 'Flakes of one reflected colour, near-complement over white.',
  'metallic': 'Visible metal flake.',
  'fluorescent': 'Re-emits light and looks extra bright; see-through, wants white below, fades outdoors.',
  'clear': 'The last, protective film.',
}

/** The ways a colour can be known, in few words, best first. */
export const KNOWN_WORDS: Readonly<Record<PaintKnown['how'], string>> = {
  'two-swatches': 'over black and white',
  'masstone-hide': 'own colour and hiding',
  'dye-over-white': 'over white only',
  'flake': 'from its flake',
  'fluorescent': 'over white, glowing',
  'clear': 'clear',
}

/** How a paint's colour is known, in few words with its passes where there are any. */
export function knownWords(known: PaintKnown): string {
  const words = KNOWN_WORDS[known.how]
  if (known.how === 'two-swatches' || known.how === 'dye-over-white') return `${words}, ${passesWords(known.passes)}`
  return words
}

/** How sure a paint's swatches are, the less sure of the two: "Typically within 2, mostly within 6."; empty where it is not known. */
export function sureWords({ sure }: Pick<PaintSwatches, 'sure'>): string {
  if (!sure) return ''
  const worse = sure.overBlack.most > sure.overWhite.most ? sure.overBlack : sure.overWhite
  return spreadWords({ ...worse, causes: [] })
}

/** A count of passes in words. */
export function passesWords(passes: number): string {
  return `${Number(passes.toFixed(1))} ${passes === 1 ? 'pass' : 'passes'}`
}

/** Resin and hardener as their label says it: 2 : 1 by volume. */
export function twoPartWords({ resin, hardener, by, resinDensity, hardenerDensity }: TwoPart): string {
  const densities = [resinDensity, hardenerDensity].some(density => density !== undefined) ? `, ${resinDensity ?? '?'} and ${hardenerDensity ?? '?'} g/mL` : ''
  return `${resin} : ${hardener} by ${by}${densities}`
}

/** The line under a paint's name. */
export function paintSubtitle({ kind, base }: { kind: PaintKind, base: PaintBase }): string {
  return `${kind}, ${BASE_WORDS[base]}, as it sprays`
}
