import { isSameKnown } from './same-known'
import type { PaintDraft } from './paint'
import { BASE_WORDS, knownWords, twoPartWords } from './paint-words'

/** One thing that two writers of a paint say differently. */
export interface PaintDifference { what: string, mine: string, theirs: string }

const figure = (value: number | undefined, unit: string) => value === undefined ? 'not noted' : `${Number(value.toFixed(3))} ${unit}`.trim()

const FIELDS: readonly (readonly [what: string, say: (paint: PaintDraft) => string])[] = [
  ['name', paint => paint.name],
  ['kind', paint => paint.kind],
  ['carrier', paint => BASE_WORDS[paint.base]],
  ['reducer', paint => figure(paint.reducerPer100, 'to 100')],
  ['film per pass', paint => figure(paint.filmPerPass, 'µm')],
  ['volume solids', paint => figure(paint.volumeSolids, '%')],
  ['density', paint => figure(paint.density, 'g/mL')],
  ['rest', paint => figure(paint.restMinutes, 'min')],
  ['working time', paint => figure(paint.potLifeMinutes, 'min')],
  ['two parts', paint => paint.twoPart ? twoPartWords(paint.twoPart) : 'ready to lay'],
  ['hazards', paint => paint.hazards.toSorted().join(', ') || 'none'],
  ['note', paint => paint.note || 'none'],
  ['left', paint => figure(paint.volumeLeft, 'mL')],
  ['price a mL', paint => figure(paint.pricePerMl, '')],
]

/** What two versions of a paint say differently, in words; empty when they agree. */
export function paintDifferences(mine: PaintDraft, theirs: PaintDraft): PaintDifference[] {
  const plain = FIELDS.map(([what, say]) => ({ what, mine: say(mine), theirs: say(theirs) })).filter(one => one.mine !== one.theirs)
  const [my, their] = [knownWords(mine.known), knownWords(theirs.known)]
  if (isSameKnown(mine.known, theirs.known)) return plain
  return [{ what: 'colour', mine: my === their ? `${my}, as you have it` : my, theirs: my === their ? `${their}, otherwise` : their }, ...plain]
}
