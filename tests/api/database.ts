import { afterAll, inject } from 'vitest'
import { Client } from 'pg'
import { type Database, type OpenDatabase, openDatabase } from '#server/db/client'

declare module 'vitest' {
  interface ProvidedContext {
    /** A PostgreSQL that tests may make databases in, as its superuser. */
    pgAdminUrl: string
    /** The database with every migration, which each test file clones. */
    templateDatabase: string
  }
}

/** The role the server works as: it owns no table. */
const APP_ROLE = 'countershade_app'

let current: { name: string, open: OpenDatabase } | undefined

/** The database of this test file: a clone of the migrated template, opened as the server opens it. */
export async function testDatabase(): Promise<Database> {
  return (await ensure()).open.db
}

/** Where the test file's database is, for a server of its own. */
export async function testDatabaseUrl(): Promise<string> {
  return urlOf((await ensure()).name, APP_ROLE)
}

/** Runs one statement past row-level security: to see what is really there. */
export async function asOwner<Row extends object>(statement: string, values: unknown[] = []): Promise<Row[]> {
  return onClient(urlOf((await ensure()).name), async client => (await client.query<Row>(statement, values)).rows)
}

afterAll(async () => {
  if (!current) return
  const { name, open } = current
  current = undefined
  await open.close()
  await onClient(inject('pgAdminUrl'), client => client.query(`drop database "${name}" with (force)`))
})

let opening: Promise<{ name: string, open: OpenDatabase }> | undefined

function ensure(): Promise<{ name: string, open: OpenDatabase }> {
  opening ??= clone()
  return opening
}

async function clone(): Promise<{ name: string, open: OpenDatabase }> {
  const name = `file_${crypto.randomUUID().replaceAll('-', '')}`
  await onClient(inject('pgAdminUrl'), client =>
    client.query(`create database "${name}" template "${inject('templateDatabase')}" strategy file_copy`))
  current = { name, open: openDatabase(urlOf(name, APP_ROLE)) }
  return current
}

function urlOf(name: string, role?: string): string {
  const url = new URL(inject('pgAdminUrl'))
  if (role !== undefined) url.username = role
  url.pathname = `/${name}`
  return url.href
}

async function onClient<T>(url: string, work: (client: Client) => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: url })
  await client.connect()
  try {
    return await work(client)
  }
  finally {
    await client.end()
  }
}
