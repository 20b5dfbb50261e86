import type { Coat } from './coat'
import type { Mask } from './mask'
import type { SchemeBody, StackItem } from './body'
import { laidCoats } from './laid-coats'

/** Either the stack as it would then be, or the reason why that cannot be done, as a sentence. */
export type StackOutcome = { ok: true, stack: StackItem[] } | { ok: false, because: string }

/** Where one mask is fitted and lifted, and the coats laid while it is on. Rows count from the ground, 0 first. */
export interface Bracket {
  mask: Mask
  /** Row of the fit. */
  from: number
  /** Row of the lift. */
  to: number
  /** Coats laid while it is fitted, from the ground up. */
  coatIds: string[]
  /** Column in which the bracket can be drawn: 0 next to the stack, more where brackets overlap. */
  lane: number
}

/** Something in a stack that cannot be done at a bench. */
export interface StackFault {
  kind: 'unknown-mask' | 'fitted-twice' | 'lifted-before-fitted' | 'never-lifted' | 'never-fitted' | 'coat-twice'
  /** Row of the item at fault; absent when nothing in the stack stands for it. */
  row?: number
  maskId?: string
  coatId?: string
  /** What is wrong, as a sentence. */
  sentence: string
}

/** The coats of a stack from the ground up. */
export function coatsOf(stack: readonly StackItem[]): Coat[] {
  return stack.flatMap(item => item.act === 'coat' ? [item.coat] : [])
}

/** Which coat of the stack this is, counted from the ground, 1 first; 0 when it is not in the stack. */
export function coatNumber(stack: readonly StackItem[], coatId: string): number {
  return coatsOf(stack).findIndex(coat => coat.id === coatId) + 1
}

/** Row of a coat, -1 when it is not in the stack. */
export function rowOfCoat(stack: readonly StackItem[], coatId: string): number {
  return stack.findIndex(item => item.act === 'coat' && item.coat.id === coatId)
}

/** Rows of a mask's fit and lift, -1 for what is not there. */
export function rowsOfMask(stack: readonly StackItem[], maskId: string): { fit: number, lift: number } {
  return {
    fit: stack.findIndex(item => item.act === 'fit' && item.maskId === maskId),
    lift: stack.findIndex(item => item.act === 'lift' && item.maskId === maskId),
  }
}

/** What a mask is called in a sentence, quoted so that any name reads well. */
export function maskWord(masks: readonly Mask[], maskId: string): string {
  const mask = masks.find(each => each.id === maskId)
  return mask ? `“${mask.name}”` : 'a mask that is not in this scheme'
}

/** The brackets of a body, in the order of their fits; masks that are never fitted or never lifted have none. */
export function brackets(body: Pick<SchemeBody, 'stack' | 'masks'>): Bracket[] {
  const found: Bracket[] = []
  for (const mask of body.masks) {
    const { fit, lift } = rowsOfMask(body.stack, mask.id)
    if (fit < 0 || lift < fit) continue
    found.push({ mask, from: fit, to: lift, coatIds: coatsOf(body.stack.slice(fit, lift)).map(coat => coat.id), lane: 0 })
  }
  found.sort((a, b) => a.from - b.from)
  // A shorter bracket stands nearer the stack; longer ones go round it.
  const placed: Bracket[] = []
  for (const bracket of [...found].sort((a, b) => (a.to - a.from) - (b.to - b.from) || a.from - b.from)) {
    const taken = new Set(placed.filter(other => other.from < bracket.to && bracket.from < other.to).map(other => other.lane))
    while (taken.has(bracket.lane)) bracket.lane++
    placed.push(bracket)
  }
  return found
}

/** Masks that are on while a coat is laid, in the order they were fitted. */
export function masksOver(body: Pick<SchemeBody, 'stack' | 'masks'>, coatId: string): Mask[] {
  return laidCoats(body).find(laid => laid.coat.id === coatId)?.masks ?? []
}

/** Everything in a stack that could not be done at a bench; empty when all of it can. */
export function stackFaults(body: Pick<SchemeBody, 'stack' | 'masks'>): StackFault[] {
  const faults: StackFault[] = []
  const known = new Set(body.masks.map(mask => mask.id))
  const state = new Map<string, 'on' | 'off'>()
  const coats = new Set<string>()
  body.stack.forEach((item, row) => {
    if (item.act === 'coat') {
      if (coats.has(item.coat.id)) {
        faults.push({ kind: 'coat-twice', row, coatId: item.coat.id, sentence: `The coat at row ${row + 1} is in the stack twice.` })
      }
      coats.add(item.coat.id)
      return
    }
    const { maskId } = item
    const word = maskWord(body.masks, maskId)
    if (!known.has(maskId)) {
      faults.push({ kind: 'unknown-mask', row, maskId, sentence: `Row ${row + 1} names ${word}.` })
      return
    }
    if (item.act === 'fit') {
      if (state.has(maskId)) faults.push({ kind: 'fitted-twice', row, maskId, sentence: `${word} is fitted twice. Fit a copy of it instead: a second fitting never lies alike.` })
      state.set(maskId, 'on')
      return
    }
    if (state.get(maskId) !== 'on') faults.push({ kind: 'lifted-before-fitted', row, maskId, sentence: `${word} is lifted before it is fitted.` })
    state.set(maskId, 'off')
  })
  for (const mask of body.masks) {
    const at = state.get(mask.id)
    const word = maskWord(body.masks, mask.id)
    if (at === undefined) faults.push({ kind: 'never-fitted', maskId: mask.id, sentence: `${word} is never fitted.` })
    if (at === 'on') faults.push({ kind: 'never-lifted', maskId: mask.id, sentence: `${word} is fitted and never lifted.` })
  }
  return faults
}

/**
 * Takes the item at row `from` and sets it down so that it stands at row `to`.
 * Refuses what would lift a mask before it is fitted; nothing else is moved along.
 */
export function moveItem(body: Pick<SchemeBody, 'stack' | 'masks'>, from: number, to: number): StackOutcome {
  const item = body.stack[from]
  if (!item) return { ok: false, because: `There is nothing at row ${from + 1}.` }
  if (!Number.isInteger(to) || to < 0) return { ok: false, because: 'Nothing can lie below the ground.' }
  if (to >= body.stack.length) return { ok: false, because: 'It is on top already: nothing lies above it.' }
  const stack = body.stack.toSpliced(from, 1).toSpliced(to, 0, item)
  if (item.act !== 'coat') {
    const { fit, lift } = rowsOfMask(stack, item.maskId)
    if (fit >= 0 && lift >= 0 && lift < fit) {
      const word = maskWord(body.masks, item.maskId)
      return {
        ok: false,
        because: item.act === 'fit' ? `${word} cannot be fitted after it is lifted. Carry its lift up first.` : `${word} cannot be lifted before it is fitted. Carry its fit down first.`,
      }
    }
  }
  return { ok: true, stack }
}

/** Carries a coat one row away from the ground (`up`) or toward it (`down`), past a coat or into and out of a mask's bracket. */
export function carryCoat(body: Pick<SchemeBody, 'stack' | 'masks'>, coatId: string, way: 'up' | 'down'): StackOutcome {
  const row = rowOfCoat(body.stack, coatId)
  if (row < 0) return { ok: false, because: 'That coat is not in this scheme.' }
  if (way === 'down' && row === 0) return { ok: false, because: 'It lies on the ground already: nothing is below it.' }
  if (way === 'up' && row === body.stack.length - 1) return { ok: false, because: 'It is on top already: nothing lies above it.' }
  return moveItem(body, row, way === 'up' ? row + 1 : row - 1)
}
