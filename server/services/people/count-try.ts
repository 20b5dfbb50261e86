import { createHash } from 'node:crypto'
import { eq, sql } from 'drizzle-orm'
import type { Database } from '#server/db/client'
import { tries } from '#server/db/tables/people'
import { Problem } from '#shared/errors/problem'

/** A door, how often it may be tried by one key, and in what time. */
export interface Door {
  name: string
  tries: number
  seconds: number
}

const MINUTES = 60

/** By address and account together: somebody guessing at one account from one place. */
export const SIGN_IN_HERE: Door = { name: 'sign-in-here', tries: 10, seconds: 15 * MINUTES }
/** By account alone, far looser: so that many places cannot guess at it together, and few cannot lock its person out. */
export const SIGN_IN_ACCOUNT: Door = { name: 'sign-in-account', tries: 100, seconds: 60 * MINUTES }
/** By address alone: somebody going through many accounts. */
export const SIGN_IN_ADDRESS: Door = { name: 'sign-in-address', tries: 100, seconds: 15 * MINUTES }
/** Letters to one mailbox. */
export const LETTERS_MAILBOX: Door = { name: 'letters-mailbox', tries: 5, seconds: 60 * MINUTES }
/** Letters asked for from one address. */
export const LETTERS_ADDRESS: Door = { name: 'letters-address', tries: 30, seconds: 60 * MINUTES }
/** Invitations one workshop sends. */
export const INVITATIONS_WORKSHOP: Door = { name: 'invitations', tries: 50, seconds: 24 * 60 * MINUTES }
/** Links tried from one address. */
export const LINKS_ADDRESS: Door = { name: 'links-address', tries: 60, seconds: 15 * MINUTES }

/**
 * Counts one try at a door and refuses when there were too many. Counted in the database, outside the caller's
 * transaction, so that every process counts together and a try that failed still counts.
 */
export async function countTry(db: Database, door: Door, ...key: string[]): Promise<void> {
  const length = sql`make_interval(secs => ${door.seconds})`
  const [row] = await db.insert(tries)
    .values({ key: keyOf(door, key), count: 1, windowEndsAt: sql`now() + ${length}` })
    .onConflictDoUpdate({
      target: tries.key,
      set: {
        count: sql`case when ${tries.windowEndsAt} < now() then 1 else ${tries.count} + 1 end`,
        windowEndsAt: sql`case when ${tries.windowEndsAt} < now() then now() + ${length} else ${tries.windowEndsAt} end`,
      },
    })
    .returning({ count: tries.count, secondsLeft: sql<number>`ceil(extract(epoch from ${tries.windowEndsAt} - now()))::int` })
  if (row && row.count > door.tries)
    throw new Problem({ code: 'auth/too-many-tries', retryAfterSeconds: Math.max(1, row.secondsLeft) })
}

/** Forgets the tries at a door: the person got in. */
export async function forgetTries(db: Database, door: Door, ...key: string[]): Promise<void> {
  await db.delete(tries).where(eq(tries.key, keyOf(door, key)))
}

/** Whom an address belongs to: one IPv4 address, or the network an IPv6 address is handed out from. */
export function addressKey(address: string): string {
  const v4 = /^(?:::ffff:)?(\d+\.\d+\.\d+\.\d+)$/i.exec(address)?.[1]
  if (v4) return v4
  const [front, back] = address.split('%')[0]!.split('::').map(half => half.split(':').filter(Boolean))
  if (!front) return address
  const zeros = back ? Array<string>(Math.max(0, 8 - front.length - back.length)).fill('0') : []
  return [...front, ...zeros, ...(back ?? [])].slice(0, 4).map(group => group.padStart(4, '0').toLowerCase()).join(':')
}

/** Sweeps out everything whose time has ended: sessions, links, keys and counts. */
export async function sweepEnded(db: Database): Promise<void> {
  await db.execute(sql`select sweep_ended()`)
}

/** What was tried and by whom is not kept in the clear. */
function keyOf(door: Door, key: readonly string[]): string {
  return `${door.name}:${createHash('sha256').update(key.join('\n')).digest('base64url')}`
}
