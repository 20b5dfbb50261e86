import type { Ctx } from '#server/services/ctx'
import { startRun } from '#server/services/bench/start-run'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import type { RunAct, RunEvent } from '#shared/bench/run-event'
import type { RunListItem } from '#shared/bench/run-view'
import type { SchemeBody } from '#shared/scheme/body'
import { coatsOf } from '#shared/scheme/stack-order'
import { testScheme } from '../scheme/ground'

/** A scheme with one published revision, and the ids of its coats. */
export async function publishedScheme(ctx: Ctx, secret = 'base'): Promise<{ schemeId: string, body: SchemeBody, coatIds: string[] }> {
  const { scheme, body } = await testScheme(ctx, { secret })
  await publishScheme(ctx, scheme.id, 1, { note: '' })
  return { schemeId: scheme.id, body, coatIds: coatsOf(body.stack).map(coat => coat.id) }
}

/** A run of six pieces. */
export async function testRun(ctx: Ctx, { pieces = 6, secret = 'base' } = {}): Promise<{ run: RunListItem, schemeId: string, body: SchemeBody, coatIds: string[] }> {
  const published = await publishedScheme(ctx, secret)
  return { run: await startRun(ctx, { schemeId: published.schemeId, revision: 1, pieces }), ...published }
}

/** An act with an id of its own, done just now or so many seconds ago. */
export function act(what: RunAct, secondsAgo = 0): RunEvent {
  return { id: crypto.randomUUID(), doneAt: new Date(Date.now() - secondsAgo * 1000).toISOString(), act: what }
}

/** Passes of a coat on pieces. */
export function pass(coatId: string, pieces: number[], passes = 1): RunEvent {
  return act({ v: 1, kind: 'pass-laid', coatId, pieces, passes })
}
