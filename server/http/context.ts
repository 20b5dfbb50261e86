import type { H3Event } from 'h3'
import { database } from '#server/db/client'
import { readSessionId } from '#server/http/session-cookie'
import type { Ctx, PersonCtx } from '#server/services/ctx'
import { assertMay } from '#server/services/people/assert-may'
import { type ResumedSession, resumeSession } from '#server/services/people/resume-session'
import { Problem } from '#shared/errors/problem'
import type { Action } from '#shared/people/may'

/** Who sent the request and in which workshop, when their role includes `action`; refuses otherwise. */
export async function requireContext(event: H3Event, action: Action): Promise<Ctx> {
  const { membership, ...person } = await requireSession(event)
  if (!membership) throw new Problem({ code: 'auth/no-workshop' })
  const ctx = { ...person, ...membership }
  assertMay(ctx, action)
  return ctx
}

/** Who sent the request, whatever workshop they are in. */
export async function requirePerson(event: H3Event): Promise<PersonCtx> {
  const { db, personId, sessionId } = await requireSession(event)
  return { db, personId, sessionId }
}

/** The session of the request, null for somebody signed out; looked up once a request. */
export async function findSession(event: H3Event): Promise<ResumedSession | null> {
  const context = event.context as { resumedSession?: Promise<ResumedSession | null> }
  context.resumedSession ??= resume(event)
  return context.resumedSession
}

async function requireSession(event: H3Event): Promise<ResumedSession> {
  const session = await findSession(event)
  if (!session) throw new Problem({ code: 'auth/signed-out' })
  return session
}

async function resume(event: H3Event): Promise<ResumedSession | null> {
  const sessionId = await readSessionId(event)
  return sessionId === null ? null : resumeSession(database(), sessionId)
}
