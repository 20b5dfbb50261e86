import { bigserial, index, integer, jsonb, pgTable, text, timestamp, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { persons, workshops } from './people'
import { revisions, schemes } from './scheme'

const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })

/** A batch painted from one revision. */
export const runs = pgTable('runs', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  number: integer().notNull(),
  schemeId: uuid('scheme_id').notNull().references(() => schemes.id, { onDelete: 'cascade' }),
  revisionId: uuid('revision_id').notNull().references(() => revisions.id),
  pieces: integer().notNull(),
  startedBy: uuid('started_by').references(() => persons.id, { onDelete: 'set null' }),
  startedAt: at('started_at').notNull().defaultNow(),
  finishedAt: at('finished_at'),
}, t => [uniqueIndex('runs_number').on(t.workshopId, t.number), index('runs_scheme').on(t.schemeId)])

/** What was done at the bench, one act a row, with an id its tablet gave it. Never changed. */
export const runEvents = pgTable('run_events', {
  id: uuid().primaryKey(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  runId: uuid('run_id').notNull().references(() => runs.id, { onDelete: 'cascade' }),
  /** Order of arrival, which is the order of application. */
  seq: bigserial({ mode: 'number' }).notNull(),
  kind: text().notNull(),
  body: jsonb().notNull(),
  personId: uuid('person_id').references(() => persons.id, { onDelete: 'set null' }),
  /** The tablet's clock; may be wrong. */
  doneAt: at('done_at').notNull(),
  receivedAt: at('received_at').notNull().defaultNow(),
}, t => [index('run_events_run').on(t.runId, t.seq)])
