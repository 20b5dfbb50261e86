import { type H3Event, getQuery, getRequestHeader, getRouterParams } from 'h3'
import type { z } from 'zod'
import { readLimited } from '#server/http/read-limited'
import { Problem } from '#shared/errors/problem'

/** Largest JSON body, in bytes. */
export const BODY_MAX = 1024 * 1024

/** The raw body of this request, read once; `parseBody` and `idempotent` both need it. Whoever reads it first says how much it may be. */
export async function rawBody(event: H3Event, maxBytes = BODY_MAX): Promise<Buffer> {
  const context = event.context as { rawBody?: Promise<Buffer> }
  context.rawBody ??= readLimited(event, maxBytes)
  return context.rawBody
}

/** The body of the request, checked. JSON only, so that no plain form of another site can send one. Files that are taken in may be larger than the rest. */
export async function parseBody<S extends z.ZodType>(event: H3Event, schema: S, maxBytes = BODY_MAX): Promise<z.output<S>> {
  const type = getRequestHeader(event, 'content-type')?.split(';')[0]?.trim().toLowerCase()
  if (type !== 'application/json') throw invalid([{ path: '', message: 'Send application/json.' }])
  return parsed(schema, jsonOf(await rawBody(event, maxBytes)))
}

/** The query of the address, checked. */
export function parseQuery<S extends z.ZodType>(event: H3Event, schema: S): z.output<S> {
  return parsed(schema, getQuery(event))
}

/** The named parts of the address, checked. */
export function parseParams<S extends z.ZodType>(event: H3Event, schema: S): z.output<S> {
  return parsed(schema, getRouterParams(event, { decode: true }))
}

function jsonOf(bytes: Buffer): unknown {
  try {
    return JSON.parse(bytes.toString('utf8'))
  }
  catch {
    throw invalid([{ path: '', message: 'This is not JSON.' }])
  }
}

function parsed<S extends z.ZodType>(schema: S, value: unknown): z.output<S> {
  const result = schema.safeParse(value)
  if (result.success) return result.data
  throw invalid(result.error.issues.map(issue => ({ path: issue.path.join('.'), message: issue.message })))
}

function invalid(fields: { path: string, message: string }[]): Problem {
  return new Problem({ code: 'input/invalid', fields })
}
