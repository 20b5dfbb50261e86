import type { Ctx } from '#server/services/ctx'
import { resumeSession } from '#server/services/people/resume-session'
import { type Action, may } from '#shared/people/may'

/** Somebody who follows something, as they are now; null when their session, their place in the workshop or their right to it ended. */
export async function stillHere(ctx: Ctx, action: Action): Promise<Ctx | null> {
  const session = await resumeSession(ctx.db, ctx.sessionId)
  const { membership } = session ?? {}
  if (!membership || membership.workshopId !== ctx.workshopId || !may(membership.role, action)) return null
  return { ...ctx, role: membership.role }
}
