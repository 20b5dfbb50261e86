import { z } from 'zod'

const plain = <C extends string>(code: C) => z.object({ code: z.literal(code) })

/** Everything that can be refused, by a stable code. The server adds a status, the interface a sentence; the compiler asks for both. */
export const ProblemData = z.discriminatedUnion('code', [
  plain('auth/signed-out'),
  plain('auth/wrong-sign-in'),
  z.object({ code: z.literal('auth/too-many-tries'), retryAfterSeconds: z.number().int() }),
  plain('auth/no-workshop'),
  z.object({ code: z.literal('auth/not-allowed'), action: z.string() }),
  plain('request/forbidden-origin'),
  plain('request/not-found'),
  plain('request/too-large'),
  plain('request/if-match-missing'),
  plain('request/idempotency-key-reused'),
  z.object({
    code: z.literal('input/invalid'),
    fields: z.array(z.object({ path: z.string(), message: z.string() })),
  }),
  plain('people/email-taken'),
  plain('people/link-ended'),
  plain('people/not-found'),
  plain('people/last-owner'),
  plain('people/already-member'),
  plain('workshop/not-found'),
  plain('workshop/not-demo'),
  plain('paint/not-found'),
  plain('paint/changed-meanwhile'),
  z.object({ code: z.literal('paint/unknown-colour'), reason: z.string() }),
  plain('bottle/not-found'),
  plain('bottle/changed-meanwhile'),
  plain('blank/not-found'),
  plain('blank/changed-meanwhile'),
  plain('blank/built-in'),
  plain('mask/not-found'),
  plain('mask/changed-meanwhile'),
  plain('scheme/not-found'),
  z.object({ code: z.literal('scheme/changed-meanwhile'), version: z.number().int() }),
  z.object({ code: z.literal('scheme/not-publishable'), reasons: z.array(z.string()) }),
  plain('scheme/nothing-changed'),
  plain('scheme/never-published'),
  plain('scheme/too-many-listening'),
  plain('revision/not-found'),
  plain('build-up/not-found'),
  plain('build-up/changed-meanwhile'),
  plain('run/not-found'),
  plain('run/finished'),
  plain('run/too-many-listening'),
  z.object({ code: z.literal('run/event-refused'), reason: z.string() }),
  plain('photo/not-found'),
  plain('photo/not-an-image'),
  z.object({ code: z.literal('photo/too-large'), maxBytes: z.number().int(), maxPixels: z.number().int() }),
  plain('photo/unreadable'),
  z.object({ code: z.literal('picture/too-many-waiting'), retryAfterSeconds: z.number().int() }),
  z.object({ code: z.literal('photo/too-many'), max: z.number().int() }),
  plain('card/not-found'),
  plain('card/changed-meanwhile'),
  plain('card/no-photo'),
  plain('server/failed'),
])
export type ProblemData = z.output<typeof ProblemData>
export type ProblemCode = ProblemData['code']

/** A refusal on the merits: the only error a service throws on purpose. */
export class Problem extends Error {
  override name = 'Problem'

  constructor(readonly data: ProblemData) {
    super(data.code)
  }
}
