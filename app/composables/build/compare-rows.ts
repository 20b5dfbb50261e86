import { coatTitle } from './film-rows'
import type { SchemeBody } from '#shared/scheme/body'
import { countWords } from '#shared/scheme/coat-words'
import type { Coat } from '#shared/scheme/coat'
import { diffBodies, type SchemeDiff } from '#shared/scheme/diff'
import { changedFields, type TwoVersions } from '#shared/scheme/diff-words'
import { coatsOf } from '#shared/scheme/stack-order'

/** What became of a coat between two versions. */
export type CoatFate = 'same' | 'changed' | 'moved' | 'added' | 'taken out'

/** A coat in one of two stacks. */
export interface ComparedCoat { coat: Coat, title: string, number: number, fate: CoatFate, /** "2 to 3 passes", "moved". */ words: string }

/** A coat that is in both, by its places from the top. */
export interface CompareLink { coatId: string, from: number, to: number, fate: CoatFate, words: string }

/** Two stacks from the top down, and what links them. */
export interface Comparison { diff: SchemeDiff, from: ComparedCoat[], to: ComparedCoat[], links: CompareLink[] }

function changeWords(change: SchemeDiff['changed'][number], two: TwoVersions): string {
  const only = change.fields.length === 1 ? change.fields[0] : undefined
  if (only === 'passes') return `${change.from.passes} to ${countWords(change.to.passes, 'pass', 'passes')}`
  const [first] = changedFields(change, two)
  if (only && first) return first.field === 'Name' ? 'another name' : first.field === 'Note' ? 'another note' : `another ${first.field.toLowerCase()}`
  return `${change.fields.length} settings`
}

/** Lays two versions side by side. */
export function comparison(two: TwoVersions): Comparison {
  const diff = diffBodies(two.from.body, two.to.body)
  const moved = new Set(diff.moved.map(move => move.coatId))
  const changed = new Map(diff.changed.map(change => [change.coatId, changeWords(change, two)]))
  const gone = new Set(diff.takenOut.map(coat => coat.id))
  const added = new Set(diff.added.map(coat => coat.id))
  const fateOf = (id: string): { fate: CoatFate, words: string } => {
    if (gone.has(id)) return { fate: 'taken out', words: 'taken out' }
    if (added.has(id)) return { fate: 'added', words: 'added' }
    const change = changed.get(id)
    if (change) return { fate: 'changed', words: moved.has(id) ? `moved, ${change}` : change }
    return moved.has(id) ? { fate: 'moved', words: 'moved' } : { fate: 'same', words: '' }
  }
  const side = (body: SchemeBody, paints: TwoVersions['from']['materials']['paints']) => coatsOf(body.stack)
    .map((coat, i): ComparedCoat => ({ coat, title: coatTitle(coat, paints), number: i + 1, ...fateOf(coat.id) })).reverse()
  const from = side(two.from.body, two.from.materials.paints)
  const to = side(two.to.body, two.to.materials.paints)
  const links = from.flatMap(({ coat, fate, words }, place): CompareLink[] => {
    const there = to.findIndex(other => other.coat.id === coat.id)
    return there < 0 ? [] : [{ coatId: coat.id, from: place, to: there, fate, words }]
  })
  return { diff, from, to, links }
}

/** What one does with the list of it: "1 taken out, 1 added, 2 moved, 2 changed, 8 as they were". */
export function comparisonWords({ diff, links }: Comparison): string {
  const same = links.filter(link => link.fate === 'same').length
  const masks = diff.masksAdded.length + diff.masksTakenOut.length + diff.masksChanged.length + diff.masksSpanned.length
  const parts = [
    [diff.takenOut.length, 'taken out'], [diff.added.length, 'added'], [diff.moved.length, 'moved'], [diff.changed.length, 'changed'], [same, 'as they were'],
  ] as const
  const coats = parts.filter(([count]) => count > 0).map(([count, word]) => `${count} ${word}`)
  return `Coats: ${coats.join(', ') || 'none'}.${masks > 0 ? ` ${countWords(masks, 'mask')} otherwise.` : ''}`
}
