import { boolean, date, doublePrecision, index, integer, jsonb, pgTable, text, timestamp, uuid, varchar } from 'drizzle-orm/pg-core'
import { workshops } from './people'
import { BOTTLE_CODE_MAX, BOTTLE_STATES, LOT_MAX } from '#shared/shelf/bottle'
import { PAINT_BASES, PAINT_KINDS, PAINT_NAME_MAX, type PaintKnown, type TwoPart } from '#shared/shelf/paint'
import type { StoredOptics } from '#shared/shelf/stored-optics'

const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })

/** Optical data of a paint as the engine derived it once. Never changed: a changed paint points at a new row. */
export const paintOptics = pgTable('paint_optics', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  engineVersion: text('engine_version').notNull(),
  data: jsonb().$type<StoredOptics>().notNull(),
  createdAt: at('created_at').notNull().defaultNow(),
}, t => [index('paint_optics_workshop').on(t.workshopId)])

export const paints = pgTable('paints', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  name: varchar({ length: PAINT_NAME_MAX }).notNull(),
  kind: text({ enum: PAINT_KINDS }).notNull(),
  base: text({ enum: PAINT_BASES }).notNull(),
  known: jsonb().$type<PaintKnown>().notNull(),
  opticsId: uuid('optics_id').notNull().references(() => paintOptics.id),
  reducerPer100: doublePrecision('reducer_per_100').notNull(),
  filmPerPass: doublePrecision('film_per_pass').notNull(),
  volumeSolids: doublePrecision('volume_solids').notNull(),
  density: doublePrecision().notNull(),
  restMinutes: doublePrecision('rest_minutes').notNull(),
  potLifeMinutes: doublePrecision('pot_life_minutes'),
  twoPart: jsonb('two_part').$type<TwoPart>(),
  hazards: jsonb().$type<string[]>().notNull(),
  note: text().notNull(),
  pricePerMl: doublePrecision('price_per_ml'),
  retired: boolean().notNull().default(false),
  version: integer().notNull().default(1),
  createdAt: at('created_at').notNull().defaultNow(),
  changedAt: at('changed_at').notNull().defaultNow(),
}, t => [index('paints_workshop').on(t.workshopId, t.name)])

/** A container of a paint, with its lot. What is left of it: `ml` less what runs took since it was looked at (see `bottle_uses`). */
export const bottles = pgTable('bottles', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  paintId: uuid('paint_id').notNull().references(() => paints.id, { onDelete: 'cascade' }),
  /** What is scanned; a maker's code may stand on several. */
  code: varchar({ length: BOTTLE_CODE_MAX }).notNull(),
  lot: varchar({ length: LOT_MAX }).notNull().default(''),
  /** What was in it when somebody last looked, mL. */
  ml: doublePrecision().notNull(),
  /** What runs had taken from it in all by then, mL. */
  usedBefore: doublePrecision('used_before').notNull().default(0),
  state: text({ enum: BOTTLE_STATES }).notNull().default('open'),
  openedOn: date('opened_on', { mode: 'string' }),
  version: integer().notNull().default(1),
  createdAt: at('created_at').notNull().defaultNow(),
}, t => [index('bottles_paint').on(t.paintId), index('bottles_code').on(t.workshopId, t.code)])
