import { describe, expect, it } from 'vitest'
import { takeInPaints } from '#server/services/files/take-in-paints'
import { writePaintsFile } from '#server/services/files/write-paints-file'
import { addPaint } from '#server/services/shelf/add-paint'
import { changePaint } from '#server/services/shelf/change-paint'
import { getPaint } from '#server/services/shelf/get-paint'
import { listPaints } from '#server/services/shelf/list-paints'
import { testPerson, testWorkshop } from '../factories'
import { paintDraft } from '../shelf/ground'
import { KNOWN } from './ground'

const HEAD = 'id,name,kind,base,known_by,masstone,passes_to_hide,density_g_per_ml\r\n'
const line = (name: string, { id = '', masstone = '66 8 30', density = '' } = {}) => `${id},${name},opaque,water,masstone-hide,${masstone},4,${density}\r\n`

describe('a shelf as a file', () => {
  it('stands in another workshop as it stood here, with semicolons and with commas', async () => {
    for (const form of ['comma', 'semicolon'] as const) {
      const { ctx: here } = await testWorkshop({ role: 'painter' })
      const { ctx: there } = await testWorkshop({ role: 'painter' })
      const made = []
      for (const [i, known] of KNOWN.entries()) made.push(await addPaint(here, paintDraft({ name: `${i}: -ish`, known, volumeLeft: 12.5 * i, note: '=HYPERLINK("x")' })))
      await changePaint(here, made[2]!.id, 1, { ...paintDraft({ name: '2: -ish', known: KNOWN[2], volumeLeft: 25 }), retired: true })
      const csv = await writePaintsFile(here, { form, bom: true })
      expect(csv.startsWith('\uFEFFid')).toBe(true)
      expect(csv).not.toMatch(/[;,]"?=HYP/)
      const plan = await takeInPaints(there, csv, false)
      expect(plan.rows.map(row => row.does)).toEqual(KNOWN.map(() => 'adds'))
      const bare = (paints: Awaited<ReturnType<typeof listPaints>>) => paints.map(({ id: _id, opticsId: _optics, changedAt: _at, version: _version, ...paint }) => paint)
      expect(bare(await listPaints(there))).toEqual(bare(await listPaints(here)))
    }
  })

  it('brought back unchanged changes nothing', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const paint = await addPaint(ctx, paintDraft({ volumeLeft: 33.337 }))
    const plan = await takeInPaints(ctx, await writePaintsFile(ctx, { form: 'comma', bom: false }), false)
    expect(plan.rows).toEqual([{ row: 2, name: paint.name, does: 'stays', reasons: [] }])
    expect(await getPaint(ctx, paint.id)).toEqual(paint)
  })

  it('tells the bench no prices', async () => {
    const { ctx, workshopId } = await testWorkshop({ role: 'owner' })
    await addPaint(ctx, paintDraft({ pricePerMl: 0.4321 }))
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    const csv = await writePaintsFile(bench, { form: 'comma', bom: false })
    expect(csv).not.toContain('0.4321')
    expect(csv).not.toContain('price')
    await expect(takeInPaints(bench, csv, true)).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
  })
})

describe('a file of paints', () => {
  it('is first told row by row, with the reason of each reject, and nothing is done', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    await addPaint(ctx, paintDraft({ name: 'Tan' }))
    const csv = `${HEAD}${line('Bone')}${line('Tan')}${line('Bone')}${line('Heavy', { density: '9' })}`
    const plan = await takeInPaints(ctx, csv, true)
    expect(plan.rows.map(({ row, does }) => [row, does])).toEqual([[2, 'adds'], [3, 'rejected'], [4, 'rejected'], [5, 'rejected']])
    expect(plan.rows.map(row => row.reasons.join(' '))).toEqual(['', expect.stringMatching(/name is on the shelf/), 'Row 2 is the same paint.', expect.stringMatching(/^density_g_per_ml: /)])
    expect((await listPaints(ctx)).map(paint => paint.name)).toEqual(['Tan'])
    await takeInPaints(ctx, csv, false)
    expect((await listPaints(ctx)).map(paint => paint.name)).toEqual(['Bone', 'Tan'])
  })

  it('with the id of a paint changes what it says of that paint, and leaves what it does not', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const paint = await addPaint(ctx, paintDraft())
    const plan = await takeInPaints(ctx, `id,density_g_per_ml,note\r\n${paint.id},1.2,\r\n`, false)
    expect(plan.rows).toEqual([{ row: 2, name: paint.name, does: 'changes', reasons: ['density_g_per_ml'] }])
    expect(await getPaint(ctx, paint.id)).toMatchObject({ density: 1.2, note: paint.note, opticsId: paint.opticsId, volumeLeft: paint.volumeLeft, version: 2 })
  })

  it('never reaches a paint of another workshop, even by its id', async () => {
    const { ctx: here } = await testWorkshop({ role: 'painter' })
    const { ctx: there } = await testWorkshop({ role: 'painter' })
    const paint = await addPaint(here, paintDraft({ name: 'Tan' }))
    const plan = await takeInPaints(there, `${HEAD}${line('Stolen', { id: paint.id })}`, false)
    expect(plan.rows).toMatchObject([{ does: 'adds', reasons: ['No paint of this shelf has that id; it gets a new one.'] }])
    expect(await getPaint(here, paint.id)).toEqual(paint)
  })

  it('names the columns it does not read, and refuses a file that is no table at all', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    expect((await takeInPaints(ctx, 'name,shine\r\nTan,yes\r\n', true)).unread).toEqual(['shine'])
    await expect(takeInPaints(ctx, '{"a": 1}', true)).rejects.toMatchObject({ data: { code: 'input/invalid', fields: [{ path: 'csv', message: expect.stringContaining('Row 1') }] } })
  })
})
