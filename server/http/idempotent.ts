import { createHash } from 'node:crypto'
import { and, eq, lt } from 'drizzle-orm'
import { type H3Event, getRequestHeader, setResponseHeader, setResponseStatus } from 'h3'
import { rawBody } from '#server/http/parse'
import { idempotencyKeys } from '#server/db/tables/people'
import type { PersonCtx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { Problem } from '#shared/errors/problem'

/** How long a repeated request is recognised, in milliseconds. */
const REMEMBERED = 48 * 3600 * 1000

/**
 * Answers a creation with `status`. With an `Idempotency-Key` the same request sent again (a tablet that lost the answer)
 * gets the first answer and makes nothing; the same key with another body is refused.
 * `make` gets the context of the transaction it must work in, so that key, work and answer are stored together or not at all.
 */
export async function idempotent<C extends PersonCtx, T extends object>(
  event: H3Event, ctx: C, status: number, make: (tx: C) => Promise<T>,
): Promise<T> {
  const key = getRequestHeader(event, 'idempotency-key')
  if (key === undefined) {
    const answer = await inTransaction(ctx, make)
    setResponseStatus(event, status)
    return answer
  }
  if (!/^[\w-]{8,100}$/.test(key))
    throw new Problem({ code: 'input/invalid', fields: [{ path: 'Idempotency-Key', message: 'Use 8 to 100 letters, digits, - or _.' }] })

  const requestHash = await hashOf(event, ctx)
  const own = and(eq(idempotencyKeys.personId, ctx.personId), eq(idempotencyKeys.key, key))
  const outcome = await inTransaction(ctx, async (tx) => {
    await tx.db.delete(idempotencyKeys).where(and(
      eq(idempotencyKeys.personId, tx.personId), lt(idempotencyKeys.createdAt, new Date(Date.now() - REMEMBERED))))
    // A twin of this request that is still at work holds the key: this waits for it, then finds its answer.
    const mine = await tx.db.insert(idempotencyKeys)
      .values({ personId: tx.personId, key, requestHash, status, answer: {} })
      .onConflictDoNothing().returning({ key: idempotencyKeys.key })
    if (mine.length > 0) {
      const answer = await make(tx)
      await tx.db.update(idempotencyKeys).set({ answer }).where(own)
      return { status, answer, again: false }
    }
    const [first] = await tx.db.select().from(idempotencyKeys).where(own)
    if (!first || first.requestHash !== requestHash) throw new Problem({ code: 'request/idempotency-key-reused' })
    return { status: first.status, answer: storedAnswer<T>(first.answer), again: true }
  })
  if (outcome.again) setResponseHeader(event, 'idempotency-replayed', 'true')
  setResponseStatus(event, outcome.status)
  return outcome.answer
}

async function hashOf(event: H3Event, ctx: PersonCtx & { workshopId?: string }): Promise<string> {
  const hash = createHash('sha256').update(`${event.method} ${event.path.split('?')[0]} ${ctx.workshopId ?? ''}\n`)
  return hash.update(await rawBody(event)).digest('hex')
}

/** What was stored is the JSON of an answer of this same route: its key and request hash say so. */
function storedAnswer<T>(answer: unknown): T {
  return answer as T
}
