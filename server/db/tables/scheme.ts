import { type AnyPgColumn, boolean, index, integer, jsonb, pgTable, text, timestamp, uniqueIndex, uuid, varchar } from 'drizzle-orm/pg-core'
import { persons, workshops } from './people'
import { blanks } from './blank'
import type { SchemeBody } from '#shared/scheme/body'
import { BUILD_UP_NAME_MAX, type BuildUpSequence } from '#shared/scheme/build-up'
import type { Materials } from '#shared/scheme/materials'

const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })
/** In whole milliseconds, as keys of pages travel, so that an index on it gives their order. */
const orderedAt = (name: string) => timestamp(name, { withTimezone: true, mode: 'date', precision: 3 })

export const schemes = pgTable('schemes', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  name: varchar({ length: 80 }).notNull(),
  fish: varchar({ length: 80 }).notNull().default(''),
  blankId: uuid('blank_id').notNull().references(() => blanks.id),
  draft: jsonb().$type<SchemeBody>().notNull(),
  /** Goes up with every save of the draft, its name or its fish. */
  version: integer().notNull().default(1),
  savedAt: orderedAt('saved_at').notNull().defaultNow(),
  savedBy: uuid('saved_by').references(() => persons.id, { onDelete: 'set null' }),
  /** Number of the newest revision, 0 when never published. */
  headNumber: integer('head_number').notNull().default(0),
  /** Where a colourway came from. */
  forkedFrom: uuid('forked_from').references((): AnyPgColumn => revisions.id, { onDelete: 'set null' }),
  retired: boolean().notNull().default(false),
  createdAt: at('created_at').notNull().defaultNow(),
}, t => [
  index('schemes_workshop').on(t.workshopId, t.retired, t.savedAt, t.id),
  index('schemes_person').on(t.workshopId, t.savedBy, t.savedAt),
  index('schemes_blank').on(t.workshopId, t.blankId),
  index('schemes_fish').on(t.workshopId, t.fish),
])

/** A numbered, frozen version. The database refuses to change one. */
export const revisions = pgTable('revisions', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  schemeId: uuid('scheme_id').notNull().references((): AnyPgColumn => schemes.id, { onDelete: 'cascade' }),
  number: integer().notNull(),
  note: varchar({ length: 500 }).notNull(),
  body: jsonb().$type<SchemeBody>().notNull(),
  materials: jsonb().$type<Materials>().notNull(),
  /** SHA-256 of the canonical body and materials, hex. */
  bodyHash: text('body_hash').notNull(),
  engineVersion: text('engine_version').notNull(),
  publishedBy: uuid('published_by').references(() => persons.id, { onDelete: 'set null' }),
  publishedAt: orderedAt('published_at').notNull().defaultNow(),
}, t => [uniqueIndex('revisions_number').on(t.schemeId, t.number)])

/** A sequence of coats with their masks that is laid again and again, under a name of the workshop's own. */
export const buildUps = pgTable('build_ups', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  name: varchar({ length: BUILD_UP_NAME_MAX }).notNull(),
  sequence: jsonb().$type<BuildUpSequence>().notNull(),
  /** Rises when its coats change: coats that were laid from it name the edition. */
  edition: integer().notNull().default(1),
  version: integer().notNull().default(1),
  retired: boolean().notNull().default(false),
  createdAt: at('created_at').notNull().defaultNow(),
  changedAt: at('changed_at').notNull().defaultNow(),
}, t => [index('build_ups_workshop').on(t.workshopId, t.name)])
