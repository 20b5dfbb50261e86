import type { CardDraft } from './card'

/** A line of a card that two people changed to different things. */
export type Clash = keyof CardDraft

/** Two people's changes of one card, brought together. */
export interface Merged {
  /** Every change of either; where they clash, mine. */
  draft: CardDraft
  /** Lines both changed, each to something else: somebody has to choose. */
  clashes: Clash[]
  /** Lines only the other changed. */
  theirs: Clash[]
}

const LINES = ['title', 'words', 'fish', 'sizes', 'price', 'leadTime', 'photoIds', 'showsChips'] as const satisfies readonly Clash[]

/** Brings what I changed and what was saved meanwhile together, line by line, from what both started from. */
export function mergeDrafts(base: CardDraft, mine: CardDraft, saved: CardDraft): Merged {
  const changed = (draft: CardDraft) => LINES.filter(line => !sameLine(line, base, draft))
  const iChanged = new Set<Clash>(changed(mine))
  const theyChanged = changed(saved)
  const theirs = theyChanged.filter(line => !iChanged.has(line))
  return {
    draft: theirs.reduce((draft, line) => withLine(draft, line, saved), mine),
    clashes: theyChanged.filter(line => iChanged.has(line) && !sameLine(line, mine, saved)),
    theirs,
  }
}

/** A draft with one line taken from another. */
export function withLine(draft: CardDraft, line: Clash, from: CardDraft): CardDraft {
  return { ...draft, [line]: from[line] }
}

/** Whether two drafts say the same on every line. */
export function sameDraft(a: CardDraft, b: CardDraft): boolean {
  return LINES.every(line => sameLine(line, a, b))
}

/** What a person writes on a card, and nothing else of it. */
export function draftOf({ title, words, fish, sizes, price, leadTime, photoIds, showsChips }: CardDraft): CardDraft {
  return { title, words, fish, sizes, price, leadTime, photoIds: [...photoIds], showsChips }
}

/** What is typed counts as it is kept: without blank space at its ends. */
function sameLine(line: Clash, a: CardDraft, b: CardDraft): boolean {
  return JSON.stringify(trimmed(a[line])) === JSON.stringify(trimmed(b[line]))
}

const trimmed = (value: CardDraft[Clash]) => typeof value === 'string' ? value.trim() : value
