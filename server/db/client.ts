import { drizzle } from 'drizzle-orm/node-postgres'
import type { NodePgQueryResultHKT } from 'drizzle-orm/node-postgres'
import type { ExtractTablesWithRelations } from 'drizzle-orm'
import type { PgDatabase } from 'drizzle-orm/pg-core'
import { Pool } from 'pg'
import { settings } from '#server/settings'
import * as tables from '#server/db/tables/index'

/** Where queries go: the pool, or a transaction on one of its connections. */
export type Database = PgDatabase<NodePgQueryResultHKT, typeof tables, ExtractTablesWithRelations<typeof tables>>

/** An open database and the way to let go of it. */
export interface OpenDatabase {
  db: Database
  close: () => Promise<void>
}

/** Connections one process holds at most; several processes share one database. */
const CONNECTIONS_MAX = 10

/**
 * Opens a database. Every connection takes on the role that owns no table, whoever it signed in as, so that
 * row-level security holds for each query of the server.
 */
export function openDatabase(url: string): OpenDatabase {
  const pool = new Pool({
    connectionString: url,
    max: CONNECTIONS_MAX,
    connectionTimeoutMillis: 10_000,
    options: '-c role=countershade_app -c statement_timeout=30000 -c idle_in_transaction_session_timeout=30000',
  })
  // A connection the database ended while it was idle is replaced at the next query; without a listener it would end the process.
  pool.on('error', error => console.warn(`A database connection ended: ${error.message}`))
  return { db: drizzle(pool, { schema: tables }), close: () => pool.end() }
}

let current: OpenDatabase | undefined

/** The database this server works on, opened at the first use. */
export function database(): Database {
  current ??= openDatabase(settings().databaseUrl)
  return current.db
}

/** Lets go of the server's connections, at the end of the process. */
export async function closeDatabase(): Promise<void> {
  const open = current
  current = undefined
  await open?.close()
}
