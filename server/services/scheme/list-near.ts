import { and, eq, type SQL, sql } from 'drizzle-orm'
import { z } from 'zod'
import { blanks, colourFills, revisions, schemeColours, schemes, type Side } from '#server/db/tables'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { Problem } from '#shared/errors/problem'
import { deltaE2000 } from '#shared/optics/delta-e'
import { ENGINE_VERSION } from '#shared/optics/engine-version'
import { may } from '#shared/people/may'
import { typedColour } from '#shared/scheme/find/typed-colour'
import type { SchemeQuery } from '#shared/scheme/scheme-input'
import type { SchemeRowView } from '#shared/scheme/scheme-view'
import { nearnessFloor } from '#shared/scheme/wall/nearness'
import type { NearView } from '#shared/scheme/wall/wall-wish'
import type { Lab } from '#shared/shelf/paint'
import { answers, assertMayLookFor, head } from './list-filters'
import { schemeRows } from './list-schemes'

/** Where a page of the list by nearness starts: the distance and the id of the last row before it. */
export const NearAfter = z.tuple([z.number().min(0), z.uuid()])
export type NearAfter = z.output<typeof NearAfter>

/** A scheme and how near it comes. */
export interface NearRow { row: SchemeRowView, near: NearView }

/** Rows by nearness, and how many looks are still to be worked out and may come in between. */
export interface NearRows { rows: NearRow[], waiting: number }

/** The sort key of a row. */
export const nearKey = ({ row, near }: NearRow): NearAfter => [near.distance, row.id]

/** Zones fetched at first; each fetch after it takes twice as many. */
const FETCH = 256
const FETCH_MOST = 8192
/** How little of the whole answer is wanted, so that the planner walks the index instead of sorting; where few schemes can answer, all of it. */
export const SHARE_WANTED = '0.0001'

/**
 * Schemes that answer a search, nearest to its colour first: by CIEDE2000 to the zone of each that comes nearest; one row more than
 * asked for when there are more. Exact: zones come out of an index by straight distance, and are fetched until every zone still to
 * come is farther by CIEDE2000 than the last row.
 */
export async function listNear(ctx: Ctx, query: SchemeQuery, after: NearAfter | null): Promise<NearRows> {
  assertMayLookFor(ctx, query)
  const wanted = typedColour(query.near ?? '')
  if (!wanted) throw new Problem({ code: 'input/invalid', fields: [{ path: 'near', message: 'Type a colour: Lab such as 52 -8 24, or a CSS colour such as #7a8b4f.' }] })
  return inTransaction(ctx, async (tx) => {
    const side: Side = may(tx.role, 'scheme:read') ? 'draft' : 'head'
    const nearest = await nearestSchemes(tx, { query, wanted, side, after })
    const rows = await schemeRows(tx, nearest.map(([id]) => id))
    const byId = new Map(nearest)
    return { rows: rows.map(row => ({ row, near: byId.get(row.id)! })), waiting: await waitingFor(tx, side) }
  })
}

type Nearest = [schemeId: string, near: NearView]
interface Zone { schemeId: string, zone: string, label: string, lightness: number, a: number, b: number, straight: number }

/** The query whose rows come in rising straight distance. */
export function zonesByDistance(tx: Ctx, { where, wanted, side }: { where: SQL | undefined, wanted: Lab, side: Side }) {
  const straight = sql<number>`cube(array[${schemeColours.lightness}, ${schemeColours.a}, ${schemeColours.b}])
    <-> cube(array[${wanted[0]}, ${wanted[1]}, ${wanted[2]}]::float8[])`
  const zones = tx.db.select({
    schemeId: sql<string>`${schemeColours.schemeId}`.as('schemeId'), zone: schemeColours.zone, label: schemeColours.label,
    lightness: schemeColours.lightness, a: schemeColours.a, b: schemeColours.b, straight: straight.as('straight'),
  }).from(schemeColours).innerJoin(schemes, eq(schemes.id, schemeColours.schemeId))
  const all = and(eq(schemeColours.workshopId, tx.workshopId), eq(schemeColours.side, side), where)
  return side === 'head'
    ? zones.innerJoin(revisions, head).innerJoin(blanks, sql`${blanks.id} = (${revisions.body} ->> 'blankId')::uuid`).where(all).orderBy(straight).getSQL()
    : zones.leftJoin(revisions, head).where(all).orderBy(straight).getSQL()
}

async function nearestSchemes(tx: Ctx, ask: { query: SchemeQuery, wanted: Lab, side: Side, after: NearAfter | null }): Promise<Nearest[]> {
  const { query, wanted, side, after } = ask
  const { where, isFew } = await answers(tx, query)
  const floorAt = nearnessFloor(wanted)
  const nearest = new Map<string, NearView>()
  /** Rows of this page and later ones that no zone still to come can displace. */
  const certain = (floor: number): Nearest[] => [...nearest]
    .filter(([id, { distance }]) => distance < floor && (!after || distance > after[0] || (distance === after[0] && id > after[1])))

  await tx.db.execute(sql`select set_config('cursor_tuple_fraction', ${isFew ? '1' : SHARE_WANTED}, true)`)
  await tx.db.execute(sql`declare zones_near no scroll cursor for ${zonesByDistance(tx, { where, wanted, side })}`)
  let found: Nearest[] = []
  for (let count = FETCH; ; count = Math.min(count * 2, FETCH_MOST)) {
    const { rows } = await tx.db.execute<Zone & Record<string, unknown>>(sql.raw(`fetch ${count} from zones_near`))
    for (const { schemeId, zone, label, lightness, a, b } of rows) {
      const distance = deltaE2000(wanted, [lightness, a, b])
      if (distance < (nearest.get(schemeId)?.distance ?? Infinity)) nearest.set(schemeId, { zone, label, distance })
    }
    const last = rows.at(-1)
    const isAll = !last || rows.length < count
    found = certain(isAll ? Infinity : floorAt(last.straight))
    if (isAll || found.length > query.limit) break
  }
  await tx.db.execute(sql`close zones_near`)
  return found.sort(([id, one], [otherId, other]) => one.distance - other.distance || (id < otherId ? -1 : 1)).slice(0, query.limit + 1)
}

async function waitingFor(tx: Ctx, side: Side): Promise<number> {
  return tx.db.$count(colourFills, and(eq(colourFills.workshopId, tx.workshopId), eq(colourFills.side, side), sql`${colourFills.engineVersion} <> ${ENGINE_VERSION}`))
}
