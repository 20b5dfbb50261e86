import { sql } from 'drizzle-orm'
import { doublePrecision, index, integer, jsonb, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid, varchar } from 'drizzle-orm/pg-core'
import { persons, workshops } from './people'
import { schemes } from './scheme'
import { SEARCH_NAME_MAX, type WallWish } from '#shared/scheme/wall/wall-wish'

/** Which look of a scheme: the draft as the shelf would lay it today, or the newest revision. */
export const SIDES = ['draft', 'head'] as const
export type Side = typeof SIDES[number]

/**
 * The promised colour of each zone of a scheme, CIELAB (D65), for finding schemes near a colour. Laid down by whoever
 * works colours out, never by a save; `colour_fills` says which are still to come.
 */
export const schemeColours = pgTable('scheme_colours', {
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  schemeId: uuid('scheme_id').notNull().references(() => schemes.id, { onDelete: 'cascade' }),
  side: text({ enum: SIDES }).notNull(),
  zone: varchar({ length: 80 }).notNull(),
  label: varchar({ length: 80 }).notNull(),
  lightness: doublePrecision().notNull(),
  a: doublePrecision().notNull(),
  b: doublePrecision().notNull(),
}, t => [
  primaryKey({ columns: [t.schemeId, t.side, t.zone] }),
  index('scheme_colours_near').using('gist', t.workshopId, t.side, sql`cube(array[${t.lightness}, ${t.a}, ${t.b}])`),
])

/** How far the colours of a look are worked out. The database itself marks a look as due when its draft, a paint of it or its blank changes. */
export const colourFills = pgTable('colour_fills', {
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  schemeId: uuid('scheme_id').notNull().references(() => schemes.id, { onDelete: 'cascade' }),
  side: text({ enum: SIDES }).notNull(),
  /** Of the engine that worked the colours out; empty while they are due. */
  engineVersion: text('engine_version').notNull().default(''),
  /** Rises each time they become due: what was worked out from an older look is not laid down. */
  stamp: integer().notNull().default(1),
}, t => [primaryKey({ columns: [t.schemeId, t.side] }), index('colour_fills_due').on(t.workshopId, t.engineVersion)])

/** Which paints a draft is made with; kept by the database itself. */
export const schemePaints = pgTable('scheme_paints', {
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  schemeId: uuid('scheme_id').notNull().references(() => schemes.id, { onDelete: 'cascade' }),
  paintId: uuid('paint_id').notNull(),
}, t => [primaryKey({ columns: [t.schemeId, t.paintId] }), index('scheme_paints_paint').on(t.workshopId, t.paintId)])

/** What a scheme is found by in words; kept by the database itself. */
export const schemeWords = pgTable('scheme_words', {
  schemeId: uuid('scheme_id').primaryKey().references(() => schemes.id, { onDelete: 'cascade' }),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  /** Name and fish, a line each: anybody of the workshop may find it by these. */
  names: text().notNull(),
  /** The names of its coats, a line each: only for those who read recipes. */
  coats: text().notNull(),
}, t => [
  index('scheme_words_names').using('gin', t.workshopId, t.names.op('gin_trgm_ops')),
  index('scheme_words_coats').using('gin', t.workshopId, t.coats.op('gin_trgm_ops')),
])

/** What a person looks for on the wall again and again, under a name of their own. */
export const savedSearches = pgTable('saved_searches', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  personId: uuid('person_id').notNull().references(() => persons.id, { onDelete: 'cascade' }),
  name: varchar({ length: SEARCH_NAME_MAX }).notNull(),
  wish: jsonb().$type<WallWish>().notNull(),
  createdAt: timestamp('created_at', { withTimezone: true, mode: 'date' }).notNull().defaultNow(),
}, t => [uniqueIndex('saved_searches_name').on(t.workshopId, t.personId, t.name)])
