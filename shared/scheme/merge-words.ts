import type { SchemeBody } from './body'
import type { Coat } from './coat'
import { coatLine, countWords, mixWords } from './coat-words'
import { diffBodies, isEmptyDiff, type SchemeDiff } from './diff'
import { changedFields, diffSentences } from './diff-words'
import type { Mask, MaskForm } from './mask'
import type { Materials } from './materials'
import type { Clash } from './merge-bodies'
import type { ThreeBodies } from './merge-order'
import { coatsOf, maskWord } from './stack-order'

/** A clash as a person reads it: what it is about, how it was, and what each side made of it. */
export interface ClashWords { about: string, before: string, mine: string[], theirs: string[] }

/** Both versions with how they began, null when that is not known, and paints to name. */
export interface ClashGround extends Omit<ThreeBodies, 'base'> { base: SchemeBody | null, materials: Pick<Materials, 'paints'> }

function coatTitle(body: SchemeBody, coat: Coat): string {
  const number = coatsOf(body.stack).findIndex(each => each.id === coat.id) + 1
  return `Coat ${number}${coat.name === '' ? '' : `, “${coat.name}”`}`
}

function formWords(form: MaskForm): string {
  switch (form.kind) {
    case 'mesh': return `${form.weave} mesh, ${form.pitch} mm pitch, ${form.thread} mm thread, turned ${form.angle}°, stretched × ${form.stretch}, ${form.lift} mm off the flank`
    case 'stencil':
    case 'tape': return `${form.kind} of ${countWords(form.outlines.length, 'outline')} that ${form.does === 'opens' ? 'lets paint through' : 'keeps paint off'}, edge soft by ${form.soft} mm`
  }
}

const NOTHING_OF_ITS_OWN = 'as before, carried elsewhere'

function coatSide(coat: Coat | null, was: Coat | null, body: SchemeBody, { base, materials }: ClashGround): string[] {
  if (coat === null) return ['taken out']
  if (!base || was === null) return [mixWords(coat.mix, materials), coatLine(body, coat)]
  const change = diffBodies(base, body).changed.find(each => each.coatId === coat.id)
  if (!change) return [NOTHING_OF_ITS_OWN]
  return changedFields(change, { from: { body: base, materials }, to: { body, materials } }).map(({ field, after }) => `${field}: ${after}`)
}

function maskSide(mask: Mask | null, was: Mask | null): string[] {
  if (mask === null) return ['taken away']
  const form = formWords(mask.form)
  const lines = [
    ...was?.name === mask.name ? [] : [`named “${mask.name}”`],
    ...was && formWords(was.form) === form ? was.form === mask.form ? [] : [`${form} (drawn otherwise)`] : [form],
  ]
  return lines.length > 0 ? lines : [NOTHING_OF_ITS_OWN]
}

const ORDER_ONLY: Partial<SchemeDiff> = { blankId: null, ground: null, eyes: null, changed: [], masksChanged: [], answered: null }

/** What a version did to the order, as sentences. */
function orderSide(body: SchemeBody, { base, materials }: ClashGround): string[] {
  if (!base) return []
  const diff = { ...diffBodies(base, body), ...ORDER_ONLY }
  const said = diffSentences(diff, { from: { body: base, materials }, to: { body, materials } })
  return said.length > 0 ? said : ['fits or lifts in another order']
}

function coatBefore(was: Coat | null, { base, materials }: ClashGround): string {
  return base && was ? `${mixWords(was.mix, materials)}; ${coatLine(base, was)}` : 'not there before'
}

/** A clash in words, for the choice between its two sides. */
export function clashWords(clash: Clash, ground: ClashGround): ClashWords {
  const { base, mine, theirs, materials } = ground
  switch (clash.part) {
    case 'coat': {
      const [body, coat] = clash.base && base ? [base, clash.base] : clash.mine ? [mine, clash.mine] : [theirs, clash.theirs]
      return {
        about: coat ? coatTitle(body, coat) : 'A coat',
        before: coatBefore(clash.base, ground),
        mine: coatSide(clash.mine, clash.base, mine, ground),
        theirs: coatSide(clash.theirs, clash.base, theirs, ground),
      }
    }
    case 'mask': {
      const mask = clash.base ?? clash.mine ?? clash.theirs
      return {
        about: mask ? `Mask ${maskWord([mask], mask.id)}` : 'A mask',
        before: clash.base ? formWords(clash.base.form) : 'not there before',
        mine: maskSide(clash.mine, clash.base),
        theirs: maskSide(clash.theirs, clash.base),
      }
    }
    case 'ground': {
      const words = ({ name, finish }: typeof clash.mine) => `“${name}”, ${finish}`
      return { about: 'The ground', before: words(clash.base), mine: [words(clash.mine)], theirs: [words(clash.theirs)] }
    }
    case 'eyes': {
      const words = (eyes: typeof clash.mine, other: typeof clash.mine) => eyes === null ? 'no eyes' : other === null ? 'eyes' : 'eyes in these colours'
      return { about: 'The eyes', before: words(clash.base, null), mine: [words(clash.mine, clash.theirs)], theirs: [words(clash.theirs, clash.mine)] }
    }
    case 'blank':
      return { about: 'The blank', before: 'another blank', mine: ['the blank you chose'], theirs: ['the blank they chose'] }
    case 'order':
      return { about: 'The order of coats and masks', before: 'as it was', mine: orderSide(mine, ground), theirs: orderSide(theirs, ground) }
    case 'whole': {
      const differ = diffSentences(diffBodies(theirs, mine), { from: { body: theirs, materials }, to: { body: mine, materials } })
      return { about: 'The whole draft', before: 'not known on this device', mine: differ, theirs: ['as it was saved'] }
    }
  }
}

/** What came in from somebody else, as sentences; none when nothing did. */
export function takenInWords(mine: SchemeBody, merged: SchemeBody, materials: Pick<Materials, 'paints'>): string[] {
  const diff = diffBodies(mine, merged)
  return isEmptyDiff(diff) ? [] : diffSentences(diff, { from: { body: mine, materials }, to: { body: merged, materials } })
}
