import { readFileSync } from 'node:fs'
import { inject, expect, it } from 'vitest'
import { Client } from 'pg'

/** The migrations before bottles, and the one that brings them. */
const BEFORE = ['0000_tables', '0001_walls', '0002_sign_ups']
const BRINGS = '0003_bottles_and_the_day'

async function on<T>(database: string, work: (client: Client) => Promise<T>): Promise<T> {
  const url = new URL(inject('pgAdminUrl'))
  url.pathname = `/${database}`
  const client = new Client({ connectionString: url.href })
  await client.connect()
  try {
    return await work(client)
  }
  finally {
    await client.end()
  }
}

async function migrate(client: Client, names: readonly string[]): Promise<void> {
  for (const name of names) for (const statement of readFileSync(`drizzle/${name}.sql`, 'utf8').split('--> statement-breakpoint')) await client.query(statement)
}

it('what a workshop had left of a paint becomes one open bottle of it, and nothing of an empty one', async () => {
  const name = `before_${crypto.randomUUID().replaceAll('-', '')}`
  await on('postgres', client => client.query(`create database "${name}" template template0`))
  try {
    const bottles = await on(name, async (client) => {
      await migrate(client, BEFORE)
      await client.query(`insert into workshops (id, name) values (gen_random_uuid(), 'Old bench')`)
      await client.query(`insert into paint_optics (workshop_id, engine_version, data) select id, '1', '{}' from workshops`)
      for (const [paint, left] of [['Bone', 48.5], ['Empty tan', 0]] as const) await client.query(
        `insert into paints (workshop_id, name, kind, base, known, optics_id, reducer_per_100, film_per_pass, volume_solids, density, rest_minutes, hazards, note, volume_left)
          select workshop_id, $1, 'opaque', 'water', '{}', id, 0, 1, 20, 1, 5, '[]', '', $2 from paint_optics`, [paint, left])
      await migrate(client, [BRINGS])
      return (await client.query<{ name: string, ml: number, state: string, code: string }>('select p.name, b.ml, b.state, b.code from bottles b join paints p on p.id = b.paint_id and p.workshop_id = b.workshop_id')).rows
    })
    expect(bottles).toEqual([{ name: 'Bone', ml: 48.5, state: 'open', code: expect.stringMatching(/^[\dA-F]{8}$/) as string }])
  }
  finally {
    await on('postgres', client => client.query(`drop database "${name}" with (force)`))
  }
})
