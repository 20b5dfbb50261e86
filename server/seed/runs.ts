import { randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import type { PublishedDemo } from './finishes'
import { runs } from '#server/db/tables'
import type { Ctx } from '#server/services/ctx'
import { recordActs } from '#server/services/bench/record-acts'
import { inTransaction } from '#server/services/in-transaction'
import { startRun } from '#server/services/bench/start-run'
import type { RunAct, RunEvent } from '#shared/bench/run-event'
import { runSteps } from '#shared/bench/run-steps'

/** A batch of the demo: of which finish, how many pieces, how long ago begun, and how much of its steps is done. */
interface DemoRun {
  finish: string
  pieces: number
  hoursAgo: number
  /** Share of the steps that are done; 1 is a finished run. */
  done: number
  /** What the bench did differently at a coat. */
  deviation?: { coat: string, what: 'passes' | 'thinning' | 'wait', note: string }
  aside?: { piece: number, reason: string }
}

const DEMO_RUNS: readonly DemoRun[] = [
  {
    finish: 'Roach, low sun', pieces: 6, hoursAgo: 220, done: 1,
    deviation: { coat: 'Silver through the mesh', what: 'passes', note: 'One pass more on all: the new bottle of silver covers less.' },
  },
  {
    finish: 'Brook trout, October', pieces: 4, hoursAgo: 96, done: 1, aside: { piece: 3, reason: 'Run in the belly, sanded back for the next batch.' },
  },
  {
    finish: 'Perch, evening water', pieces: 12, hoursAgo: 3, done: 0.5,
    deviation: { coat: 'Olive through the mesh', what: 'wait', note: 'Damp day: 30 minutes before the mesh instead of 5.' },
    aside: { piece: 12, reason: 'Mesh slipped at the tail.' },
  },
]

/** Minutes from one act to the next at a bench. */
const PACE = 4

/** The demo's batches: two that are made, one on the bench. */
export async function runDemo(bench: Ctx, wall: readonly PublishedDemo[], now: Date): Promise<void> {
  for (const plan of DEMO_RUNS) {
    const finish = wall.find(one => one.plan.name === plan.finish)
    if (!finish) throw new Error(`The demo has no finish called ${plan.finish}.`)
    const run = await startRun(bench, { schemeId: finish.schemeId, revision: finish.revision.number, pieces: plan.pieces })
    const acts = actsOf(plan, finish)
    // Long enough ago that nothing of it lies ahead, however many acts it has.
    const start = now.getTime() - Math.max(plan.hoursAgo * 60, acts.length * PACE) * 60_000
    // It began when its first act was done, which the service cannot know of a run of the past.
    await inTransaction(bench, tx => tx.db.update(runs).set({ startedAt: new Date(start) }).where(eq(runs.id, run.id)))
    const events = acts.map((act, i): RunEvent => ({ id: randomUUID(), doneAt: new Date(start + i * PACE * 60_000).toISOString(), act }))
    const refused = (await recordActs(bench, run.id, events)).find(answer => !answer.taken)
    if (refused) throw new Error(`The demo's run of ${plan.finish} does not fit its revision.`)
  }
}

function actsOf(plan: DemoRun, { revision }: PublishedDemo): RunAct[] {
  const steps = runSteps({ body: revision.body, materials: revision.materials }, plan.pieces)
  const done = steps.slice(0, Math.round(steps.length * plan.done))
  const all = Array.from({ length: plan.pieces }, (_, i) => i + 1)
  const asideAt = Math.floor(done.length * 0.7)
  const acts: RunAct[] = []
  let pieces = all
  for (const [i, step] of done.entries()) {
    if (plan.aside && i === asideAt) {
      acts.push({ v: 1, kind: 'piece-set-aside', ...plan.aside })
      pieces = all.filter(piece => piece !== plan.aside?.piece)
    }
    if (step.kind === 'lay') {
      if (step.coat.name === plan.deviation?.coat) acts.push({ v: 1, kind: 'deviation', stepId: step.id, what: plan.deviation.what, note: plan.deviation.note })
      acts.push({ v: 1, kind: 'pass-laid', coatId: step.coat.id, pieces, passes: step.coat.passes })
    }
    if (step.kind === 'inspect') acts.push({ v: 1, kind: 'inspected', pieces, passed: true, note: '' })
    acts.push({ v: 1, kind: 'step-done', stepId: step.id })
  }
  if (plan.done === 1) acts.push({ v: 1, kind: 'run-finished' })
  return acts
}
