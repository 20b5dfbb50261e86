import { z } from 'zod'

export const SEARCH_NAME_MAX = 40
/** Searches one person keeps in one workshop. */
export const SAVED_SEARCHES_MAX = 24

/** Where a scheme stands: never published, a draft ahead of its newest revision, published and unchanged since, in a run that goes on, put away. */
export const SCHEME_STANDS = ['draft', 'ahead', 'published', 'bench', 'away'] as const
export type SchemeStand = typeof SCHEME_STANDS[number]

/** What one looks for on the wall: whatever is given must all be so. */
export const WallWish = z.object({
  /** Words in the name, the fish or the blank; for those who read recipes also in the coats. */
  words: z.string().trim().max(120).default(''),
  /** A fish, written as the schemes write it. */
  fish: z.string().max(80).optional(),
  blankId: z.uuid().optional(),
  /** A paint that is used in the draft. */
  paintId: z.uuid().optional(),
  stands: z.enum(SCHEME_STANDS).optional(),
  /** Who saved the draft last. */
  personId: z.uuid().optional(),
  /** A colour as it is typed: nearest first, by the zone of each scheme that comes nearest. */
  near: z.string().trim().max(80).optional(),
  /** With those that were put away; `stands: 'away'` shows these alone. */
  retired: z.enum(['with', 'without']).default('without'),
})
export type WallWish = z.output<typeof WallWish>

/** A search under a name. */
export const SearchToSave = z.object({
  name: z.string().trim().min(1, 'A search needs a name.').max(SEARCH_NAME_MAX, `A name has at most ${SEARCH_NAME_MAX} characters.`),
  wish: WallWish,
})
export type SearchToSave = z.output<typeof SearchToSave>

/** A search its person kept. */
export const SavedSearchView = z.object({ id: z.uuid(), name: z.string(), wish: WallWish })
export type SavedSearchView = z.output<typeof SavedSearchView>

/** Which kept search, from its address. */
export const SearchParams = z.object({ searchId: z.uuid() })
export type SearchParams = z.output<typeof SearchParams>

/** What there is to choose from on the wall: fish that stand on schemes, people who saved one. */
export const WallChoices = z.object({ fish: z.array(z.string()), people: z.array(z.object({ id: z.uuid(), name: z.string() })) })
export type WallChoices = z.output<typeof WallChoices>

/** Schemes put away at once. */
export const PUT_AWAY_MAX = 200

/** Schemes chosen on the wall, and whether to put them away or bring them back. */
export const PutAway = z.object({ ids: z.array(z.uuid()).min(1, 'Choose a scheme first.').max(PUT_AWAY_MAX, `At most ${PUT_AWAY_MAX} schemes at once.`), away: z.boolean() })
export type PutAway = z.output<typeof PutAway>

/** Why one of the chosen stayed as it was. */
export const StayReason = z.enum(['gone', 'bench', 'already'])
export type StayReason = z.output<typeof StayReason>

/** What became of each of the chosen. */
export const PutAwayView = z.object({
  done: z.array(z.object({ id: z.uuid(), name: z.string() })),
  stayed: z.array(z.object({ id: z.uuid(), name: z.string().nullable(), why: StayReason })),
})
export type PutAwayView = z.output<typeof PutAwayView>

/** How near a scheme comes to a wanted colour: by its nearest zone, CIEDE2000. */
export const NearView = z.object({ zone: z.string(), label: z.string(), distance: z.number() })
export type NearView = z.output<typeof NearView>
