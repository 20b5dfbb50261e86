import type { AccessRow } from './row'

/** Signing in and out, people, invitations, workshops, sessions and passwords. */
export const PEOPLE_ACCESS: AccessRow[] = []
