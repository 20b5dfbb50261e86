import { type SQL, sql } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import { revisions, schemes } from '#server/db/tables'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { answers, head } from '#server/services/scheme/list-filters'
import { listNear, nearKey, type NearAfter, type NearRow, SHARE_WANTED, zonesByDistance } from '#server/services/scheme/list-near'
import { listSchemes } from '#server/services/scheme/list-schemes'
import { deltaE2000 } from '#shared/optics/delta-e'
import { typedColour } from '#shared/scheme/find/typed-colour'
import { SchemeQuery } from '#shared/scheme/scheme-input'
import { asOwner } from '../database'
import { testWorkshop } from '../factories'
import { manySchemes } from './wall-ground'

const SCHEMES = 8000
const query = (more: Partial<SchemeQuery> = {}) => SchemeQuery.parse(more)

interface Strewn { id: string, fish: string, lightness: number, a: number, b: number }
let ctx: Ctx
let strewn: Strewn[]
beforeAll(async () => {
  ({ ctx } = await testWorkshop({ role: 'painter' }))
  await manySchemes(ctx, SCHEMES)
  // Another workshop's wall hangs in the same tables.
  await manySchemes((await testWorkshop({ role: 'painter' })).ctx, 1000)
  strewn = await asOwner<Strewn>('select s.id, s.fish, c.lightness, c.a, c.b from schemes s join scheme_colours c on c.scheme_id = s.id where s.workshop_id = $1', [ctx.workshopId])
}, 120_000)

/** The answer without any index: every zone of every scheme. */
function byHand(near: string, fish?: string): NearAfter[] {
  const wanted = typedColour(near)!
  const nearest = new Map<string, number>()
  for (const { id, fish: its, lightness, a, b } of strewn) {
    if (fish && its !== fish) continue
    nearest.set(id, Math.min(nearest.get(id) ?? Infinity, deltaE2000(wanted, [lightness, a, b])))
  }
  return [...nearest].map(([id, distance]): NearAfter => [distance, id]).sort(([d1, id1], [d2, id2]) => d1 - d2 || (id1 < id2 ? -1 : 1))
}

async function pages(near: string, count: number, more: Partial<SchemeQuery> = {}): Promise<NearRow[]> {
  const seen: NearRow[] = []
  let after: NearAfter | null = null
  for (let page = 0; page < count; page++) {
    const { rows } = await listNear(ctx, query({ near, limit: 24, ...more }), after)
    seen.push(...rows.slice(0, 24))
    after = rows.length > 24 ? nearKey(rows[23]!) : null
    if (!after) break
  }
  return seen
}

describe('near this colour', () => {
  it.each(['50 0 0', '62 2 -3', '30 20 -55', '45 58 40', '85 -15 62', '3 0 0', '98 0 0', 'rebeccapurple', '32 79 -108'])('names the nearest to %s, page after page, as if every zone had been compared', async (near) => {
    expect((await pages(near, 3)).map(nearKey)).toEqual(byHand(near).slice(0, 72))
  })

  it('keeps the order when something else is asked for too', async () => {
    expect((await pages('40 30 -20', 2, { fish: 'Pike' })).map(nearKey)).toEqual(byHand('40 30 -20', 'Pike').slice(0, 48))
  })

  it('ends where the schemes end', async () => {
    const rows = await pages('20 0 0', 100, { words: 'strewn 7999' })
    expect(rows.map(({ row }) => row.name)).toContain('Strewn 7999')
    expect(rows.map(nearKey)).toEqual([...rows.map(nearKey)].sort(([one], [other]) => one - other))
    expect(rows.length).toBeLessThan(24)
  })

  it('refuses what is no colour, beside the field', async () => {
    await expect(listNear(ctx, query({ near: 'greenish' }), null)).rejects.toMatchObject({ data: { code: 'input/invalid', fields: [{ path: 'near' }] } })
  })
})

describe('a wall of many schemes', () => {
  const stepsOf = (of: (tx: Ctx, where: SQL | undefined) => SQL, wish: Partial<SchemeQuery> = {}) => inTransaction(ctx, async (tx) => {
    await tx.db.execute(sql`select set_config('cursor_tuple_fraction', ${SHARE_WANTED}, true)`)
    const { rows } = await tx.db.execute<Record<string, string>>(sql`explain ${of(tx, (await answers(tx, query(wish))).where)}`)
    return rows.map(row => row['QUERY PLAN']).join('\n')
  })

  it('is walked by nearness through the index of colours, from behind the wall', async () => {
    const steps = await stepsOf((tx, where) => sql`declare c cursor for ${zonesByDistance(tx, { where, wanted: [50, 0, 0], side: 'draft' })}`)
    expect(steps).toMatch(/Index Scan using scheme_colours_near[\s\S]*Index Cond: \(\(workshop_id = /)
    expect(steps).toMatch(/Order By: \(cube/)
    expect(steps).not.toMatch(/Sort|Seq Scan on scheme/)
  })

  it.each([
    ['newest work first', {}, /Index Scan Backward using schemes_workshop/],
    ['by a paint', { paintId: '00000000-0000-4000-8000-000000000001' }, /scheme_paints_paint/],
    ['by a fish', { fish: 'Char' }, /schemes_(fish|workshop)/],
    ['by a person who saved little', { personId: '00000000-0000-4000-8000-000000000001' }, /schemes_person/],
  ])('is read %s through an index, never from end to end', async (_, wish, index) => {
    const steps = await stepsOf((_tx, where) => sql`select ${schemes.id} from ${schemes} left join ${revisions} on ${head} where ${where}
      order by ${schemes.savedAt} desc, ${schemes.id} desc limit 25`, wish)
    expect(steps).toMatch(index)
    expect(steps).not.toMatch(/Seq Scan on scheme/)
  })

  it('finds words through the index of their letters', async () => {
    const [door] = await asOwner<{ body: string }>('select prosrc as body from pg_proc where proname = \'schemes_worded\'')
    const body = door!.body.replaceAll('app_workshop()', `'${ctx.workshopId}'::uuid`).replaceAll('as_recipes', 'true').replaceAll(/\bword\b/g, '\'%ab3f9%\'')
    // At so few rows reading them all may be as quick: what is asked is whether the indexes can serve.
    await asOwner(`create function plan_of(statement text) returns setof text language plpgsql as $$
      begin perform set_config('enable_seqscan', 'off', true); return query execute 'explain ' || statement; end $$`)
    const steps = (await asOwner<{ step: string }>('select plan_of($1) as step', [body])).map(row => row.step).join('\n')
    expect(steps).toMatch(/Bitmap Index Scan on scheme_words_names/)
    expect(steps).toMatch(/Bitmap Index Scan on scheme_words_coats/)
  })

  it('lets nobody through the door of words into another workshop', async () => {
    const { ctx: stranger } = await testWorkshop({ role: 'owner' })
    expect(await listSchemes(stranger, query({ words: 'strewn' }), null)).toEqual([])
    const seen = await inTransaction(stranger, tx => tx.db.execute(sql`select schemes_worded('%', true)`))
    expect(seen.rows).toEqual([])
  })
})
