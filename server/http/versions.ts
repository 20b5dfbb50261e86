import { type H3Event, getRequestHeader, setResponseHeader } from 'h3'
import { Problem } from '#shared/errors/problem'

/** Says which version of the thing was answered. */
export function etag(event: H3Event, version: number): void {
  setResponseHeader(event, 'etag', `"v${version}"`)
}

/**
 * The version the sender was looking at; a change without one is refused, so that nobody overwrites what they have not seen.
 * A mark made weak on the way (by a proxy that packs answers) still names the version.
 */
export function requireIfMatch(event: H3Event): number {
  const version = /^(?:W\/)?"v(\d{1,9})"$/.exec(getRequestHeader(event, 'if-match')?.trim() ?? '')?.[1]
  if (version === undefined) throw new Problem({ code: 'request/if-match-missing' })
  return Number(version)
}
