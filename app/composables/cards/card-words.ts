import type { CardState, CardView } from '#shared/cards/card'
import type { Clash } from '#shared/cards/merge-drafts'
import type { IconName } from '~/components/ui/icons'
import { dayWords } from '~/composables/people/when-words'

/** What a card's lines are called, on the form and when two people changed one. */
export const LINE_WORDS: Readonly<Record<Clash, string>> = {
  title: 'Title', words: 'Words', fish: 'Fish', sizes: 'Sizes', price: 'Price', leadTime: 'Ready', photoIds: 'Photos', showsChips: 'Colours',
}

const DRAWINGS: Readonly<Record<CardState, IconName>> = { 'not shared': 'private', 'shared': 'link', 'revoked': 'leave' }

/** Whether a customer can see the card, with the day and a drawing. */
export function stateWords({ state, sharedAt, revokedAt }: Pick<CardView, 'state' | 'sharedAt' | 'revokedAt'>): { words: string, icon: IconName } {
  const icon = DRAWINGS[state]
  switch (state) {
    case 'not shared': return { icon, words: 'Not shared' }
    case 'shared': return { icon, words: sharedAt ? `Shared since ${dayWords(sharedAt)}` : 'Shared' }
    case 'revoked': return { icon, words: revokedAt ? `Revoked on ${dayWords(revokedAt)}` : 'Revoked' }
    default: return state satisfies never
  }
}

/** A letter with the card's link in it, for the mail program of whoever sends it. */
export function letterTo(card: Pick<CardView, 'title' | 'workshop'>, link: string): string {
  return `mailto:?subject=${encodeURIComponent(`${card.title}, ${card.workshop}`)}&body=${encodeURIComponent(`${card.title}\n${link}\n\n${card.workshop}`)}`
}

/** A leading figure and what follows it, as in "90 mm"; null for words alone. */
export function figureIn(text: string): { figure: string, rest: string } | null {
  const [, figure, rest] = /^(\d+(?:[.,]\d+)*)(.*)$/s.exec(text) ?? []
  return figure === undefined ? null : { figure, rest: rest ?? '' }
}

/** What a photo shows, without the names that stand above it already: "Perch in bars on Shad 80, left side" is "left side". */
export function viewWords(alt: string, title: string, blank: string): string {
  const bare = [title, 'on', blank].reduce((rest, known) => known !== '' && rest.toLowerCase().startsWith(known.toLowerCase()) ? rest.slice(known.length).replace(/^[\s,.:]+/, '') : rest, alt.trim())
  return bare || alt.trim()
}
