import type { CompareView } from '#shared/scheme/scheme-view'

type Side = Pick<CompareView['from'], 'number' | 'scheme'>

/** A version in the middle of a sentence: "revision 5", "the draft". */
export const sideWord = ({ number }: Pick<Side, 'number'>) => number === null ? 'the draft' : `revision ${number}`
/** A version by itself: "Revision 5", "Draft". */
export const sideName = ({ number }: Pick<Side, 'number'>) => number === null ? 'Draft' : `Revision ${number}`

/** Whether the two are of two schemes. */
export const areTwoSchemes = ({ from, to }: { from: Side, to: Side }) => from.scheme.id !== to.scheme.id

/** Both in a few words: "Revision 5 and the draft", or, of two schemes, "Perch in bars and Pike in tracks". */
export function comparedTitle(two: { from: Side, to: Side }): string {
  return areTwoSchemes(two) ? `${two.from.scheme.name} and ${two.to.scheme.name}` : `${sideName(two.from)} and ${sideWord(two.to)}`
}

/** What one of the two is called beside the other: "Revision 5", or, of two schemes, "Perch in bars, revision 5". */
export function sideTitle(side: Side, two: { from: Side, to: Side }): string {
  return areTwoSchemes(two) ? `${side.scheme.name}, ${sideWord(side)}` : sideName(side)
}

/** What to know where two finishes are on two blanks; empty on one. Shapes are told apart, not the names of blanks. */
export function twoBlanksWords({ from, to }: Pick<CompareView, 'from' | 'to'>): string {
  const [a, b] = [from.materials.blank, to.materials.blank]
  if (a.id === b.id) return ''
  return `Two blanks: ${a.shape.label}, ${Math.round(a.shape.length)} mm, and ${b.shape.label}, ${Math.round(b.shape.length)} mm. Both are drawn at one scale, and only zones that both have are compared.`
}
