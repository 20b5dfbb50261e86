import { describe, expect, it } from 'vitest'
import { addPaint } from '#server/services/shelf/add-paint'
import { addBottle, changeBottle } from '#server/services/shelf/change-bottle'
import { changePaint } from '#server/services/shelf/change-paint'
import { getPaint } from '#server/services/shelf/get-paint'
import { findBottles, listBottles } from '#server/services/shelf/list-bottles'
import { listPaints } from '#server/services/shelf/list-paints'
import { BottleDraft } from '#shared/shelf/bottle'
import { testPerson, testWorkshop } from '../factories'
import { paintDraft } from './ground'

const code = (name: string) => ({ data: expect.objectContaining({ code: name }) })
const bottle = (more: Partial<BottleDraft> = {}) => BottleDraft.parse({ ml: 30, ...more })

describe('bottles of a paint', () => {
  it('are what is left of it: the first comes with the paint, and every one counts until it is retired', async () => {
    const { ctx } = await testWorkshop()
    const { id } = await addPaint(ctx, paintDraft({ volumeLeft: 48 }))
    expect(await listBottles(ctx, id)).toMatchObject([{ ml: 48, state: 'open', lot: '' }])
    const second = await addBottle(ctx, id, bottle({ lot: 'K-204', state: 'sealed' }))
    expect(await getPaint(ctx, id)).toMatchObject({ volumeLeft: 78 })
    await changeBottle(ctx, second.id, 1, bottle({ lot: 'K-204', state: 'retired' }))
    expect(await getPaint(ctx, id)).toMatchObject({ volumeLeft: 48 })
    expect(await listPaints(ctx)).toMatchObject([{ volumeLeft: 48 }])
    const empty = await addPaint(ctx, paintDraft({ name: 'None of it', volumeLeft: 0 }))
    expect(await listBottles(ctx, empty.id)).toEqual([])
  })

  it('take up what somebody writes of the paint as a whole, the one at hand first', async () => {
    const { ctx } = await testWorkshop()
    const { id } = await addPaint(ctx, paintDraft({ volumeLeft: 0 }))
    await addBottle(ctx, id, bottle({ ml: 10, code: 'FIRST', openedOn: '2026-03-01' }))
    await addBottle(ctx, id, bottle({ ml: 20, code: 'SECOND', openedOn: '2026-05-01' }))
    const left = async () => Object.fromEntries((await listBottles(ctx, id)).map(each => [each.code, each.ml]))
    expect(await changePaint(ctx, id, 1, paintDraft({ volumeLeft: 26 }))).toMatchObject({ volumeLeft: 26 })
    expect(await left()).toEqual({ FIRST: 6, SECOND: 20 })
    await changePaint(ctx, id, 2, paintDraft({ volumeLeft: 15 }))
    expect(await left()).toEqual({ FIRST: 0, SECOND: 15 })
    await changePaint(ctx, id, 3, paintDraft({ name: 'Only its name', volumeLeft: 15.01 }))
    expect(await left()).toEqual({ FIRST: 0, SECOND: 15 })
  })

  it('are found by what is scanned, in capitals or not, and get a code of their own without one', async () => {
    const { ctx } = await testWorkshop()
    const { ctx: elsewhere } = await testWorkshop()
    const paint = await addPaint(ctx, paintDraft({ name: 'Bone', volumeLeft: 0 }))
    const made = await addBottle(ctx, paint.id, bottle())
    expect(made.code).toMatch(/^[2-9A-HJ-NP-Z]{8}$/)
    await addBottle(ctx, paint.id, bottle({ code: '4006381333931', lot: 'A' }))
    await addBottle(ctx, paint.id, bottle({ code: '4006381333931', lot: 'B' }))
    expect(await findBottles(ctx, { code: made.code.toLowerCase() })).toMatchObject([{ id: made.id, paintName: 'Bone' }])
    expect((await findBottles(ctx, { code: '4006381333931' })).map(each => each.lot)).toEqual(['A', 'B'])
    expect(await findBottles(elsewhere, { code: made.code })).toEqual([])
    expect(await findBottles(ctx, {})).toHaveLength(3)
  })

  it('are changed by one of two who change at once, and by nobody without the right or from elsewhere', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { id } = await addPaint(ctx, paintDraft())
    const made = await addBottle(ctx, id, bottle())
    const both = await Promise.allSettled(['A', 'B'].map(lot => changeBottle(ctx, made.id, 1, bottle({ lot }))))
    expect(both.map(each => each.status).sort()).toEqual(['fulfilled', 'rejected'])
    await expect(changeBottle(ctx, made.id, 1, bottle())).rejects.toMatchObject(code('bottle/changed-meanwhile'))
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    await expect(addBottle(bench, id, bottle())).rejects.toMatchObject(code('auth/not-allowed'))
    expect(await listBottles(bench, id)).toHaveLength(2)
    const { ctx: stranger } = await testWorkshop()
    await expect(changeBottle(stranger, made.id, 2, bottle())).rejects.toMatchObject(code('bottle/not-found'))
    await expect(listBottles(stranger, id)).rejects.toMatchObject(code('paint/not-found'))
    await expect(addBottle(stranger, id, bottle())).rejects.toMatchObject(code('paint/not-found'))
  })
})
