import type { SchemeBody } from './body'
import type { Coat } from './coat'
import type { SchemeDiff } from './diff'
import type { Mask } from './mask'
import type { Materials } from './materials'
import { coatWord } from './publishable'
import { countWords, gunWords, listWords, marksWords, mixWords, restWords, toolWords, whereWords } from './coat-words'
import { coatNumber, maskWord } from './stack-order'

/** One field of a coat before and after, in words. */
export interface FieldWords { field: string, before: string, after: string }

/** Two versions with what each is made with. */
export interface TwoVersions {
  from: { body: SchemeBody, materials: Pick<Materials, 'paints'> }
  to: { body: SchemeBody, materials: Pick<Materials, 'paints'> }
}

function fieldWord(coat: Coat, field: keyof Coat, materials: Pick<Materials, 'paints'>): { field: string, words: string } {
  switch (field) {
    case 'id': return { field: 'Coat', words: coat.id }
    case 'name': return { field: 'Name', words: coat.name === '' ? 'none' : `“${coat.name}”` }
    case 'mix': return { field: 'Mix', words: mixWords(coat.mix, materials) }
    case 'tool': return { field: 'Tool', words: toolWords(coat.tool) }
    case 'gun': return { field: 'Aim', words: gunWords(coat.gun) }
    case 'where': return { field: 'Where', words: whereWords(coat.where) }
    case 'marks': return { field: 'By hand', words: marksWords(coat.marks) || 'nothing' }
    case 'passes': return { field: 'Passes', words: String(coat.passes) }
    case 'rest': return { field: 'Rest', words: restWords({ rest: coat.rest, heatSet: null }) }
    case 'heatSet': return { field: 'Heat-set', words: coat.heatSet ? `${coat.heatSet.seconds} s at ${coat.heatSet.distance} cm` : 'none' }
    case 'laidFrom': return { field: 'Build-up', words: coat.laidFrom ? `edition ${coat.laidFrom.edition}` : 'none' }
    case 'note': return { field: 'Note', words: coat.note === '' ? 'none' : coat.note }
  }
}

/** The fields of a changed coat, each before and after. Where words are alike though the field differs, the after says so. */
export function changedFields(change: SchemeDiff['changed'][number], { from, to }: TwoVersions): FieldWords[] {
  return change.fields.map((field) => {
    const before = fieldWord(change.from, field, from.materials)
    const after = fieldWord(change.to, field, to.materials)
    return { field: before.field, before: before.words, after: before.words === after.words ? `${after.words} (drawn otherwise)` : after.words }
  })
}

function maskFieldWord(field: keyof Mask): string {
  switch (field) {
    case 'name': return 'name'
    case 'form': return 'form'
    case 'seed': return 'fitting'
    case 'fromMaskId': return 'origin'
    case 'id': return 'id'
  }
}

const numbers = (ids: readonly string[], body: SchemeBody) => ids.length === 0 ? 'no coat of both' : `${ids.length === 1 ? 'coat' : 'coats'} ${listWords(ids.map(id => String(coatNumber(body.stack, id))))}`

/** A difference as sentences, in the order in which one would do it at the bench. */
export function diffSentences(diff: SchemeDiff, two: TwoVersions): string[] {
  const { from, to } = two
  const word = (body: SchemeBody, coat: Coat) => coatWord(body, coat).replace(/,$/, '')
  return [
    ...diff.blankId ? ['It is painted on another blank.'] : [],
    ...diff.ground ? [diff.ground.from.name === diff.ground.to.name ? `The ground “${diff.ground.to.name}” is another colour or finish.` : `The ground is “${diff.ground.to.name}” instead of “${diff.ground.from.name}”.`] : [],
    ...diff.eyes ? [diff.eyes.from === null ? 'It has eyes now.' : diff.eyes.to === null ? 'It has no eyes now.' : 'The eyes have other colours.'] : [],
    ...diff.takenOut.map(coat => `${word(from.body, coat)} is taken out.`),
    ...diff.added.map(coat => `${word(to.body, coat)} is new.`),
    ...diff.moved.map(move => `Coat ${move.from} is now coat ${move.to}.`),
    ...diff.changed.map((change) => {
      const fields = changedFields(change, two).map(({ field, before, after }) => `${field.toLowerCase()} ${before} → ${after}`)
      return `${word(to.body, change.to)}: ${fields.join('; ')}.`
    }),
    ...diff.masksTakenOut.map(mask => `${maskWord([mask], mask.id)} is no longer fitted.`),
    ...diff.masksAdded.map(mask => `${maskWord([mask], mask.id)} is fitted.`),
    ...diff.masksChanged.map(change => `${maskWord([change.to], change.maskId)} has another ${listWords(change.fields.map(maskFieldWord))}.`),
    ...diff.masksSpanned.map(span => `${maskWord(to.body.masks, span.maskId)} is on for ${numbers(span.to, to.body)} instead of ${numbers(span.from, from.body)}.`),
    ...diff.answered ? [`Of the second look’s warnings ${diff.answered.to.length} ${diff.answered.to.length === 1 ? 'is' : 'are'} answered instead of ${diff.answered.from.length}.`] : [],
  ]
}

/** A difference in a few words: "2 coats changed, 1 new"; "nothing" when there is none. */
export function diffSummary(diff: SchemeDiff): string {
  const masks = new Set([...diff.masksAdded, ...diff.masksTakenOut].map(mask => mask.id).concat(diff.masksChanged.map(each => each.maskId), diff.masksSpanned.map(each => each.maskId)))
  const parts = [
    ...diff.changed.length > 0 ? [`${countWords(diff.changed.length, 'coat')} changed`] : [],
    ...diff.added.length > 0 ? [`${diff.added.length} new`] : [],
    ...diff.takenOut.length > 0 ? [`${diff.takenOut.length} taken out`] : [],
    ...diff.moved.length > 0 ? [`${diff.moved.length} moved`] : [],
    ...masks.size > 0 ? [countWords(masks.size, 'mask')] : [],
    ...[diff.answered && 'answers', diff.ground && 'ground', diff.eyes && 'eyes', diff.blankId && 'blank'].filter(part => typeof part === 'string'),
  ]
  return parts.length === 0 ? 'nothing' : parts.join(', ')
}
