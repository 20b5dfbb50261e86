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
/** After so many zones in order the wanted colour is far from all there is, and reading the rest in no order is quicker. */
const WALKED_MOST = 16_000
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
interface Zone extends Record<string, unknown> { schemeId: string, zone: string, label: string, lightness: number, a: number, b: number, straight: number }

/** What zones are asked for. */
export interface ZonesAsked { where: SQL | undefined, wanted: Lab, side: Side }

/** The zones of schemes that answer, in no order. */
function zonesOf(tx: Ctx, { where, wanted, side }: ZonesAsked) {
  const zones = tx.db.select({
    schemeId: sql<string>`${schemeColours.schemeId}`.as('schemeId'), zone: schemeColours.zone, label: schemeColours.label,
    lightness: schemeColours.lightness, a: schemeColours.a, b: schemeColours.b, straight: straightTo(wanted).as('straight'),
  }).from(schemeColours).innerJoin(schemes, eq(schemes.id, schemeColours.schemeId))
  const all = and(eq(schemeColours.workshopId, tx.workshopId), eq(schemeColours.side, side), where)
  return side === 'head'
    ? zones.innerJoin(revisions, head).innerJoin(blanks, sql`${blanks.id} = (${revisions.body} ->> 'blankId')::uuid`).where(all).$dynamic()
    : zones.leftJoin(revisions, head).where(all).$dynamic()
}

/** The same in rising straight distance, as the index of colours gives them. */
export function zonesByDistance(tx: Ctx, asked: ZonesAsked): SQL {
  return sql`${zonesOf(tx, asked).getSQL()} order by ${straightTo(asked.wanted)}`
}

function straightTo([lightness, a, b]: Lab): SQL<number> {
  return sql<number>`cube(array[${schemeColours.lightness}, ${schemeColours.a}, ${schemeColours.b}]) <-> cube(array[${lightness}, ${a}, ${b}]::float8[])`
}

async function nearestSchemes(tx: Ctx, ask: { query: SchemeQuery, wanted: Lab, side: Side, after: NearAfter | null }): Promise<Nearest[]> {
  const { query: { limit }, wanted, side, after } = ask
  const { where, isFew } = await answers(tx, ask.query)
  const floorAt = nearnessFloor(wanted)
  const nearest = new Map<string, NearView>()
  const take = (zones: readonly Zone[]) => {
    for (const { schemeId, zone, label, lightness, a, b } of zones) {
      const distance = deltaE2000(wanted, [lightness, a, b])
      if (distance < (nearest.get(schemeId)?.distance ?? Infinity)) nearest.set(schemeId, { zone, label, distance })
    }
  }
  /** Those of this page and later ones that no zone at or above the floor can displace. */
  const below = (floor: number): Nearest[] => [...nearest]
    .filter(([id, { distance }]) => distance < floor && (!after || distance > after[0] || (distance === after[0] && id > after[1])))

  await tx.db.execute(sql`select set_config('cursor_tuple_fraction', ${isFew ? '1' : SHARE_WANTED}, true)`)
  let walked = 0
  for await (const zones of fetched(tx, 'zones_near', zonesByDistance(tx, { where, wanted, side }))) {
    take(zones)
    walked += zones.length
    const found = below(floorAt(zones.at(-1)!.straight))
    if (found.length > limit) return firstOf(found, limit + 1)
    if (walked >= WALKED_MOST) break
  }
  if (walked >= WALKED_MOST) {
    await tx.db.execute(sql`select set_config('cursor_tuple_fraction', '1', true)`)
    for await (const zones of fetched(tx, 'zones_all', zonesOf(tx, { where, wanted, side }).getSQL())) take(zones)
  }
  return firstOf(below(Infinity), limit + 1)
}

function firstOf(found: Nearest[], count: number): Nearest[] {
  return found.sort(([id, one], [otherId, other]) => one.distance - other.distance || (id < otherId ? -1 : 1)).slice(0, count)
}

/** Rows of a query, more at each fetch. What is not fetched is never read; the transaction lets go of the rest. */
async function* fetched(tx: Ctx, cursor: 'zones_near' | 'zones_all', query: SQL): AsyncGenerator<Zone[]> {
  await tx.db.execute(sql`declare ${sql.identifier(cursor)} no scroll cursor for ${query}`)
  for (let count = FETCH; ; count = Math.min(count * 2, FETCH_MOST)) {
    const { rows } = await tx.db.execute<Zone>(sql.raw(`fetch ${count} from ${cursor}`))
    if (rows.length > 0) yield rows
    if (rows.length < count) return
  }
}

async function waitingFor(tx: Ctx, side: Side): Promise<number> {
  return tx.db.$count(colourFills, and(eq(colourFills.workshopId, tx.workshopId), eq(colourFills.side, side), sql`${colourFills.engineVersion} <> ${ENGINE_VERSION}`))
}
