import { z } from 'zod'
import { SchemeBody } from './body'
import { WallWish } from './wall/wall-wish'

export const SCHEME_NAME_MAX = 80
export const FISH_MAX = 80
export const REVISION_NOTE_MAX = 500
export const SCHEMES_PAGE_MAX = 60

const Name = z.string().trim().min(1, 'A scheme needs a name.').max(SCHEME_NAME_MAX, `A name has at most ${SCHEME_NAME_MAX} characters.`)
const Fish = z.string().trim().max(FISH_MAX, `A fish has at most ${FISH_MAX} characters.`)

/** Which scheme, from its address. */
export const SchemeParams = z.object({ schemeId: z.uuid() })
export type SchemeParams = z.output<typeof SchemeParams>

/** Which revision of which scheme, from its address. */
export const RevisionParams = SchemeParams.extend({ number: z.coerce.number().int().min(1).max(2 ** 31 - 1) })
export type RevisionParams = z.output<typeof RevisionParams>

/** What starts a scheme. Without a body it starts with a good ground and, when the shelf has one, a white base coat. */
export const SchemeStart = z.object({
  name: Name,
  fish: Fish.default(''),
  blankId: z.uuid(),
  body: SchemeBody.optional(),
})
export type SchemeStart = z.output<typeof SchemeStart>

/** Another name or fish; taking a scheme out of the lists, or back into them. */
export const SchemeChange = z.object({ name: Name.optional(), fish: Fish.optional(), retired: z.boolean().optional() })
export type SchemeChange = z.output<typeof SchemeChange>

/** A draft as it is saved; the version it was made from travels as `If-Match`. */
export const DraftSave = z.object({ body: SchemeBody })
export type DraftSave = z.output<typeof DraftSave>

/** What freezes a draft; the version of the draft one is looking at travels as `If-Match`. */
export const Publish = z.object({
  note: z.string().trim().max(REVISION_NOTE_MAX, `A note has at most ${REVISION_NOTE_MAX} characters.`).default(''),
})
export type Publish = z.output<typeof Publish>

/** Which revision becomes the draft again. */
export const Restore = z.object({ number: z.number().int().min(1).max(2 ** 31 - 1) })
export type Restore = z.output<typeof Restore>

/** What starts a colourway: from a revision, or from the draft when none is named. */
export const Fork = z.object({ name: Name, fish: Fish.optional(), number: z.number().int().min(1).max(2 ** 31 - 1).optional() })
export type Fork = z.output<typeof Fork>

/** What one looks for in the list, and which page of it. */
export const SchemeQuery = WallWish.extend({
  after: z.string().max(200).optional(),
  limit: z.coerce.number().int().min(1).max(SCHEMES_PAGE_MAX).default(24),
})
export type SchemeQuery = z.output<typeof SchemeQuery>

/** Which two versions to compare; `draft` is the working copy. The second is of `other` where another scheme is named. */
const Side = z.union([z.literal('draft'), z.coerce.number().int().min(1).max(2 ** 31 - 1)])
export const CompareQuery = z.object({ from: Side, to: Side.default('draft'), other: z.uuid().optional() })
export type CompareQuery = z.output<typeof CompareQuery>

/** Which blank the materials are wanted for; the draft's own when none is named. */
export const MaterialsQuery = z.object({ blankId: z.uuid().optional() })
export type MaterialsQuery = z.output<typeof MaterialsQuery>

/** Widest picture the server draws on request, px. */
export const PICTURE_WIDTH_MAX = 1600

/** How a picture of a scheme is wanted. */
export const PictureQuery = z.object({
  width: z.coerce.number().int().min(32).max(PICTURE_WIDTH_MAX).default(640),
  /** Half the width when absent. */
  height: z.coerce.number().int().min(32).max(PICTURE_WIDTH_MAX).optional(),
  /** A revision's number; the draft when absent (the newest revision for the front desk). */
  revision: z.coerce.number().int().min(1).max(2 ** 31 - 1).optional(),
  /** Only so far up: a coat's id, or the bare ground. Never for the front desk. */
  upTo: z.union([z.uuid(), z.literal('ground')]).optional(),
  /** With the clear coats on. */
  clear: z.stringbool().default(true),
  roll: z.coerce.number().min(0).max(360).default(0),
  /** With the nose to the right, roll 180 shows the right flank upright. */
  nose: z.enum(['left', 'right']).default('left'),
  light: z.union([z.enum(['bench', 'face', 'flop']), z.coerce.number().min(15).max(110)]).default('bench'),
  /** Grey of the surround, or none. */
  surround: z.union([z.literal('none'), z.coerce.number().int().min(0).max(255)]).default('none'),
  /** Only makes another address when the picture changes. */
  tag: z.string().max(80).optional(),
})
export type PictureQuery = z.output<typeof PictureQuery>
