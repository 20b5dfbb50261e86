import { bigserial, boolean, doublePrecision, index, integer, jsonb, pgTable, primaryKey, text, timestamp, unique, uniqueIndex, uuid, varchar } from 'drizzle-orm/pg-core'
import { persons, workshops } from './people'
import { revisions, schemes } from './scheme'
import { bottles, paints } from './shelf'
import { BODY_MATERIALS } from '#shared/bench/body-material'
import type { ZoneMeasure } from '#shared/bench/run-measure'
import type { StepsForm } from '#shared/bench/run-steps'
import type { RoomAir } from '#shared/bench/run-view'

const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })

/** A batch painted from one revision. */
export const runs = pgTable('runs', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  number: integer().notNull(),
  schemeId: uuid('scheme_id').notNull().references(() => schemes.id, { onDelete: 'cascade' }),
  revisionId: uuid('revision_id').notNull().references(() => revisions.id),
  pieces: integer().notNull(),
  /** A name for each piece; empty: they are numbered. */
  names: jsonb().$type<string[]>().notNull().default([]),
  room: jsonb().$type<RoomAir>(),
  madeOf: text('made_of', { enum: BODY_MATERIALS }),
  /** In which form its steps are worked out. */
  stepsForm: integer('steps_form').$type<StepsForm>().notNull().default(1),
  startedBy: uuid('started_by').references(() => persons.id, { onDelete: 'set null' }),
  startedAt: at('started_at').notNull().defaultNow(),
  finishedAt: at('finished_at'),
}, t => [uniqueIndex('runs_number').on(t.workshopId, t.number), index('runs_scheme').on(t.schemeId)])

/** Who paints in a run. */
export const runPainters = pgTable('run_painters', {
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  runId: uuid('run_id').notNull().references(() => runs.id, { onDelete: 'cascade' }),
  personId: uuid('person_id').notNull().references(() => persons.id, { onDelete: 'cascade' }),
}, t => [primaryKey({ columns: [t.runId, t.personId] })])

/** Which bottle a paint of a run comes out of from the start; acts may change it later. */
export const runBottles = pgTable('run_bottles', {
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  runId: uuid('run_id').notNull().references(() => runs.id, { onDelete: 'cascade' }),
  paintId: uuid('paint_id').notNull().references(() => paints.id, { onDelete: 'cascade' }),
  bottleId: uuid('bottle_id').notNull().references(() => bottles.id, { onDelete: 'cascade' }),
}, t => [primaryKey({ columns: [t.runId, t.paintId] })])

/** What was done at the bench, one act a row, with an id its tablet gave it. Never changed. */
export const runEvents = pgTable('run_events', {
  id: uuid().primaryKey(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  runId: uuid('run_id').notNull().references(() => runs.id, { onDelete: 'cascade' }),
  /** Order of arrival. */
  seq: bigserial({ mode: 'number' }).notNull(),
  kind: text().notNull(),
  body: jsonb().notNull(),
  personId: uuid('person_id').references(() => persons.id, { onDelete: 'set null' }),
  /** The tablet's clock; may be wrong. */
  doneAt: at('done_at').notNull(),
  /** How much the tablet's clock was behind the server's when it handed the act over, ms. */
  clockBehind: doublePrecision('clock_behind').notNull().default(0),
  /** Its place among the acts of the run, as its tablet knew them; null from tablets of before. */
  place: integer(),
  receivedAt: at('received_at').notNull().defaultNow(),
}, t => [index('run_events_run').on(t.runId, t.seq)])

/**
 * What a run took out of a bottle by now, mL, worked out anew from all its acts whenever one arrives: an act that is sent
 * twice takes nothing twice, and one that is taken back gives its paint back. Bottle null: of a paint that has none.
 */
export const bottleUses = pgTable('bottle_uses', {
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  runId: uuid('run_id').notNull().references(() => runs.id, { onDelete: 'cascade' }),
  paintId: uuid('paint_id').notNull(),
  bottleId: uuid('bottle_id').references(() => bottles.id, { onDelete: 'cascade' }),
  ml: doublePrecision().notNull(),
}, t => [unique('bottle_uses_one').on(t.runId, t.paintId, t.bottleId).nullsNotDistinct(), index('bottle_uses_bottle').on(t.bottleId)])

/** The colours of a piece as a photo with a grey card shows them, beside what was promised then. Never changed. */
export const runMeasures = pgTable('run_measures', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  runId: uuid('run_id').notNull().references(() => runs.id, { onDelete: 'cascade' }),
  piece: integer().notNull(),
  photoId: uuid('photo_id'),
  zones: jsonb().$type<ZoneMeasure[]>().notNull(),
  /** The engine that made the promise. */
  engineVersion: text('engine_version').notNull(),
  note: varchar({ length: 500 }).notNull().default(''),
  /** Later pieces of the scheme are held against it. */
  isSample: boolean('is_sample').notNull().default(false),
  measuredBy: uuid('measured_by').references(() => persons.id, { onDelete: 'set null' }),
  measuredAt: at('measured_at').notNull().defaultNow(),
}, t => [index('run_measures_run').on(t.runId, t.measuredAt)])

/** A measure that was wrong: it counts for nothing any more, and stays to be read. Written once. */
export const runMeasuresWithdrawn = pgTable('run_measures_withdrawn', {
  measureId: uuid('measure_id').primaryKey().references(() => runMeasures.id, { onDelete: 'cascade' }),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  withdrawnBy: uuid('withdrawn_by').references(() => persons.id, { onDelete: 'set null' }),
  withdrawnAt: at('withdrawn_at').notNull().defaultNow(),
})
