import type { H3Event } from 'h3'
import { database } from '#server/db/client'
import { writeSessionId } from '#server/http/session-cookie'
import { getSession } from '#server/services/people/get-session'
import { resumeSession } from '#server/services/people/resume-session'
import { Problem } from '#shared/errors/problem'
import type { SessionView } from '#shared/people/session'

/** Hands over the cookie of a session that was just opened, and answers with what it opens. */
export async function answerSession(event: H3Event, sessionId: string): Promise<SessionView> {
  const session = await resumeSession(database(), sessionId)
  if (!session) throw new Problem({ code: 'auth/signed-out' })
  await writeSessionId(event, sessionId)
  return getSession(session, session.membership?.workshopId ?? null)
}
