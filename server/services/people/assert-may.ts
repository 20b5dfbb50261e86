import type { Ctx } from '#server/services/ctx'
import { Problem } from '#shared/errors/problem'
import { type Action, may } from '#shared/people/may'

/** Refuses what the acting person's role does not include: the first line of every verb. */
export function assertMay(ctx: Pick<Ctx, 'role'>, action: Action): void {
  if (!may(ctx.role, action)) throw new Problem({ code: 'auth/not-allowed', action })
}
