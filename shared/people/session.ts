import { z } from 'zod'
import type { Role } from './roles'
import type { WorkshopSettings } from './workshop'

/** Who is signed in, where, as what, and where else they could be. */
export interface SessionView {
  person: { id: string, name: string, email: string }
  workshop: ({ id: string, name: string, isDemo: boolean } & WorkshopSettings) | null
  role: Role | null
  workshops: { id: string, name: string, role: Role }[]
}

/** One of one's own sessions, to recognise and to end. */
export interface OwnSessionView {
  id: string
  device: string
  signedInAt: string
  seenAt: string
  isThis: boolean
}

export const SessionParams = z.object({ sessionId: z.uuid() })
