import { z } from 'zod'

export const BOTTLE_CODE_MAX = 64
export const LOT_MAX = 60
export const BOTTLE_ML_MAX = 100_000

/** Sealed as bought, open, or no longer used; an empty bottle is an open one with nothing left. */
export const BOTTLE_STATES = ['sealed', 'open', 'retired'] as const
export const BottleState = z.enum(BOTTLE_STATES)
export type BottleState = z.output<typeof BottleState>

/** What is scanned or read off a bottle: printable, without spaces round it. */
export const BottleCode = z.string().trim().min(1).max(BOTTLE_CODE_MAX).regex(/^[\x21-\x7E]+(?: [\x21-\x7E]+)*$/, 'A code is letters, digits and signs.')

/** What a person writes about a bottle. */
export const BottleDraft = z.object({
  /** What stands on its label to be scanned; absent: the shelf gives it one. */
  code: BottleCode.optional(),
  /** The maker's batch, as printed on it. */
  lot: z.string().trim().max(LOT_MAX).default(''),
  /** What is in it now, mL. */
  ml: z.number().min(0).max(BOTTLE_ML_MAX),
  state: BottleState.default('open'),
  /** The day it was opened, as a date; absent while it is sealed or not known. */
  openedOn: z.iso.date().nullable().default(null),
})
export type BottleDraft = z.output<typeof BottleDraft>

/** A bottle as it travels to those who may read the shelf. */
export const BottleView = z.object({
  id: z.uuid(),
  paintId: z.uuid(),
  code: z.string(),
  lot: z.string(),
  /** What is left in it, mL: what was in it when somebody last looked, less what runs took since. */
  ml: z.number(),
  state: BottleState,
  openedOn: z.iso.date().nullable(),
  version: z.number().int(),
})
export type BottleView = z.output<typeof BottleView>

/** A bottle that was found by its code, with the name of what is in it. */
export const BottleFound = BottleView.extend({ paintName: z.string() })
export type BottleFound = z.output<typeof BottleFound>

export const BottleParams = z.object({ bottleId: z.uuid() })
/** What was scanned, or every bottle in use. */
export const BottleQuery = z.object({ code: BottleCode.optional() })
export type BottleQuery = z.output<typeof BottleQuery>

/** A bottle in a few words: "lot K-204, 31 mL left". */
export function bottleWords(bottle: Pick<BottleView, 'code' | 'lot' | 'ml'>): string {
  return `${bottle.lot === '' ? `bottle ${bottle.code}` : `lot ${bottle.lot}`}, ${Math.round(bottle.ml)} mL left`
}

/** Which of a paint's bottles is taken when nobody says: an open one before a sealed one, the one opened first, then by code; undefined when all are empty or retired. */
export function bottleAtHand<B extends Pick<BottleView, 'code' | 'ml' | 'state' | 'openedOn'>>(bottles: readonly B[]): B | undefined {
  const rank = (bottle: B) => `${bottle.state === 'open' ? 0 : 1} ${bottle.openedOn ?? '9999'} ${bottle.code}`
  return bottles.filter(bottle => bottle.state !== 'retired' && bottle.ml > 0).toSorted((a, b) => rank(a) < rank(b) ? -1 : 1)[0]
}
