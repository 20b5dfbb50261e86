import { describe, expect, it } from 'vitest'
import { getRun } from '#server/services/bench/get-run'
import { listRuns } from '#server/services/bench/list-runs'
import { recordActs } from '#server/services/bench/record-acts'
import { startRun } from '#server/services/bench/start-run'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { saveDraft } from '#server/services/scheme/save-draft'
import { RunQuery } from '#shared/bench/run-view'
import { testPerson, testWorkshop } from '../factories'
import { testScheme, withPasses } from '../scheme/ground'
import { act, publishedScheme, testRun } from './ground'

const code = (value: string) => ({ data: { code: value } })
const FINISH = { v: 1, kind: 'run-finished' } as const

describe('starting a run', () => {
  it('is for those at the bench, from a revision, with its frozen finish', async () => {
    const { ctx: owner, workshopId } = await testWorkshop()
    const { schemeId, body } = await publishedScheme(owner)
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    const run = await startRun(bench, { schemeId, revision: 1, pieces: 12 })
    expect(run).toMatchObject({ number: 1, revision: 1, pieces: 12, startedBy: { id: bench.personId }, finishedAt: null, stands: 'Make ready', stepsDone: 0 })
    expect((await getRun(bench, run.id)).body).toEqual(body)
  })

  it('is refused to the front desk, before anything is published, and from a revision that is not there', async () => {
    const { ctx: owner, workshopId } = await testWorkshop()
    const { scheme } = await testScheme(owner)
    await expect(startRun(owner, { schemeId: scheme.id, revision: 1, pieces: 1 })).rejects.toMatchObject(code('scheme/never-published'))
    await publishScheme(owner, scheme.id, 1, { note: '' })
    await expect(startRun(owner, { schemeId: scheme.id, revision: 2, pieces: 1 })).rejects.toMatchObject(code('revision/not-found'))
    const { ctx: desk } = await testPerson({ workshopId, role: 'desk' })
    await expect(startRun(desk, { schemeId: scheme.id, revision: 1, pieces: 1 })).rejects.toMatchObject(code('auth/not-allowed'))
    const { ctx: stranger } = await testWorkshop()
    await expect(startRun(stranger, { schemeId: scheme.id, revision: 1, pieces: 1 })).rejects.toMatchObject(code('scheme/not-found'))
  })

  it('numbers runs of a workshop without a gap, also when they start at once', async () => {
    const { ctx } = await testWorkshop()
    const { schemeId } = await publishedScheme(ctx)
    const start = (revision = 1) => startRun(ctx, { schemeId, revision, pieces: 3 })
    const outcomes = await Promise.allSettled([start(), start(), start(2), start(), start(), start()])
    const numbers = outcomes.flatMap(each => each.status === 'fulfilled' ? [each.value.number] : [])
    expect(numbers.sort()).toEqual([1, 2, 3, 4, 5])
    expect((await start()).number).toBe(6)
    const { ctx: other } = await testWorkshop()
    expect((await testRun(other)).run.number).toBe(1)
  })
})

describe('a run on the bench', () => {
  it('keeps its revision when a newer one is published, and says so', async () => {
    const { ctx } = await testWorkshop()
    const { run, schemeId, body } = await testRun(ctx)
    const { version } = await saveDraft(ctx, schemeId, 1, withPasses(body, 9))
    await publishScheme(ctx, schemeId, version, { note: 'more' })
    expect(await getRun(ctx, run.id)).toMatchObject({ revision: 1, headNumber: 2, body })
  })

  it('is not found from another workshop', async () => {
    const { ctx } = await testWorkshop()
    const { run } = await testRun(ctx)
    const { ctx: stranger } = await testWorkshop()
    await expect(getRun(stranger, run.id)).rejects.toMatchObject(code('run/not-found'))
    await expect(recordActs(stranger, run.id, [act(FINISH)])).rejects.toMatchObject(code('run/not-found'))
    expect(await listRuns(stranger, RunQuery.parse({}), null)).toEqual([])
  })
})

describe('the list of runs', () => {
  it('tells what is on the bench from what was made, the newest first, page by page', async () => {
    const { ctx } = await testWorkshop()
    const { schemeId } = await publishedScheme(ctx)
    const started = []
    for (let n = 0; n < 5; n++) started.push(await startRun(ctx, { schemeId, revision: 1, pieces: 2 }))
    await recordActs(ctx, started[1]!.id, [act(FINISH)])
    const numbers = async (query: object, after: [number] | null = null) => (await listRuns(ctx, RunQuery.parse(query), after)).map(run => run.number)
    expect(await numbers({ state: 'made' })).toEqual([2])
    expect(await numbers({ limit: 2 })).toEqual([5, 4, 3])
    expect(await numbers({ limit: 2 }, [4])).toEqual([3, 1])
    expect(await numbers({ schemeId: crypto.randomUUID() })).toEqual([])
  })

  it('says where each run stands and how its pieces came out', async () => {
    const { ctx } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    await recordActs(ctx, run.id, [
      act({ v: 1, kind: 'step-done', stepId: 'prepare' }),
      act({ v: 1, kind: 'piece-set-aside', piece: 6, reason: 'dropped' }),
      act({ v: 1, kind: 'inspected', pieces: [1, 2], passed: true, note: '' }),
      act({ v: 1, kind: 'inspected', pieces: [3], passed: false, note: 'dust' }),
    ])
    expect(await listRuns(ctx, RunQuery.parse({}), null)).toMatchObject([{ stands: 'Warm up', stepsDone: 1, passed: 2, failed: 1, setAside: 1 }])
    expect(coatIds).toHaveLength(2)
  })
})
