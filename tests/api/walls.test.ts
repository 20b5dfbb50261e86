import { sql } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Ctx } from '#server/services/ctx'
import { inTransactionAs } from '#server/services/in-transaction'
import { asOwner, testDatabase } from './database'
import { testWorkshop } from './factories'

/** Tables that carry no workshop's data, with the reason the second wall does not stand round them. */
const OUTSIDE: Readonly<Record<string, string>> = {
  tries: 'counts knocks at doors by hashed key, before anybody is known',
}

/** Nobody's in particular: only the holder of a link sees a row. */
const BY_LINK_ONLY = ['sign_ups']

/** One row in every table, as the owner of the tables writes it: $1 the workshop, $2 somebody in it, $3 a word of its own. */
const ONE_OF_EACH: readonly string[] = [
  `insert into invitations (workshop_id, email, role, token_hash, expires_at) values ($1, $3 || '@wall.example', 'desk', 'i' || $3, now() + interval '1 day')`,
  `insert into password_resets (token_hash, person_id, expires_at) values ('r' || $3, $2, now() + interval '1 hour')`,
  `insert into sign_ups (token_hash, email, expires_at) values ('s' || $3, $3 || '@wall.example', now() + interval '1 hour')`,
  `insert into idempotency_keys (person_id, key, request_hash, status, answer) values ($2, $3, 'h', 201, '{}')`,
  `insert into paint_optics (workshop_id, engine_version, data) values ($1, '1', '{}')`,
  `insert into paints (workshop_id, name, kind, base, known, optics_id, reducer_per_100, film_per_pass, volume_solids, density, rest_minutes, hazards, note)
    select $1, $3, 'opaque', 'water', '{}', id, 0, 1, .3, 1, 5, '[]', '' from paint_optics where workshop_id = $1`,
  `insert into blanks (workshop_id, name, shape) values ($1, $3, '{}')`,
  `insert into masks (workshop_id, name, form) values ($1, $3, '{}')`,
  `insert into schemes (workshop_id, name, blank_id, draft) select $1, $3, id, '{}' from blanks where workshop_id = $1`,
  `insert into build_ups (workshop_id, name, sequence) values ($1, $3, '{}')`,
  `insert into revisions (workshop_id, scheme_id, number, note, body, materials, body_hash, engine_version) select $1, id, 1, '', '{}', '{}', 'h', '1' from schemes where workshop_id = $1`,
  `insert into runs (workshop_id, number, scheme_id, revision_id, pieces) select $1, 1, scheme_id, id, 3 from revisions where workshop_id = $1`,
  `insert into run_events (id, workshop_id, run_id, kind, body, done_at) select gen_random_uuid(), $1, id, 'x', '{}', now() from runs where workshop_id = $1`,
  `insert into bottles (workshop_id, paint_id, code, ml) select $1, id, $3, 10 from paints where workshop_id = $1`,
  `insert into bottle_uses (workshop_id, run_id, paint_id, bottle_id, ml) select $1, r.id, b.paint_id, b.id, 1 from runs r, bottles b where r.workshop_id = $1 and b.workshop_id = $1`,
  `insert into run_bottles (workshop_id, run_id, paint_id, bottle_id) select $1, r.id, b.paint_id, b.id from runs r, bottles b where r.workshop_id = $1 and b.workshop_id = $1`,
  `insert into run_painters (workshop_id, run_id, person_id) select $1, id, $2 from runs where workshop_id = $1`,
  `insert into run_measures (workshop_id, run_id, piece, zones, engine_version) select $1, id, 1, '[]', '1' from runs where workshop_id = $1`,
  `insert into run_measures_withdrawn (measure_id, workshop_id) select id, $1 from run_measures where workshop_id = $1`,
  `insert into photos (workshop_id, scheme_id, sha256, format, bytes, width, height, position) select $1, id, 'h', 'jpeg', 1, 1, 1, 0 from schemes where workshop_id = $1`,
  `insert into cards (workshop_id, scheme_id, content, token_hash) select $1, id, '{}', 'c' || $3 from schemes where workshop_id = $1`,
  `insert into scheme_colours (workshop_id, scheme_id, side, zone, label, lightness, a, b) select $1, id, 'draft', 'back', 'Back', 50, 0, 0 from schemes where workshop_id = $1`,
  `insert into scheme_paints (workshop_id, scheme_id, paint_id) select $1, s.id, p.id from schemes s, paints p where s.workshop_id = $1 and p.workshop_id = $1`,
  `insert into saved_searches (workshop_id, person_id, name, wish) values ($1, $2, $3, '{}')`,
  `insert into pictures (hash, workshop_id, engine_version, object_key) values ('h' || $3, $1, '1', 'k')`,
]

let here: Ctx
let there: Ctx
beforeAll(async () => {
  here = await filled('here')
  there = await filled('there')
})

const tables = async () => (await asOwner<{ name: string }>(
  `select tablename as name from pg_tables where schemaname = 'public' order by 1`)).map(row => row.name)

it('stands round every table there is', async () => {
  const without = await asOwner<{ name: string }>(
    `select relname as name from pg_class where relnamespace = 'public'::regnamespace and relkind = 'r' and not relrowsecurity`)
  expect(without.map(row => row.name)).toEqual(Object.keys(OUTSIDE))
  for (const table of (await tables()).filter(name => !(name in OUTSIDE)))
    expect(await asOwner(`select 1 from ${table}`), `${table} has no row to look for: add one to ONE_OF_EACH`).not.toEqual([])
})

describe('a raw query as the server\'s own role', () => {
  it('sees nothing at all when nothing is declared', async () => {
    const db = await testDatabase()
    for (const table of (await tables()).filter(name => !(name in OUTSIDE))) {
      const seen = await inTransactionAs(db, {}, async tx => (await tx.execute(sql.raw(`select * from ${table}`))).rows)
      expect({ table, seen }).toEqual({ table, seen: [] })
    }
  })

  it('sees the rows of its own workshop and person, and none of another', async () => {
    const theirs = [there.workshopId, there.personId, there.sessionId, 'there']
    for (const table of (await tables()).filter(name => !(name in OUTSIDE))) {
      const seen = await asHere(`select * from ${table}`)
      if (!BY_LINK_ONLY.includes(table)) expect({ table, isSeen: seen.length > 0 }).toEqual({ table, isSeen: true })
      const text = JSON.stringify(seen)
      for (const word of theirs) expect({ table, word, isThere: text.includes(word) }).toEqual({ table, word, isThere: false })
    }
  })

  it('changes and removes nothing of another workshop', async () => {
    for (const table of ['paints', 'bottles', 'bottle_uses', 'run_bottles', 'run_painters', 'schemes', 'scheme_colours', 'colour_fills', 'scheme_paints', 'scheme_words', 'saved_searches', 'blanks', 'masks', 'runs', 'photos', 'cards', 'invitations', 'memberships', 'sessions']) {
      const { workshopId } = there
      const changed = await asHere(`update ${table} set workshop_id = workshop_id where workshop_id = '${workshopId}' returning 1`)
      const removed = await asHere(`delete from ${table} where workshop_id = '${workshopId}' returning 1`)
      expect({ table, changed, removed }).toEqual({ table, changed: [], removed: [] })
    }
  })

  it('puts nothing into another workshop', async () => {
    await expect(asHere(`insert into blanks (workshop_id, name, shape) values ('${there.workshopId}', 'x', '{}')`)).rejects.toMatchObject({ cause: { code: '42501' } })
    await expect(asHere(`update blanks set workshop_id = '${there.workshopId}'`)).rejects.toMatchObject({ cause: { code: '42501' } })
  })

  it('makes nobody a member of a workshop they were not asked into, nor an owner of their own place', async () => {
    const { workshopId } = there
    await expect(inTransactionAs(here.db, { personId: here.personId }, tx =>
      tx.execute(sql`insert into memberships (workshop_id, person_id, role) values (${workshopId}, ${here.personId}, 'owner')`)))
      .rejects.toMatchObject({ cause: { code: '42501' } })
    const raised = await inTransactionAs(here.db, { personId: here.personId }, async tx =>
      (await tx.execute(sql`update memberships set role = 'owner' where person_id = ${here.personId} returning 1`)).rows)
    expect(raised).toEqual([])
  })

  it('does not change what is written once', async () => {
    for (const table of ['revisions', 'run_events', 'run_measures', 'paint_optics'])
      await expect(asHere(`update ${table} set workshop_id = workshop_id`)).rejects.toMatchObject({ cause: { code: '42501' } })
  })

  it('cannot step out of its role, make tables or switch the wall off', async () => {
    for (const way of ['set role countershade_owner', 'create table public.x (y int)', 'alter table paints disable row level security'])
      await expect(asHere(way), way).rejects.toThrow()
  })

  it('leaves nothing declared for whoever gets the connection next', async () => {
    await asHere('select 1')
    const left = await Promise.all(Array.from({ length: 12 }, () => here.db.execute(sql`select current_setting('app.workshop_id', true) as left`)))
    for (const { rows } of left) expect(rows[0]?.left || null).toBeNull()
  })
})

async function asHere(statement: string): Promise<unknown[]> {
  const { workshopId, personId, sessionId } = here
  return inTransactionAs(here.db, { workshopId, personId, sessionId }, async tx => (await tx.execute(sql.raw(statement))).rows)
}

async function filled(word: string): Promise<Ctx> {
  const { ctx } = await testWorkshop({ role: 'painter', name: word })
  for (const statement of ONE_OF_EACH) {
    const used = [ctx.workshopId, ctx.personId, word]
    await asOwner(renumbered(statement), used.filter((_, i) => statement.includes(`$${i + 1}`)))
  }
  return ctx
}

/** PostgreSQL wants every parameter used: those a statement leaves out are closed up. */
function renumbered(statement: string): string {
  const used = [1, 2, 3].filter(n => statement.includes(`$${n}`))
  return statement.replace(/\$(\d)/g, (_, n: string) => `$${used.indexOf(Number(n)) + 1}`)
    .replace(/\$(\d) \|\|/g, '$$$1::text ||').replace(/\|\| \$(\d)/g, '|| $$$1::text')
}
