import { type Coat, PASSES_MAX } from './coat'
import { coatFault, groundFault, maskFault } from './field-faults'
import type { Mask } from './mask'
import { ANSWERED_MAX, COATS_MAX, type Eyes, type Ground, MASKS_MAX, type SchemeBody, type StackItem } from './body'
import { carryCoat, coatsOf, maskWord, moveItem, rowOfCoat, rowsOfMask, type StackOutcome } from './stack-order'

/** The coats a mask is fitted for: fitted just before the first, lifted just after the last. */
export interface Span { firstCoatId: string, lastCoatId: string }

/** One thing a painter does to a scheme. New ids come with it, so that the same edit always gives the same body. */
export type SchemeEdit
  /** Lays a new coat so that it stands at `row`, counted from the ground, 0 first. */
  = | { do: 'add-coat', coat: Coat, row: number }
    | { do: 'take-out-coat', coatId: string }
    /** Lays the same coat again right above itself. */
    | { do: 'duplicate-coat', coatId: string, newId: string }
    | { do: 'change-coat', coatId: string, change: Partial<Omit<Coat, 'id'>> }
    | { do: 'change-mix', coatId: string, mix: Coat['mix'] }
    | { do: 'set-passes', coatId: string, passes: number }
    | { do: 'carry-coat', coatId: string, way: 'up' | 'down' }
    /** Moves a coat, a fit or a lift to another row. */
    | { do: 'move-item', from: number, to: number }
    | { do: 'add-mask', mask: Mask, over: Span }
    | { do: 'change-mask', maskId: string, change: Partial<Omit<Mask, 'id'>> }
    /** Fits and lifts a mask round other coats. */
    | { do: 'span-mask', maskId: string, over: Span }
    | { do: 'remove-mask', maskId: string }
    | { do: 'change-ground', ground: Ground }
    | { do: 'set-eyes', eyes: Eyes | null }
    | { do: 'choose-blank', blankId: string }
    /** Answers a warning of a second look, or takes the answer back. */
    | { do: 'answer', key: string, known: boolean }
    /** Puts a whole body in place: an older revision, the other of two versions, or one that a build-up was laid into; `words` say which. */
    | { do: 'replace-body', body: SchemeBody, words?: string }

/** The body after an edit, or the reason why it cannot be done, as a sentence. */
export type EditOutcome = { ok: true, body: SchemeBody } | { ok: false, because: string }

const refuse = (because: string): EditOutcome => ({ ok: false, because })
const NO_COAT = 'That coat is not in this scheme.'
const NO_MASK = 'That mask is not in this scheme.'

function withStack(body: SchemeBody, outcome: StackOutcome): EditOutcome {
  return outcome.ok ? { ok: true, body: { ...body, stack: outcome.stack } } : outcome
}

function changeCoat(body: SchemeBody, coatId: string, change: Partial<Omit<Coat, 'id'>>): EditOutcome {
  const row = rowOfCoat(body.stack, coatId)
  const item = body.stack[row]
  if (item?.act !== 'coat') return refuse(NO_COAT)
  const fault = coatFault(change)
  if (fault !== null) return refuse(fault)
  return { ok: true, body: { ...body, stack: body.stack.with(row, { act: 'coat', coat: { ...item.coat, ...change, id: coatId } }) } }
}

function addCoat(body: SchemeBody, coat: Coat, row: number): EditOutcome {
  if (coatsOf(body.stack).length >= COATS_MAX) return refuse(`A scheme has at most ${COATS_MAX} coats.`)
  if (rowOfCoat(body.stack, coat.id) >= 0) return refuse('That coat is in this scheme already.')
  const fault = coatFault(coat)
  if (fault !== null) return refuse(fault)
  if (!Number.isInteger(row) || row < 0 || row > body.stack.length) return refuse('A coat lies on the ground or on another coat.')
  return { ok: true, body: { ...body, stack: body.stack.toSpliced(row, 0, { act: 'coat', coat }) } }
}

function duplicateCoat(body: SchemeBody, coatId: string, newId: string): EditOutcome {
  const row = rowOfCoat(body.stack, coatId)
  const item = body.stack[row]
  if (item?.act !== 'coat') return refuse(NO_COAT)
  // The copy is the painter's own: it was not in the build-up.
  const { laidFrom: _link, ...coat } = item.coat
  return addCoat(body, { ...coat, id: newId }, row + 1)
}

/** The stack with a mask fitted just below the first coat of a span and lifted just above the last. */
function spanned(stack: readonly StackItem[], maskId: string, over: Span): StackItem[] | string {
  const bare = stack.filter(item => item.act === 'coat' || item.maskId !== maskId)
  const first = rowOfCoat(bare, over.firstCoatId)
  const last = rowOfCoat(bare, over.lastCoatId)
  if (first < 0 || last < 0) return NO_COAT
  if (last < first) return 'A mask is lifted after the coats it is fitted for: its last coat lies below its first.'
  return bare.toSpliced(last + 1, 0, { act: 'lift', maskId }).toSpliced(first, 0, { act: 'fit', maskId })
}

function addMask(body: SchemeBody, mask: Mask, over: Span): EditOutcome {
  if (body.masks.length >= MASKS_MAX) return refuse(`A scheme has at most ${MASKS_MAX} masks.`)
  if (body.masks.some(each => each.id === mask.id)) return refuse('That mask is in this scheme already.')
  const fault = maskFault(mask)
  if (fault !== null) return refuse(fault)
  const stack = spanned(body.stack, mask.id, over)
  return typeof stack === 'string' ? refuse(stack) : { ok: true, body: { ...body, masks: [...body.masks, mask], stack } }
}

function changeMask(body: SchemeBody, maskId: string, change: Partial<Omit<Mask, 'id'>>): EditOutcome {
  if (!body.masks.some(mask => mask.id === maskId)) return refuse(NO_MASK)
  const fault = maskFault(change)
  if (fault !== null) return refuse(fault)
  return { ok: true, body: { ...body, masks: body.masks.map(mask => mask.id === maskId ? { ...mask, ...change, id: maskId } : mask) } }
}

function spanMask(body: SchemeBody, maskId: string, over: Span): EditOutcome {
  if (!body.masks.some(mask => mask.id === maskId)) return refuse(NO_MASK)
  const stack = spanned(body.stack, maskId, over)
  return typeof stack === 'string' ? refuse(stack) : { ok: true, body: { ...body, stack } }
}

function removeMask(body: SchemeBody, maskId: string): EditOutcome {
  if (!body.masks.some(mask => mask.id === maskId)) return refuse(NO_MASK)
  return {
    ok: true,
    body: {
      ...body,
      masks: body.masks.filter(mask => mask.id !== maskId),
      stack: body.stack.filter(item => item.act === 'coat' || item.maskId !== maskId),
    },
  }
}

/** The oldest answers go first when there are too many: a warning that comes back can be answered again. */
function answer({ answered = [], ...body }: SchemeBody, key: string, known: boolean): SchemeBody {
  const others = answered.filter(each => each !== key)
  const now = known ? [...others, key].slice(-ANSWERED_MAX) : others
  return now.length > 0 ? { ...body, answered: now } : body
}

/** Does one edit. Pure: the body it was given stays as it is. What cannot be done is refused with a sentence, never mended. */
export function applyEdit(body: SchemeBody, edit: SchemeEdit): EditOutcome {
  switch (edit.do) {
    case 'add-coat': return addCoat(body, edit.coat, edit.row)
    case 'take-out-coat': {
      const row = rowOfCoat(body.stack, edit.coatId)
      return row < 0 ? refuse(NO_COAT) : { ok: true, body: { ...body, stack: body.stack.toSpliced(row, 1) } }
    }
    case 'duplicate-coat': return duplicateCoat(body, edit.coatId, edit.newId)
    case 'change-coat': return changeCoat(body, edit.coatId, edit.change)
    case 'change-mix': return changeCoat(body, edit.coatId, { mix: edit.mix })
    case 'set-passes':
      if (!Number.isInteger(edit.passes) || edit.passes < 1 || edit.passes > PASSES_MAX) return refuse(`A coat has 1 to ${PASSES_MAX} whole passes.`)
      return changeCoat(body, edit.coatId, { passes: edit.passes })
    case 'carry-coat': return withStack(body, carryCoat(body, edit.coatId, edit.way))
    case 'move-item': return withStack(body, moveItem(body, edit.from, edit.to))
    case 'add-mask': return addMask(body, edit.mask, edit.over)
    case 'change-mask': return changeMask(body, edit.maskId, edit.change)
    case 'span-mask': return spanMask(body, edit.maskId, edit.over)
    case 'remove-mask': return removeMask(body, edit.maskId)
    case 'change-ground': {
      const fault = groundFault(edit.ground)
      return fault === null ? { ok: true, body: { ...body, ground: edit.ground } } : refuse(fault)
    }
    case 'set-eyes': return { ok: true, body: { ...body, eyes: edit.eyes } }
    case 'choose-blank': return { ok: true, body: { ...body, blankId: edit.blankId } }
    case 'answer': return { ok: true, body: answer(body, edit.key, edit.known) }
    case 'replace-body': return { ok: true, body: edit.body }
  }
}

/** What an edit changes again and again while a slider or a field is worked; null for what is a step of its own. */
export function editField(edit: SchemeEdit): string | null {
  switch (edit.do) {
    case 'change-coat': return `coat ${edit.coatId} ${Object.keys(edit.change).sort().join(' ')}`
    case 'change-mix': return `coat ${edit.coatId} mix`
    case 'set-passes': return `coat ${edit.coatId} passes`
    case 'change-mask': return `mask ${edit.maskId} ${Object.keys(edit.change).sort().join(' ')}`
    case 'change-ground': return 'ground'
    case 'set-eyes': return 'eyes'
    case 'add-coat':
    case 'take-out-coat':
    case 'duplicate-coat':
    case 'carry-coat':
    case 'move-item':
    case 'add-mask':
    case 'span-mask':
    case 'remove-mask':
    case 'choose-blank':
    case 'answer':
    case 'replace-body':
      return null
  }
}

/** An edit in a few words, for undo and for what a screen reader says: "Move", "Passes of coat 4". */
export function editWords(body: SchemeBody, edit: SchemeEdit): string {
  const coat = (id: string) => `coat ${coatsOf(body.stack).findIndex(each => each.id === id) + 1}`
  switch (edit.do) {
    case 'add-coat': return 'Lay a coat'
    case 'take-out-coat': return `Take out ${coat(edit.coatId)}`
    case 'duplicate-coat': return `Lay ${coat(edit.coatId)} again`
    case 'change-coat': return `Change ${coat(edit.coatId)}`
    case 'change-mix': return `Mix of ${coat(edit.coatId)}`
    case 'set-passes': return `Passes of ${coat(edit.coatId)}`
    case 'carry-coat': return `Carry ${coat(edit.coatId)} ${edit.way}`
    case 'move-item': return 'Move'
    case 'add-mask': return `Fit “${edit.mask.name}”`
    case 'change-mask': return `Change ${maskWord(body.masks, edit.maskId)}`
    case 'span-mask': return rowsOfMask(body.stack, edit.maskId).fit < 0 ? `Fit ${maskWord(body.masks, edit.maskId)}` : `Fit ${maskWord(body.masks, edit.maskId)} elsewhere`
    case 'remove-mask': return `Take away ${maskWord(body.masks, edit.maskId)}`
    case 'change-ground': return 'Ground'
    case 'set-eyes': return 'Eyes'
    case 'choose-blank': return 'Another blank'
    case 'answer': return edit.known ? 'Answer a warning' : 'Open a warning again'
    case 'replace-body': return edit.words ?? 'Take over a version'
  }
}
