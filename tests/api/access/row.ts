/*
 * Who may reach which route: the reviewed table.
 *
 * To add a route: write a row in tests/api/access/<room>.ts (export an array, `export const SHELF_ACCESS: AccessRow[]`)
 * and put the array into tests/api/access-table.ts. A row says how a valid request is made and which status each
 * kind of person gets for it. The test makes a fresh workshop for every cell, so a `make` may change what it likes:
 *
 *   {
 *     method: 'PUT', path: '/api/paints/[paintId]',
 *     who: { owner: 200, painter: 200, bench: 403, desk: 403, stranger: 404, signedOut: 401 },
 *     make: async ({ owner }) => {
 *       const paint = await addPaint(owner, PAINT)
 *       return { url: `/api/paints/${paint.id}`, headers: { 'if-match': '"v1"' }, body: PAINT }
 *     },
 *   }
 *
 * `stranger` is the owner of another workshop: 404 for a thing of this one. Where a list answers them 200, the test
 * itself makes sure that nothing of this workshop (its ids, and whatever `make` names in `secret`) is in the answer.
 */
import type { Ctx } from '#server/services/ctx'
import type { Role } from '#shared/people/roles'

export const METHODS = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const

/** Somebody at the door. */
export type Who = Role | 'stranger' | 'signedOut'

/** A workshop with one person of each role, made for one cell of the table. `who` is the one about to ask. */
export interface Ground extends Record<Role, Ctx> {
  who: Who
}

/** A valid request, as the owner of the thing would send it. */
export interface AccessRequest {
  url: string
  /** Sent as JSON; a Uint8Array or FormData as it is. */
  body?: object
  headers?: Record<string, string>
  /** Words that must never reach a stranger. */
  secret?: string[]
}

export interface AccessRow {
  method: (typeof METHODS)[number]
  /** The address as its file under server/ says it: '/api/paints/[paintId]'. */
  path: string
  who: Record<Who, number>
  /** It lets whoever asks rightly into the workshop, which they may see from then on. */
  letsIn?: boolean
  make: (ground: Ground) => Promise<AccessRequest> | AccessRequest
}
