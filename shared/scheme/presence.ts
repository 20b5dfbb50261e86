import { z } from 'zod'
import { Painter } from './scheme-view'

/** How often somebody who has a draft open says so, ms. */
export const HERE_EVERY_MS = 10_000
/** After so long without a word somebody counts as gone, ms; a page that is closed says so at once. */
export const GONE_AFTER_MS = 25_000

/** Somebody has a draft open: in which tab, and which coat they have in hand. */
export const HereBeat = z.object({ tab: z.uuid(), coatId: z.uuid().nullable().default(null) })
export type HereBeat = z.output<typeof HereBeat>

/** Which tab follows a draft. */
export const FollowQuery = z.object({ tab: z.uuid() })
export type FollowQuery = z.output<typeof FollowQuery>

/** Somebody else, or oneself in another tab, who has the draft open now. */
export const OtherHere = z.object({ tab: z.uuid(), person: Painter, coatId: z.uuid().nullable() })
export type OtherHere = z.output<typeof OtherHere>

/** What one who has a draft open hears: its version as the server has it, and who else is here. */
export const DraftLiveView = z.object({ version: z.number().int(), others: z.array(OtherHere) })
export type DraftLiveView = z.output<typeof DraftLiveView>
