import { describe, expect, it } from 'vitest'
import { addMeasure } from '#server/services/bench/add-measure'
import { getReport } from '#server/services/bench/get-report'
import { recordActs } from '#server/services/bench/record-acts'
import { startRun } from '#server/services/bench/start-run'
import { withdrawMeasure } from '#server/services/bench/withdraw-measure'
import { takeIn } from '#server/services/bench/take-in'
import { getScheme } from '#server/services/scheme/get-scheme'
import { saveDraft } from '#server/services/scheme/save-draft'
import { RunMeasureDraft } from '#shared/bench/run-measure'
import { coatsOf } from '#shared/scheme/stack-order'
import { asOwner } from '../database'
import { testPerson, testWorkshop } from '../factories'
import { act, pass, testRun } from './ground'

const code = (name: string) => ({ data: expect.objectContaining({ code: name }) })
const ALL = [1, 2, 3, 4, 5, 6]
const measure = (more: object = {}) => RunMeasureDraft.parse({ piece: 1, card: [118, 118, 118], zones: [{ zone: 'back', rgb: [200, 200, 200] }, { zone: 'nowhere', rgb: [10, 10, 10] }], ...more })

describe('what a run took and gave', () => {
  it('is told by bottle, and how it came out beside the other runs of its scheme', async () => {
    const { ctx } = await testWorkshop()
    const { run, schemeId, coatIds } = await testRun(ctx)
    const again = await startRun(ctx, { schemeId, revision: 1, pieces: 2 })
    await recordActs(ctx, run.id, [
      act({ v: 1, kind: 'step-done', stepId: 'prepare' }, 600), { ...pass(coatIds[0]!, ALL, 2) },
      act({ v: 1, kind: 'piece-set-aside', piece: 6, reason: 'dropped' }),
      act({ v: 1, kind: 'inspected', pieces: [1, 2, 3, 4], passed: true, note: '' }), act({ v: 1, kind: 'inspected', pieces: [5, 6], passed: false, note: 'dust' }),
    ])
    const report = await getReport(ctx, run.id)
    expect(report.lots).toMatchObject([{ paintName: 'Opaque white, water-based', bottle: { code: expect.stringMatching(/^T-/) as string } }])
    expect(report.lots[0]!.ml).toBeGreaterThan(0)
    expect(report.yields).toMatchObject([
      { number: again.number, pieces: 2, passed: 0, benchMinutes: 0 },
      { number: run.number, pieces: 6, passed: 4, failed: 1, setAside: 1, benchMinutes: expect.closeTo(10, 0) as number },
    ])
  })
})

describe('a piece measured from a photo', () => {
  it('is held against what its revision promises, and against the scheme\'s sample', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    const { run, schemeId } = await testRun(ctx)
    const first = await addMeasure(bench, run.id, measure())
    expect(first).toMatchObject({ piece: 1, by: { id: bench.personId }, zones: [{ label: 'Back', sample: null, toPredicted: expect.any(Number) as number }, { zone: 'nowhere', predicted: null }] })
    await expect(addMeasure(bench, run.id, measure({ isSample: true }))).rejects.toMatchObject(code('auth/not-allowed'))
    await addMeasure(ctx, run.id, measure({ isSample: true, zones: [{ zone: 'back', rgb: [190, 190, 190] }] }))
    const next = await startRun(ctx, { schemeId, revision: 1, pieces: 2 })
    await addMeasure(bench, next.id, measure())
    const { measures } = await getReport(bench, next.id)
    expect(measures).toMatchObject([{ zones: [{ toSample: expect.closeTo(2.9, -1) as number }, { toSample: null }] }])
  })

  it('is refused for a piece the run does not have, a photo of elsewhere and a burnt-out card, and is never changed', async () => {
    const { ctx } = await testWorkshop()
    const { run } = await testRun(ctx)
    await expect(addMeasure(ctx, run.id, measure({ piece: 7 }))).rejects.toMatchObject(code('input/invalid'))
    await expect(addMeasure(ctx, run.id, measure({ photoId: crypto.randomUUID() }))).rejects.toMatchObject(code('photo/not-found'))
    await expect(addMeasure(ctx, run.id, measure({ card: [255, 255, 255] }))).rejects.toMatchObject(code('input/invalid'))
    const { id } = await addMeasure(ctx, run.id, measure())
    await expect(asOwner('update run_measures set piece = 2 where id = $1', [id])).rejects.toThrow('never changed')
    const { ctx: stranger } = await testWorkshop()
    await expect(addMeasure(stranger, run.id, measure())).rejects.toMatchObject(code('run/not-found'))
    await expect(getReport(stranger, run.id)).rejects.toMatchObject(code('run/not-found'))
  })
})

describe('a measure that was wrong', () => {
  it('is withdrawn: it stays to be read with who withdrew it, and is the sample no longer', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    const { run } = await testRun(ctx)
    const right = await addMeasure(ctx, run.id, measure({ isSample: true, piece: 2 }))
    const wrong = await addMeasure(ctx, run.id, measure({ isSample: true, zones: [{ zone: 'back', rgb: [20, 20, 20] }] }))
    const own = await addMeasure(bench, run.id, measure({ piece: 3 }))
    expect((await getReport(ctx, run.id)).sample).toMatchObject({ measureId: wrong.id, piece: 1, run: { number: run.number }, by: { id: ctx.personId } })

    await expect(withdrawMeasure(bench, run.id, wrong.id)).rejects.toMatchObject(code('auth/not-allowed'))
    expect(await withdrawMeasure(ctx, run.id, wrong.id)).toMatchObject({ withdrawn: { by: { id: ctx.personId } } })
    await withdrawMeasure(ctx, run.id, wrong.id)
    await withdrawMeasure(bench, run.id, own.id)
    const { sample, measures } = await getReport(ctx, run.id)
    expect(sample).toMatchObject({ measureId: right.id, piece: 2 })
    expect(measures.map(each => [each.piece, each.withdrawn?.by?.id])).toEqual([[3, bench.personId], [1, ctx.personId], [2, undefined]])
    // The one that was withdrawn is now held against the one that stands.
    expect(measures[1]!.zones[0]!.toSample).toBeGreaterThan(10)
  })

  it('is not there for a stranger, nor under another run', async () => {
    const { ctx } = await testWorkshop()
    const [{ run }, other] = [await testRun(ctx), await testRun(ctx)]
    const { id } = await addMeasure(ctx, run.id, measure())
    await expect(withdrawMeasure(ctx, other.run.id, id)).rejects.toMatchObject(code('run/not-found'))
    const { ctx: stranger } = await testWorkshop()
    await expect(withdrawMeasure(stranger, run.id, id)).rejects.toMatchObject(code('run/not-found'))
  })
})

describe('taking what the bench did into the scheme', () => {
  it('changes those coats of the draft and nothing else, publishes nothing, and tells what could not be taken', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { run, schemeId, body, coatIds } = await testRun(ctx)
    const [first, second] = coatIds as [string, string]
    await recordActs(ctx, run.id, [
      pass(first, ALL, 7), act({ v: 1, kind: 'step-done', stepId: `lay:${first}` }), act({ v: 1, kind: 'thinned', coatId: first, reducer: 11 }),
      pass(second, ALL, 1), act({ v: 1, kind: 'step-done', stepId: `lay:${second}` }),
    ])
    // Meanwhile somebody took the second coat out and named the first.
    const draft = { ...body, masks: [], stack: body.stack.slice(0, 1).map(item => item.act === 'coat' ? { ...item, coat: { ...item.coat, name: 'bone' } } : item) }
    const { version } = await saveDraft(ctx, schemeId, 1, draft)
    await expect(takeIn(ctx, run.id, 1)).rejects.toMatchObject(code('scheme/changed-meanwhile'))
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    await expect(takeIn(bench, run.id, version)).rejects.toMatchObject(code('auth/not-allowed'))

    const taken = await takeIn(ctx, run.id, version)
    expect(taken).toMatchObject({ schemeId, version: version + 1, taken: ['Coat 1: 7 passes, not 3', 'Coat 1: 11 drops of reducer, not 6'] })
    expect(taken.left).toEqual([expect.stringMatching(/^Coat 2: 1 pass, not 3\. That coat is no longer/)])
    const scheme = await getScheme(ctx, schemeId)
    expect(coatsOf(scheme.draft.stack)).toMatchObject([{ id: first, name: 'bone', passes: 7, mix: { reducer: 11 } }])
    expect(scheme.headNumber).toBe(1)
    expect(await takeIn(ctx, run.id, version + 1)).toMatchObject({ version: version + 1 })
  })

  it('saves nothing when the bench did as the revision says', async () => {
    const { ctx } = await testWorkshop()
    const { run } = await testRun(ctx)
    expect(await takeIn(ctx, run.id, 1)).toMatchObject({ version: 1, taken: [], left: [] })
  })
})
