import { sql } from 'drizzle-orm'
import { PgTransaction } from 'drizzle-orm/pg-core'
import type { Database } from '#server/db/client'
import type { PersonCtx } from '#server/services/ctx'

/**
 * What a transaction declares about itself; the database shows it the rows that belong to these and no others.
 * `email` and `tokenHash` are for those who have no session yet: somebody signing in, somebody holding a link.
 */
export interface Claims {
  workshopId?: string | null
  personId?: string
  sessionId?: string
  email?: string
  tokenHash?: string
}

const SETTING = {
  workshopId: 'app.workshop_id',
  personId: 'app.person_id',
  sessionId: 'app.session_id',
  email: 'app.email',
  tokenHash: 'app.token_hash',
} as const satisfies Record<keyof Claims, string>

/** Adds to what the transaction `tx` declares; lasts until it ends. */
export async function declare(tx: Database, claims: Claims): Promise<void> {
  const names = (Object.keys(SETTING) as (keyof Claims)[]).filter(name => claims[name] !== undefined)
  if (names.length === 0) return
  const settings = names.map(name => sql`set_config(${SETTING[name]}, ${claims[name] ?? ''}, true)`)
  await tx.execute(sql`select ${sql.join(settings, sql`, `)}`)
}

/**
 * Runs `work` in one transaction as the acting person in their workshop: all of it happens, or nothing.
 * Called inside another one it joins it, so that verbs can be built of verbs.
 */
export async function inTransaction<C extends PersonCtx, T>(ctx: C, work: (tx: C) => Promise<T>): Promise<T> {
  if (isTransaction(ctx.db)) return work(ctx)
  return inTransactionAs(ctx.db, claimsOf(ctx), db => work({ ...ctx, db }))
}

/** Runs `work` in one transaction that declares `claims` only: for those without a session. Joins an outer transaction, adding to its claims. */
export async function inTransactionAs<T>(db: Database, claims: Claims, work: (tx: Database) => Promise<T>): Promise<T> {
  if (isTransaction(db)) {
    await declare(db, claims)
    return work(db)
  }
  return db.transaction(async (tx) => {
    await declare(tx, claims)
    return work(tx)
  })
}

function claimsOf(ctx: PersonCtx & { workshopId?: string }): Claims {
  return { workshopId: ctx.workshopId, personId: ctx.personId, sessionId: ctx.sessionId }
}

function isTransaction(db: Database): boolean {
  return db instanceof PgTransaction
}
