import { type H3Event, getCookie } from 'h3'
import { clearUserSession, getUserSession, replaceUserSession } from '#sealed-session'
import { settings } from '#server/settings'

/** The cookie's name; over https one that a browser refuses from any other host or path. */
export function sessionCookieName(): string {
  return isHttps() ? '__Host-countershade' : 'countershade'
}

/** How the cookie is sealed and sent. The row behind it decides how long it lasts; browsers keep a cookie 400 days at most. */
export function sessionCookie() {
  return {
    name: sessionCookieName(),
    password: settings().sessionPassword,
    maxAge: 400 * 24 * 3600,
    sessionHeader: false as const,
    cookie: { httpOnly: true, sameSite: 'lax' as const, secure: isHttps(), path: '/' },
  }
}

/** The session id sealed in the request's cookie; null without one. A visitor without a cookie is not given one. */
export async function readSessionId(event: H3Event): Promise<string | null> {
  if (!getCookie(event, sessionCookieName())) return null
  const sealed = await getUserSession(event)
  return sealed.secure?.sessionId ?? null
}

/** Seals a session id into the answer's cookie. */
export async function writeSessionId(event: H3Event, sessionId: string): Promise<void> {
  await replaceUserSession(event, { secure: { sessionId } })
}

/** Takes the cookie back. */
export async function forgetSessionId(event: H3Event): Promise<void> {
  await clearUserSession(event)
}

function isHttps(): boolean {
  return settings().publicUrl.startsWith('https:')
}
