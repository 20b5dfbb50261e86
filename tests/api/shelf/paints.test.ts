import { describe, expect, it } from 'vitest'
import { changePaint } from '#server/services/shelf/change-paint'
import { addPaint } from '#server/services/shelf/add-paint'
import { getPaint, listPaintUses } from '#server/services/shelf/get-paint'
import { listPaints } from '#server/services/shelf/list-paints'
import { inTransaction } from '#server/services/in-transaction'
import { paintOptics } from '#server/db/tables'
import { testBody, addTestBlank } from '../scheme/ground'
import { getMaterials } from '#server/services/scheme/get-materials'
import { createScheme } from '#server/services/scheme/create-scheme'
import { asOwner } from '../database'
import { testPerson, testWorkshop } from '../factories'
import { paintDraft } from './ground'

const code = (name: string) => ({ data: expect.objectContaining({ code: name }) })
const opticsRows = (workshopId: string) => asOwner<{ id: string }>('select id from paint_optics where workshop_id = $1', [workshopId])

describe('a paint put on the shelf', () => {
  it('gets its colour, its words and its trust from what is known of it', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const paint = await addPaint(ctx, paintDraft({ name: 'Signal red', known: { how: 'masstone-hide', masstone: [42, 58, 36], passesToHide: 4 } }))
    expect(paint.optics).toMatchObject({ kind: 'film', how: 'masstone-hide', clipped: false })
    expect(paint.swatches.lab.map(Math.round)).toEqual([42, 58, 36])
    expect(paint.trust.level).toBe(2)
    expect(await getPaint(ctx, paint.id)).toEqual(paint)
  })

  it('keeps its resin and hardener, also for a scheme, until it has none any more', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const twoPart = { by: 'weight', resin: 100, hardener: 44, hardenerDensity: 1.02 } as const
    const clear = paintDraft({ name: 'Clear', kind: 'clear', known: { how: 'clear', yellowing: 0 }, twoPart })
    const { id } = await addPaint(ctx, clear)
    expect((await getPaint(ctx, id)).twoPart).toEqual(twoPart)
    const scheme = await createScheme(ctx, { name: 'Clear only', fish: '', blankId: await addTestBlank(ctx) })
    expect((await getMaterials(ctx, scheme.id)).paints.find(paint => paint.id === id)?.twoPart).toEqual(twoPart)
    expect((await changePaint(ctx, id, 1, { ...clear, twoPart: undefined })).twoPart).toBeUndefined()
  })

  it('is a pearl of the thickness whose face has the wanted hue', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const flake = { how: 'flake', oxide: 'anatase', flakesPerPass: 0.5, sigma: 9, edge: 0.06 } as const
    const gold = await addPaint(ctx, paintDraft({ name: 'Gold', kind: 'pearl', known: { ...flake, wanted: [75, 5, 60] } }))
    const blue = await addPaint(ctx, paintDraft({ name: 'Blue', kind: 'interference', known: { ...flake, wanted: [50, 5, -60] } }))
    expect(gold.optics.flake!.thickness).toBeLessThan(blue.optics.flake!.thickness)
    expect(gold.swatches.lab[2]).toBeGreaterThan(20)
    expect(blue.swatches.lab[2]).toBeLessThan(-20)
  })

  it('is refused in words when nothing tells the colour of its flake', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const known = { how: 'flake', oxide: 'rutile', flakesPerPass: 0.5, sigma: 9, edge: 0.06 } as const
    await expect(addPaint(ctx, paintDraft({ known }))).rejects.toMatchObject(code('paint/unknown-colour'))
    expect(await listPaints(ctx)).toEqual([])
  })

  it('is for painters and owners to put there, and leaves nothing behind when the bench tries', async () => {
    const { ctx, workshopId } = await testWorkshop({ role: 'bench' })
    await expect(addPaint(ctx, paintDraft())).rejects.toMatchObject(code('auth/not-allowed'))
    expect(await opticsRows(workshopId)).toEqual([])
  })
})

describe('optical data that another version of the engine made', () => {
  /** Gives a paint the data of an older engine: optical data itself is never changed. */
  const age = (paintId: string) => asOwner(`with old as (
    insert into paint_optics (workshop_id, engine_version, data)
      select p.workshop_id, '1', o.data || '{"engineVersion": "1", "clipped": true}' from paints p join paint_optics o on o.id = p.optics_id where p.id = $1
      returning id)
    update paints set optics_id = (select id from old) where id = $1`, [paintId])

  it('is derived anew before a paint is shown, and drafts are made with it', async () => {
    const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
    const paint = await addPaint(ctx, paintDraft())
    await age(paint.id)
    const scheme = await createScheme(ctx, { name: 'Shad', fish: '', blankId: await addTestBlank(ctx) })
    const seen = await getPaint(ctx, paint.id)
    expect(seen).toEqual({ ...paint, opticsId: seen.opticsId })
    expect(seen.opticsId).not.toBe(paint.opticsId)
    expect(scheme.materials.paints).toMatchObject([{ id: paint.id, opticsId: seen.opticsId, optics: paint.optics }])
    expect(await listPaints(ctx)).toMatchObject([{ opticsId: seen.opticsId }])
    expect(await opticsRows(workshopId)).toHaveLength(3)
  })

  it('is renewed once, however many ask at the same time', async () => {
    const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
    const paint = await addPaint(ctx, paintDraft())
    await age(paint.id)
    const seen = await Promise.all([getPaint(ctx, paint.id), getPaint(ctx, paint.id), listPaints(ctx)])
    expect(new Set(seen.flat().map(each => each.opticsId)).size).toBe(1)
    expect(await opticsRows(workshopId)).toHaveLength(3)
  })
})

describe('a changed paint', () => {
  it('of another colour gets new optical data, and the old stays for the revisions that hold it', async () => {
    const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
    const before = await addPaint(ctx, paintDraft())
    const after = await changePaint(ctx, before.id, 1, paintDraft({ known: { how: 'masstone-hide', masstone: [30, 8, 14], passesToHide: 3 } }))
    expect(after).toMatchObject({ version: 2 })
    expect(after.opticsId).not.toBe(before.opticsId)
    expect(after.swatches.masstone).not.toBe(before.swatches.masstone)
    expect((await opticsRows(workshopId)).map(row => row.id)).toEqual(expect.arrayContaining([before.opticsId, after.opticsId]))
  })

  it('of the same colour keeps its optical data', async () => {
    const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
    const before = await addPaint(ctx, paintDraft())
    const after = await changePaint(ctx, before.id, 1, paintDraft({ name: 'Tan, new tin', volumeLeft: 250 }))
    expect(after).toMatchObject({ opticsId: before.opticsId, name: 'Tan, new tin', volumeLeft: 250 })
    expect(await opticsRows(workshopId)).toHaveLength(1)
  })

  it('stays as it is when somebody changed it meanwhile', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { id } = await addPaint(ctx, paintDraft())
    await changePaint(ctx, id, 1, paintDraft({ name: 'First there' }))
    await expect(changePaint(ctx, id, 1, paintDraft({ name: 'Too late' }))).rejects.toMatchObject(code('paint/changed-meanwhile'))
    expect(await getPaint(ctx, id)).toMatchObject({ name: 'First there', version: 2 })
  })

  it('takes one of two changes sent at once', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { id } = await addPaint(ctx, paintDraft())
    const both = await Promise.allSettled(['one', 'other'].map(name => changePaint(ctx, id, 1, paintDraft({ name }))))
    expect(both.map(each => each.status).sort()).toEqual(['fulfilled', 'rejected'])
  })

  it('is retired and brought back, and is no paint of another workshop', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { ctx: stranger } = await testWorkshop({ role: 'owner', name: 'Elsewhere' })
    const { id } = await addPaint(ctx, paintDraft())
    expect(await changePaint(ctx, id, 1, { ...paintDraft(), retired: true })).toMatchObject({ retired: true })
    expect(await changePaint(ctx, id, 2, paintDraft())).toMatchObject({ retired: true })
    expect(await changePaint(ctx, id, 3, { ...paintDraft(), retired: false })).toMatchObject({ retired: false })
    await expect(changePaint(stranger, id, 4, paintDraft())).rejects.toMatchObject(code('paint/not-found'))
    await expect(getPaint(stranger, id)).rejects.toMatchObject(code('paint/not-found'))
    await expect(listPaintUses(stranger, id)).rejects.toMatchObject(code('paint/not-found'))
  })
})

describe('optical data', () => {
  it('is never changed: not by the server, and not by the owner of the table', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { opticsId } = await addPaint(ctx, paintDraft())
    const change = inTransaction(ctx, tx => tx.db.update(paintOptics).set({ engineVersion: 'other' }))
    await expect(change).rejects.toMatchObject({ cause: { message: expect.stringContaining('permission denied') } })
    await expect(asOwner('update paint_optics set engine_version = $1 where id = $2', ['other', opticsId])).rejects.toThrow('never changed')
  })
})

describe('the price of a paint', () => {
  it('goes to owner and painter, and never to the bench', async () => {
    const { ctx: owner, workshopId } = await testWorkshop({ role: 'owner' })
    const { id } = await addPaint(owner, paintDraft({ pricePerMl: 0.37 }))
    const [painter, bench] = await Promise.all((['painter', 'bench'] as const).map(role => testPerson({ workshopId, role })))
    expect(await getPaint(painter!.ctx, id)).toMatchObject({ pricePerMl: 0.37 })
    expect(JSON.stringify([await getPaint(bench!.ctx, id), await listPaints(bench!.ctx)])).not.toContain('0.37')
  })
})

describe('the shelf', () => {
  it('lists by name, without spectra and notes, with in how many schemes each paint is laid', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const used = await addPaint(ctx, paintDraft({ name: 'Umber' }))
    await addPaint(ctx, paintDraft({ name: 'Cream' }))
    const blankId = await addTestBlank(ctx)
    await createScheme(ctx, { name: 'Perch', fish: '', blankId, body: testBody(blankId, used.id) })
    const rows = await listPaints(ctx)
    expect(rows.map(row => [row.name, row.schemes])).toEqual([['Cream', 0], ['Umber', 1]])
    expect(rows[1]).not.toHaveProperty('optics')
    expect(JSON.stringify(rows)).not.toContain('second tin')
    expect(await listPaintUses(ctx, used.id)).toMatchObject([{ name: 'Perch' }])
  })

  it('is not for the front desk', async () => {
    const { ctx } = await testWorkshop({ role: 'desk' })
    await expect(listPaints(ctx)).rejects.toMatchObject(code('auth/not-allowed'))
  })
})
