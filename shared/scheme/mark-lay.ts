import { DOTS_MAX, type Mark, type OnlySide, STROKES_MAX, type Stroke } from './mark'
import { MARKS_MAX, type PartAt } from './mark-parts'

/** The marks with something new drawn, and where it is; or why it cannot be, as a sentence. */
export type LaidMark = { ok: true, marks: Mark[], at: PartAt } | { ok: false, because: string }

const FULL = `A coat carries at most ${MARKS_MAX} marks. What is drawn stays; lay another coat with the same mix for more.`

/** Draws strokes of one tool: on the newest sheet of strokes of that tool and side that has room, or on a new one. They are drawn all or none. */
export function layStrokes(marks: readonly Mark[], tool: 'airbrush' | 'brush', strokes: readonly Stroke[], only?: OnlySide): LaidMark {
  const place = marks.findLastIndex(mark => mark.kind === 'strokes' && mark.with === tool && mark.only === only && mark.strokes.length + strokes.length <= STROKES_MAX)
  const sheet = marks[place]
  if (sheet?.kind === 'strokes') return { ok: true, marks: marks.with(place, { ...sheet, strokes: [...sheet.strokes, ...strokes] }), at: { mark: place, part: sheet.strokes.length } }
  return layMark(marks, { kind: 'strokes', with: tool, strokes: [...strokes], ...only && { only } })
}

/** Puts a dot: with the newest dots of the same edge and side that have room, or as the first of new ones. */
export function layDot(marks: readonly Mark[], dot: readonly [u: number, v: number, radius: number], soft: number, only?: OnlySide): LaidMark {
  const place = marks.findLastIndex(mark => mark.kind === 'dots' && mark.soft === soft && mark.grow === 0 && mark.only === only && mark.dots.length < DOTS_MAX)
  const sheet = marks[place]
  if (sheet?.kind === 'dots') return { ok: true, marks: marks.with(place, { ...sheet, dots: [...sheet.dots, [...dot]] }), at: { mark: place, part: sheet.dots.length } }
  return layMark(marks, { kind: 'dots', dots: [[...dot]], soft, grow: 0, ...only && { only } })
}

/** Lays a mark of its own. */
export function layMark(marks: readonly Mark[], mark: Mark): LaidMark {
  return marks.length >= MARKS_MAX ? { ok: false, because: FULL } : { ok: true, marks: [...marks, mark], at: { mark: marks.length, part: 0 } }
}
