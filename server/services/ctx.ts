import type { Database } from '#server/db/client'
import type { Role } from '#shared/people/roles'

/** Who acts, before any workshop is chosen. */
export interface PersonCtx {
  db: Database
  personId: string
  sessionId: string
}

/** Who acts, in which workshop and as what: everything a service may know about a request. */
export interface Ctx extends PersonCtx {
  workshopId: string
  role: Role
}
