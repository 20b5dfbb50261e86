import { edgeWords, maskWords } from './mask-words'
import type { MaskForm } from '#shared/scheme/mask'
import type { MaskDraft } from '#shared/scheme/mask-view'

/** One line in which two versions of a mask differ. */
export interface MaskDifference { what: string, mine: string, theirs: string }

const figure = (value: number) => String(Number(value.toFixed(2)))

function lines({ name, form }: MaskDraft): Record<string, string> {
  return { 'Name': name, 'What it is': maskWords(form), ...form.kind === 'mesh' ? meshLines(form) : stencilLines(form) }
}

function meshLines(form: Extract<MaskForm, { kind: 'mesh' }>): Record<string, string> {
  return {
    'Turned by': `${figure(form.angle)}°`, 'Stretched along': figure(form.stretch), 'Follows the body': figure(form.follow), 'Stands off': `${figure(form.lift)} mm`,
  }
}

function stencilLines(form: Exclude<MaskForm, { kind: 'mesh' }>): Record<string, string> {
  return {
    Paint: form.does === 'opens' ? 'goes through it' : 'stays off it', Edge: `${figure(form.soft)} mm, ${edgeWords(form.soft)}`,
    Torn: form.wobble === 0 ? 'cut clean' : `${figure(form.wobble)} mm`,
  }
}

/** The lines in which two versions of a mask differ; outlines that are drawn otherwise are one of them. Empty when they are the same. */
export function maskDifferences(mine: MaskDraft, theirs: MaskDraft): MaskDifference[] {
  const [ours, others] = [lines(mine), lines(theirs)]
  const keys = [...new Set([...Object.keys(ours), ...Object.keys(others)])]
  const differing = keys.map(what => ({ what, mine: ours[what] ?? 'none', theirs: others[what] ?? 'none' })).filter(line => line.mine !== line.theirs)
  const [a, b] = [mine.form, theirs.form]
  const areDrawnOtherwise = a.kind !== 'mesh' && b.kind !== 'mesh' && JSON.stringify(a.outlines) !== JSON.stringify(b.outlines)
  return areDrawnOtherwise ? [...differing, { what: 'Outlines', mine: 'as drawn above', theirs: 'as drawn above' }] : differing
}
