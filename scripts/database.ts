import { drizzle } from 'drizzle-orm/node-postgres'
import { migrate } from 'drizzle-orm/node-postgres/migrator'
import { Client } from 'pg'

/** Owns the tables and changes them. */
export const OWNER_ROLE = 'countershade_owner'

/** Works on the tables and owns none, so that row-level security holds for it. */
export const APP_ROLE = 'countershade_app'

/** Any number, as long as all who migrate agree on it. */
const MIGRATION_LOCK = 731_904_226

async function onClient<T>(url: string, work: (client: Client) => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: url, connectionTimeoutMillis: 10_000 })
  await client.connect()
  try {
    return await work(client)
  }
  finally {
    await client.end()
  }
}

/** The same address for another role and database of the same server. */
export function addressOf(adminUrl: string, role: string, name: string): string {
  const url = new URL(adminUrl)
  url.username = role
  url.pathname = `/${name}`
  return url.href
}

/** Makes the two roles where they are missing; asks for the server's superuser. */
export async function ensureRoles(adminUrl: string): Promise<void> {
  await onClient(adminUrl, async (client) => {
    // The owner may make roles, since the migrations make the app role where a server has none yet.
    for (const [role, rights] of [[OWNER_ROLE, 'login createrole'], [APP_ROLE, 'login']] as const) {
      const { rowCount } = await client.query('select 1 from pg_roles where rolname = $1', [role])
      if (rowCount === 0) await client.query(`create role ${role} ${rights}`)
    }
    // The owner hands rights to the app role, and may act as it.
    await client.query(`grant ${APP_ROLE} to ${OWNER_ROLE}`)
  })
}

/** Makes a database for the owner where it is missing. */
export async function ensureDatabase(adminUrl: string, name: string): Promise<void> {
  await onClient(adminUrl, async (client) => {
    const { rowCount } = await client.query('select 1 from pg_database where datname = $1', [name])
    if (rowCount === 0) await client.query(`create database "${name}" owner ${OWNER_ROLE} template template0 encoding 'UTF8'`)
  })
}

/** Throws a database away, with whoever is connected to it. */
export async function dropDatabase(adminUrl: string, name: string): Promise<void> {
  await onClient(adminUrl, client => client.query(`drop database if exists "${name}" with (force)`))
}

/** Brings the tables up to date; of several who try at once, one does it and the others wait. */
export async function migrateDatabase(ownerUrl: string, migrationsFolder: string): Promise<void> {
  await onClient(ownerUrl, async (client) => {
    await client.query('select pg_advisory_lock($1)', [MIGRATION_LOCK])
    await migrate(drizzle(client), { migrationsFolder })
  })
}

/** True when some workshop is in the database. */
export async function hasWorkshop(ownerUrl: string): Promise<boolean> {
  const { rows } = await onClient(ownerUrl, client => client.query<{ found: boolean }>('select exists (select from workshops) as found'))
  return rows[0]?.found === true
}
