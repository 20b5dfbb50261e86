import { sql } from 'drizzle-orm'

/** How many schemes of the workshop are painted on a blank of a query on `blanks`; retired schemes are not counted. */
export const schemesOn = sql<number>`(select count(*)::int from schemes s
  where s.workshop_id = blanks.workshop_id and s.blank_id = blanks.id and not s.retired)`
