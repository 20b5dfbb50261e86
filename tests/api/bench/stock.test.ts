import { describe, expect, it } from 'vitest'
import type { Ctx } from '#server/services/ctx'
import { getRun } from '#server/services/bench/get-run'
import { recordActs } from '#server/services/bench/record-acts'
import { startRun } from '#server/services/bench/start-run'
import { addPaint } from '#server/services/shelf/add-paint'
import { addBottle, changeBottle } from '#server/services/shelf/change-bottle'
import { listBottles } from '#server/services/shelf/list-bottles'
import { BottleDraft } from '#shared/shelf/bottle'
import { paintDraft } from '../shelf/ground'
import { testPerson, testWorkshop } from '../factories'
import { act, pass, publishedScheme, testRun } from './ground'

const code = (name: string) => ({ data: expect.objectContaining({ code: name }) })
const left = async (ctx: Ctx, paintId: string) => (await listBottles(ctx, paintId)).map(bottle => bottle.ml)

describe('the shelf while a run goes on', () => {
  it('goes down by what is laid, once however often it is sent, and up again by what is taken back', async () => {
    const { ctx } = await testWorkshop()
    const { run, coatIds, body } = await testRun(ctx)
    const paintId = firstPaint(body)
    const laid = pass(coatIds[0]!, [1, 2, 3], 2)
    await recordActs(ctx, run.id, [laid])
    const [after] = await left(ctx, paintId)
    expect(after).toBeLessThan(50)
    expect(after).toBeGreaterThan(40)
    await recordActs(ctx, run.id, [laid, laid])
    await Promise.all([1, 2, 3].map(() => recordActs(ctx, run.id, [laid])))
    expect(await left(ctx, paintId)).toEqual([after])
    await recordActs(ctx, run.id, [pass(coatIds[0]!, [4, 5, 6], 2)])
    expect((await left(ctx, paintId))[0]).toBeCloseTo(50 - 2 * (50 - after!), 9)
    await recordActs(ctx, run.id, [act({ v: 1, kind: 'taken-back', eventId: laid.id })])
    expect((await left(ctx, paintId))[0]).toBeCloseTo(after!, 9)
  })

  it('goes down by what several tablets lay at once, all of it', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { run, coatIds, body } = await testRun(ctx)
    const one = pass(coatIds[0]!, [1])
    await recordActs(ctx, run.id, [one])
    const of = 50 - (await left(ctx, firstPaint(body)))[0]!
    const tablets = await Promise.all([1, 2, 3].map(() => testPerson({ workshopId, role: 'bench' })))
    await Promise.all(tablets.flatMap(({ ctx: tablet }) => [1, 2, 3].map(() => recordActs(tablet, run.id, [pass(coatIds[0]!, [2])]))))
    expect((await left(ctx, firstPaint(body)))[0]).toBeCloseTo(50 - 10 * of, 9)
  })

  it('takes from the bottle at hand, from the named one, and from another from when the bench says so', async () => {
    const { ctx } = await testWorkshop()
    const { schemeId, body, coatIds } = await publishedScheme(ctx)
    const paintId = firstPaint(body)
    const second = await addBottle(ctx, paintId, BottleDraft.parse({ ml: 50, lot: 'B-2' }))
    const run = await startRun(ctx, { schemeId, revision: 1, pieces: 6, bottleIds: [second.id] })
    expect(await getRun(ctx, run.id)).toMatchObject({ startBottles: { [paintId]: second.id }, bottles: [{ lot: '' }, { lot: 'B-2' }] })
    await recordActs(ctx, run.id, [pass(coatIds[0]!, [1])])
    expect(await left(ctx, paintId)).toEqual([50, expect.closeTo(50, 0)])
    const [first] = await listBottles(ctx, paintId)
    const place = { place: 9 }
    await recordActs(ctx, run.id, [
      { ...pass(coatIds[0]!, [2]), place: 10 },
      { ...act({ v: 1, kind: 'bottle-used', paintId, bottleId: first!.id }), ...place },
    ])
    const [one, two] = await left(ctx, paintId)
    expect(50 - one!).toBeCloseTo(50 - two!, 9)
  })

  it('is right again when somebody weighs a bottle, and the run goes on from there', async () => {
    const { ctx } = await testWorkshop()
    const { run, coatIds, body } = await testRun(ctx)
    const paintId = firstPaint(body)
    await recordActs(ctx, run.id, [pass(coatIds[0]!, [1], 3)])
    const [bottle] = await listBottles(ctx, paintId)
    await changeBottle(ctx, bottle!.id, bottle!.version, BottleDraft.parse({ ...bottle, ml: 20 }))
    expect(await left(ctx, paintId)).toEqual([20])
    await recordActs(ctx, run.id, [pass(coatIds[0]!, [2], 3)])
    expect(20 - (await left(ctx, paintId))[0]!).toBeCloseTo(50 - bottle!.ml, 9)
  })

  it('refuses a bottle that is of another paint, another workshop or nowhere, and another paint it does not have', async () => {
    const { ctx } = await testWorkshop()
    const { ctx: elsewhere } = await testWorkshop()
    const { run, schemeId, coatIds, body } = await testRun(ctx)
    const paintId = firstPaint(body)
    const other = await addPaint(ctx, paintDraft())
    const theirs = await addPaint(elsewhere, paintDraft())
    const [otherBottle] = await listBottles(ctx, other.id)
    const [theirBottle] = await listBottles(elsewhere, theirs.id)
    const refused = [
      act({ v: 1, kind: 'bottle-used', paintId, bottleId: otherBottle!.id }),
      act({ v: 1, kind: 'bottle-used', paintId: theirs.id, bottleId: theirBottle!.id }),
      act({ v: 1, kind: 'bottle-used', paintId, bottleId: crypto.randomUUID() }),
      act({ v: 1, kind: 'paint-changed', coatId: coatIds[0]!, from: paintId, to: theirs.id }),
    ]
    const good = act({ v: 1, kind: 'paint-changed', coatId: coatIds[0]!, from: paintId, to: other.id })
    expect((await recordActs(ctx, run.id, [...refused, good])).map(answer => answer.taken)).toEqual([false, false, false, false, true])
    await expect(startRun(ctx, { schemeId, revision: 1, pieces: 1, bottleIds: [theirBottle!.id] })).rejects.toMatchObject(code('bottle/not-found'))
  })
})

describe('the day of a run', () => {
  it('is written down at its start: names, the room, who paints', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    const { schemeId } = await publishedScheme(ctx)
    const run = await startRun(ctx, {
      schemeId, revision: 1, pieces: 2, names: ['Left of pair', 'Right of pair'], room: { celsius: 21.5, humidity: 48 }, painterIds: [bench.personId, ctx.personId],
    })
    const view = await getRun(bench, run.id)
    expect(view).toMatchObject({ names: ['Left of pair', 'Right of pair'], room: { celsius: 21.5, humidity: 48 } })
    expect(view.painters.map(painter => painter.id).sort()).toEqual([bench.personId, ctx.personId].sort())
    const { ctx: stranger } = await testWorkshop()
    await expect(startRun(ctx, { schemeId, revision: 1, pieces: 1, painterIds: [stranger.personId] })).rejects.toMatchObject(code('people/not-found'))
  })
})

describe('a wrong clock on a tablet', () => {
  it('is put right at the hand-over, and a right one is left alone', async () => {
    const { ctx } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    const hour = 3_600_000
    const [slow, right] = [pass(coatIds[0]!, [1]), pass(coatIds[0]!, [2])]
    await recordActs(ctx, run.id, [slow], hour)
    await recordActs(ctx, run.id, [right], 900)
    const { events } = await getRun(ctx, run.id)
    expect(events.map(event => Date.parse(event.at) - Date.parse(event.doneAt))).toEqual([hour, 0])
  })
})

function firstPaint(body: { stack: readonly { act: string, coat?: { mix: { parts: readonly { paintId: string }[] } } }[] }): string {
  return body.stack.flatMap(item => item.coat?.mix.parts ?? [])[0]!.paintId
}
