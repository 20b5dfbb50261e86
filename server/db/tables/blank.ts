import { boolean, index, integer, jsonb, pgTable, timestamp, uuid, varchar } from 'drizzle-orm/pg-core'
import { workshops } from './people'
import { MASK_NAME_MAX, type MaskForm } from '#shared/scheme/mask'
import type { BlankShape } from '#shared/blank/blank-shape'

const at = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })

export const blanks = pgTable('blanks', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  name: varchar({ length: 80 }).notNull(),
  shape: jsonb().$type<BlankShape>().notNull(),
  /** Came with the workshop; can be retired, not redrawn. */
  builtIn: boolean('built_in').notNull().default(false),
  retired: boolean().notNull().default(false),
  version: integer().notNull().default(1),
  createdAt: at('created_at').notNull().defaultNow(),
}, t => [index('blanks_workshop').on(t.workshopId)])

/** The workshop's meshes and stencils. A scheme copies the form, so that changing one here changes no scheme. */
export const masks = pgTable('masks', {
  id: uuid().primaryKey().defaultRandom(),
  workshopId: uuid('workshop_id').notNull().references(() => workshops.id, { onDelete: 'cascade' }),
  name: varchar({ length: MASK_NAME_MAX }).notNull(),
  form: jsonb().$type<MaskForm>().notNull(),
  retired: boolean().notNull().default(false),
  version: integer().notNull().default(1),
  createdAt: at('created_at').notNull().defaultNow(),
}, t => [index('masks_workshop').on(t.workshopId)])
