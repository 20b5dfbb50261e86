import { z } from 'zod'
import { SchemeBody } from './body'
import { Materials } from './materials'
import { NearView } from './wall/wall-wish'

/** Where a colourway came from. */
export const Origin = z.object({ schemeId: z.uuid(), schemeName: z.string(), number: z.number().int() })
export type Origin = z.output<typeof Origin>

/** A person as others of the workshop see them on a piece of work. */
export const Painter = z.object({ id: z.uuid(), name: z.string() })
export type Painter = z.output<typeof Painter>

/** A scheme as the front desk sees it: what it is called, what it is for and when it was worked on. Nothing of how it is made. */
export const SchemeLookView = z.object({
  sees: z.literal('look'),
  id: z.uuid(),
  name: z.string(),
  fish: z.string(),
  blank: z.object({ id: z.uuid(), name: z.string() }),
  /** When its newest revision was published. */
  publishedAt: z.iso.datetime(),
  /** Goes with the address of its picture: another one when the picture changes. */
  pictureTag: z.string(),
})
export type SchemeLookView = z.output<typeof SchemeLookView>

/** A scheme in the list of those who may read recipes. */
export const SchemeListItem = z.object({
  sees: z.literal('recipe'),
  id: z.uuid(),
  name: z.string(),
  fish: z.string(),
  blank: z.object({ id: z.uuid(), name: z.string() }),
  coats: z.number().int(),
  masks: z.number().int(),
  /** Number of the newest revision, 0 when never published. */
  headNumber: z.number().int(),
  publishedAt: z.iso.datetime().nullable(),
  /** The draft was saved after the newest revision. */
  draftIsAhead: z.boolean(),
  savedAt: z.iso.datetime(),
  savedBy: Painter.nullable(),
  /** Put away: out of the lists until asked for. */
  retired: z.boolean(),
  pictureTag: z.string(),
})
export type SchemeListItem = z.output<typeof SchemeListItem>

/** One row of the list, by what the reader may see. */
export const SchemeRowView = z.discriminatedUnion('sees', [SchemeListItem, SchemeLookView])
export type SchemeRowView = z.output<typeof SchemeRowView>

/** A page of the list and where the next one starts. */
export const SchemeListPage = z.object({
  items: z.array(SchemeRowView),
  next: z.string().nullable(),
  /** By scheme, when a colour was looked for. */
  near: z.record(z.string(), NearView),
  /** Looks whose colours are still to be worked out, when a colour was looked for. */
  waiting: z.number().int(),
})
export type SchemeListPage = z.output<typeof SchemeListPage>

/** One revision in a list. */
export const RevisionListItem = z.object({
  id: z.uuid(),
  number: z.number().int(),
  note: z.string(),
  coats: z.number().int(),
  publishedAt: z.iso.datetime(),
  publishedBy: Painter.nullable(),
})
export type RevisionListItem = z.output<typeof RevisionListItem>

/** A frozen version: what it was, with what it was made, for good. */
export const RevisionView = RevisionListItem.extend({
  schemeId: z.uuid(),
  schemeName: z.string(),
  body: SchemeBody,
  materials: Materials,
  engineVersion: z.string(),
})
export type RevisionView = z.output<typeof RevisionView>

/** Everything the build screen needs: the draft, what it can be made with today, and the revisions so far. */
export const SchemeView = z.object({
  id: z.uuid(),
  name: z.string(),
  fish: z.string(),
  /** Goes up with every save; sent back as `If-Match`. */
  version: z.number().int(),
  draft: SchemeBody,
  /** Every paint on the shelf that can be used, and those of the draft that no longer can. */
  materials: Materials,
  headNumber: z.number().int(),
  savedAt: z.iso.datetime(),
  savedBy: Painter.nullable(),
  retired: z.boolean(),
  origin: Origin.nullable(),
  /** Newest first. */
  revisions: z.array(RevisionListItem),
})
export type SchemeView = z.output<typeof SchemeView>

/** The draft after a save. */
export const DraftSavedView = z.object({ version: z.number().int(), savedAt: z.iso.datetime() })
export type DraftSavedView = z.output<typeof DraftSavedView>

const ComparedSide = z.object({
  scheme: z.object({ id: z.uuid(), name: z.string() }),
  /** Null for the draft. */
  number: z.number().int().nullable(),
  note: z.string(), body: SchemeBody, materials: Materials,
})

/** Two versions side by side, of one scheme or of two, each with what it was made with. */
export const CompareView = z.object({ from: ComparedSide, to: ComparedSide })
export type CompareView = z.output<typeof CompareView>
