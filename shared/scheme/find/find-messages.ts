import { z } from 'zod'
import type { FoundCoat } from '#shared/optics/find-coat'
import type { SureCoat } from '#shared/optics/find-spread'
import { LIGHTS } from '#shared/optics/lights'
import { SchemeBody } from '#shared/scheme/body'
import { Coat } from '#shared/scheme/coat'
import { Materials } from '#shared/scheme/materials'
import { Lab } from '#shared/shelf/paint'

/** What the find thread can be asked. A newer question takes the place of an older one. */
export const FindAsk = z.discriminatedUnion('ask', [
  z.object({
    ask: z.literal('find'),
    request: z.number().int(),
    look: z.object({ body: SchemeBody, materials: Materials }),
    /** Where the coat stands in the stack and on the blank; its cup is of no account. */
    coat: Coat,
    row: z.number().int().min(0),
    /** The zone of the picture its colour is judged in. */
    zone: z.string(),
    /** Judged under the clear, or dry before it. */
    clear: z.boolean(),
    target: Lab,
    paints: z.array(z.object({ id: z.string(), cup: z.string() })),
    second: z.enum(LIGHTS),
    passesMost: z.number().min(1).max(30),
    dropsMost: z.number().int().min(1).max(12),
    partsMost: z.number().int().min(1).max(3),
    answers: z.number().int().min(1).max(12),
  }),
  z.object({ ask: z.literal('stop') }),
])
export type FindAsk = z.output<typeof FindAsk>
export type FindQuestion = Omit<Extract<FindAsk, { ask: 'find' }>, 'ask' | 'request'>

/** What came of a search. */
export interface FindReport {
  /** What the zone looks like before the coat. */
  ground: FoundCoat['lab']
  paints: SureCoat[]
  mixes: SureCoat[]
  /** Something below gives off light, so no mixes were tried. */
  overGlow: boolean
  /** The coat hardly reaches the zone; it was judged as if it did. */
  hardlyReaches: boolean
}

/** What the find thread says. */
export type FindAnswer
  = | { answer: 'progress', request: number, done: number }
    /** The nearest so far: now and then while the search goes on, and when it was stopped. */
    | { answer: 'so far', request: number, report: FindReport }
    | { answer: 'found', request: number, report: FindReport }
    | { answer: 'failed', request: number, reason: string }
