import { boolean, index, integer, jsonb, pgTable, primaryKey, text, timestamp, uniqueIndex, uuid, varchar } from 'drizzle-orm/pg-core'
import { sql } from 'drizzle-orm'
import { ROLES } from '#shared/people/roles'

const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })

/** Somebody who can sign in. One person can be in several workshops. */
export const persons = pgTable('persons', {
  id: uuid().primaryKey().defaultRandom(),
  email: varchar({ length: 254 }).notNull(),
  name: varchar({ length: 80 }).notNull(),
  passwordHash: text('password_hash').notNull(),
  createdAt: at('created_at').notNull().defaultNow(),
}, t => [uniqueIndex('persons_email').on(sql`lower(${t.email})`)])

/** The tenant. */
export const workshops = pgTable('workshops', {
  id: uuid().primaryKey().defaultRandom(),
  name: varchar({ length: 80 }).notNull(),
  settings: jsonb().notNull().default({}),
  isDemo: boolean('is_demo').notNull().default(false),
  createdAt: at('created_at').notNull().defaultNow(),
})

export const memberships = pgTable('memberships', {
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  personId: uuid('person_id').notNull().references(() => persons.id, { onDelete: 'cascade' }),
  role: text({ enum: ROLES }).notNull(),
  createdAt: at('created_at').notNull().defaultNow(),
}, t => [primaryKey({ columns: [t.workshopId, t.personId] }), index('memberships_person').on(t.personId)])

/** The row behind the sealed cookie: deleting it ends access at once, on every process. */
export const sessions = pgTable('sessions', {
  id: uuid().primaryKey().defaultRandom(),
  personId: uuid('person_id').notNull().references(() => persons.id, { onDelete: 'cascade' }),
  workshopId: uuid('workshop_id').references(() => workshops.id, { onDelete: 'set null' }),
  device: varchar({ length: 200 }).notNull().default(''),
  createdAt: at('created_at').notNull().defaultNow(),
  seenAt: at('seen_at').notNull().defaultNow(),
  expiresAt: at('expires_at').notNull(),
}, t => [index('sessions_person').on(t.personId)])

export const invitations = pgTable('invitations', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  email: varchar({ length: 254 }).notNull(),
  role: text({ enum: ROLES }).notNull(),
  tokenHash: text('token_hash').notNull().unique(),
  invitedBy: uuid('invited_by').references(() => persons.id, { onDelete: 'set null' }),
  createdAt: at('created_at').notNull().defaultNow(),
  expiresAt: at('expires_at').notNull(),
  acceptedAt: at('accepted_at'),
}, t => [index('invitations_workshop').on(t.workshopId)])

export const passwordResets = pgTable('password_resets', {
  tokenHash: text('token_hash').primaryKey(),
  personId: uuid('person_id').notNull().references(() => persons.id, { onDelete: 'cascade' }),
  expiresAt: at('expires_at').notNull(),
})

/** A letter was sent to somebody who wants to open a workshop; its link shows that the address is theirs. */
export const signUps = pgTable('sign_ups', {
  tokenHash: text('token_hash').primaryKey(),
  email: varchar({ length: 254 }).notNull(),
  expiresAt: at('expires_at').notNull(),
})

/** Tries at a door (sign-in, reset, public link) by key, counted in the database so that every process counts together. */
export const tries = pgTable('tries', {
  key: text().primaryKey(),
  count: integer().notNull(),
  windowEndsAt: at('window_ends_at').notNull(),
})

/** Answers to creations already carried out, so that a repeated request makes nothing twice. */
export const idempotencyKeys = pgTable('idempotency_keys', {
  personId: uuid('person_id').notNull().references(() => persons.id, { onDelete: 'cascade' }),
  key: varchar({ length: 100 }).notNull(),
  requestHash: text('request_hash').notNull(),
  status: integer().notNull(),
  answer: jsonb().notNull(),
  createdAt: at('created_at').notNull().defaultNow(),
}, t => [primaryKey({ columns: [t.personId, t.key] })])
