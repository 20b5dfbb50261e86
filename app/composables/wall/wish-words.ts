import type { SchemeStand, WallWish } from '#shared/scheme/wall/wall-wish'

/** Where a scheme stands, as it is chosen and said. */
export const STAND_WORDS: Readonly<Record<SchemeStand, string>> = {
  draft: 'never published',
  ahead: 'draft ahead of its revision',
  published: 'published as it stands',
  bench: 'on the bench',
  away: 'put away',
}

/** What is looked for of what words and outlines do not say. */
export type NarrowKey = 'near' | 'fish' | 'stands' | 'personId'

/** One thing the wall is narrowed by, in words. */
export interface NarrowedBy { key: NarrowKey, words: string }

/** What a wish narrows the wall by, in words; `personName` knows who is who. */
export function narrowedBy(wish: WallWish, personName: (id: string) => string | undefined): NarrowedBy[] {
  return [
    ...wish.near ? [{ key: 'near', words: `near ${wish.near}` } as const] : [],
    ...wish.fish ? [{ key: 'fish', words: wish.fish } as const] : [],
    ...wish.stands ? [{ key: 'stands', words: STAND_WORDS[wish.stands] } as const] : [],
    ...wish.personId ? [{ key: 'personId', words: `saved by ${personName(wish.personId) ?? 'somebody who left'}` } as const] : [],
  ]
}

/** Whether anything is looked for at all. */
export function isLooking(wish: WallWish): boolean {
  return wish.words.trim() !== '' || [wish.near, wish.fish, wish.stands, wish.personId, wish.blankId, wish.paintId].some(value => value !== undefined && value !== '')
}

/** Whether two wishes ask for the same. */
export function sameWish(one: WallWish, other: WallWish): boolean {
  return (['words', 'near', 'fish', 'stands', 'personId', 'blankId', 'paintId'] as const).every(key => (one[key] || undefined) === (other[key] || undefined))
}
