import { index, integer, jsonb, pgTable, text, timestamp, uuid, varchar } from 'drizzle-orm/pg-core'
import { persons, workshops } from './people'
import { schemes } from './scheme'
import { runs } from './bench'

const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })

/** A photo of a scheme: the original kept private, renditions without any metadata. */
export const photos = pgTable('photos', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  schemeId: uuid('scheme_id').notNull().references(() => schemes.id, { onDelete: 'cascade' }),
  runId: uuid('run_id').references(() => runs.id, { onDelete: 'set null' }),
  /** SHA-256 of the original, hex: the same file twice is noticed. */
  sha256: text().notNull(),
  format: text().notNull(),
  bytes: integer().notNull(),
  width: integer().notNull(),
  height: integer().notNull(),
  alt: varchar({ length: 300 }).notNull().default(''),
  position: integer().notNull(),
  addedBy: uuid('added_by').references(() => persons.id, { onDelete: 'set null' }),
  createdAt: at('created_at').notNull().defaultNow(),
}, t => [index('photos_scheme').on(t.schemeId, t.position)])

/** A public page of a finished scheme. What it shows is copied into `content` field by field: nothing of a recipe can follow. */
export const cards = pgTable('cards', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  schemeId: uuid('scheme_id').notNull().references(() => schemes.id, { onDelete: 'cascade' }),
  content: jsonb().notNull(),
  version: integer().notNull().default(1),
  /** SHA-256 of the link's secret, hex; null while the card is not shared. */
  tokenHash: text('token_hash').unique(),
  sharedAt: at('shared_at'),
  revokedAt: at('revoked_at'),
  createdBy: uuid('created_by').references(() => persons.id, { onDelete: 'set null' }),
  createdAt: at('created_at').notNull().defaultNow(),
}, t => [index('cards_workshop').on(t.workshopId)])

/** Pictures our renderer made, by the hash of what they show and the engine's version; the bytes lie in the object store. May be thrown away. */
export const pictures = pgTable('pictures', {
  hash: text().notNull(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  engineVersion: text('engine_version').notNull(),
  objectKey: text('object_key').notNull(),
  createdAt: at('created_at').notNull().defaultNow(),
}, t => [index('pictures_workshop').on(t.workshopId, t.hash)])
