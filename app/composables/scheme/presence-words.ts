import type { SchemeBody } from '#shared/scheme/body'
import type { OtherHere } from '#shared/scheme/presence'
import { coatNumber } from '#shared/scheme/stack-order'

/** Somebody in a draft as a line shows them: "Ann is here, on coat 4". */
export interface HereLine { key: string, words: string }

/** Who else has a draft open, one line a person; a coat that is not on this page yet goes unnamed. */
export function hereLines(others: readonly OtherHere[], body: Pick<SchemeBody, 'stack'>, ownId: string | undefined): HereLine[] {
  const persons = new Map<string, OtherHere[]>()
  for (const other of others) persons.set(other.person.id, [...persons.get(other.person.id) ?? [], other])
  return [...persons.values()].flatMap(([first, ...more]) => {
    if (!first) return []
    const numbers = [...new Set([first, ...more].map(({ coatId }) => coatId === null ? 0 : coatNumber(body.stack, coatId)))].filter(number => number > 0).sort((a, b) => a - b)
    const on = numbers.length === 0 ? '' : `, on ${numbers.length === 1 ? 'coat' : 'coats'} ${numbers.join(' and ')}`
    const who = first.person.id === ownId ? 'You have it open elsewhere too' : `${first.person.name} is here`
    return [{ key: first.person.id, words: `${who}${on}` }]
  })
}
