import { addMeasure } from '#server/services/bench/add-measure'
import { RunMeasureDraft } from '#shared/bench/run-measure'
import { recordActs } from '#server/services/bench/record-acts'
import { act, publishedScheme, testRun } from '../bench/ground'
import type { AccessRow, Ground, Who } from './row'

/** Those at the bench; the front desk never, a stranger finds nothing. */
const atBench = (status: number, stranger = 404): Record<Who, number> => ({ owner: status, painter: status, bench: status, desk: 403, stranger, signedOut: 401 })

const runOf = async ({ owner }: Ground) => (await testRun(owner, { secret: 'planted coat' })).run
const SECRET = ['Perch in bars', 'planted coat']

/** Runs and what was done in them. */
export const BENCH_ACCESS: AccessRow[] = [
  {
    method: 'GET', path: '/api/runs', who: atBench(200, 200),
    make: async (ground) => {
      const run = await runOf(ground)
      return { url: '/api/runs', secret: [...SECRET, run.id] }
    },
  },
  {
    method: 'POST', path: '/api/runs', who: atBench(201),
    make: async ({ owner }) => ({ url: '/api/runs', body: { schemeId: (await publishedScheme(owner)).schemeId, revision: 1, pieces: 6 } }),
  },
  { method: 'GET', path: '/api/runs/[runId]', who: atBench(200), make: async ground => ({ url: `/api/runs/${(await runOf(ground)).id}`, secret: SECRET }) },
  { method: 'GET', path: '/api/runs/[runId]/events', who: atBench(200), make: async ground => ({ url: `/api/runs/${(await runOf(ground)).id}/events?since=0`, secret: SECRET }) },
  { method: 'GET', path: '/api/runs/[runId]/report', who: atBench(200), make: async ground => ({ url: `/api/runs/${(await runOf(ground)).id}/report`, secret: SECRET }) },
  {
    method: 'POST', path: '/api/runs/[runId]/measures', who: atBench(201),
    make: async ground => ({ url: `/api/runs/${(await runOf(ground)).id}/measures`, body: { piece: 1, card: [118, 118, 118], zones: [{ zone: 'back', rgb: [90, 80, 60] }] } }),
  },
  {
    method: 'POST', path: '/api/runs/[runId]/measures/[measureId]/withdraw', who: { ...atBench(200), bench: 403 }, // the owner's: a colleague's
    make: async ({ owner }) => {
      const { run } = await testRun(owner)
      const measure = await addMeasure(owner, run.id, RunMeasureDraft.parse({ piece: 1, card: [118, 118, 118], zones: [{ zone: 'back', rgb: [90, 80, 60] }] }))
      return { url: `/api/runs/${run.id}/measures/${measure.id}/withdraw` }
    },
  },
  {
    method: 'POST', path: '/api/runs/[runId]/take-in', who: { ...atBench(200), bench: 403 },
    make: async ground => ({ url: `/api/runs/${(await runOf(ground)).id}/take-in`, headers: { 'if-match': '"v1"' } }),
  },
  {
    method: 'GET', path: '/api/runs/[runId]/live', who: atBench(200),
    make: async (ground) => {
      const run = await runOf(ground)
      // A finished run is told and over at once; one that goes on would be told for hours.
      await recordActs(ground.owner, run.id, [act({ v: 1, kind: 'run-finished' })])
      return { url: `/api/runs/${run.id}/live`, secret: SECRET }
    },
  },
  {
    method: 'POST', path: '/api/runs/[runId]/events', who: atBench(200),
    make: async ground => ({ url: `/api/runs/${(await runOf(ground)).id}/events`, body: { events: [act({ v: 1, kind: 'step-done', stepId: 'prepare' })] } }),
  },
]
