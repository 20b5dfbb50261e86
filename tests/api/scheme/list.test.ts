import { describe, expect, it } from 'vitest'
import { changeScheme } from '#server/services/scheme/change-scheme'
import { listSchemes, type SchemesAfter, schemeKey } from '#server/services/scheme/list-schemes'
import { getScheme } from '#server/services/scheme/get-scheme'
import { lookAtScheme } from '#server/services/scheme/look-at-scheme'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { saveDraft } from '#server/services/scheme/save-draft'
import { SchemeQuery } from '#shared/scheme/scheme-input'
import { SchemeListItem, SchemeLookView } from '#shared/scheme/scheme-view'
import { testPerson, testWorkshop } from '../factories'
import { testScheme, withPasses } from './ground'

const query = (more: Partial<SchemeQuery> = {}) => SchemeQuery.parse(more)
const names = async (...of: Parameters<typeof listSchemes>) => (await listSchemes(...of)).map(row => row.name)

describe('the list for those who read recipes', () => {
  it('shows newest work first, page after page, each scheme once', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    for (const name of ['one', 'two', 'three', 'four', 'five']) await testScheme(ctx, { name })
    const seen: string[] = []
    let after: SchemesAfter | null = null
    do {
      const rows = await listSchemes(ctx, query({ limit: 2 }), after)
      seen.push(...rows.slice(0, 2).map(row => row.name))
      after = rows.length > 2 ? schemeKey(rows[1]!) : null
    } while (after)
    expect(seen).toEqual(['five', 'four', 'three', 'two', 'one'])
  })

  it('brings a scheme to the front when its draft is saved, not when it is renamed', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme: old, body } = await testScheme(ctx, { name: 'old' })
    const { scheme: young } = await testScheme(ctx, { name: 'young' })
    await changeScheme(ctx, old.id, 1, { fish: 'Roach' })
    expect(await names(ctx, query(), null)).toEqual(['young', 'old'])
    await saveDraft(ctx, old.id, 2, withPasses(body, 9))
    expect(await names(ctx, query(), null)).toEqual(['old', 'young'])
    expect(young.version).toBe(1)
  })

  it('finds by words in name, fish, blank and coats, all of them, any case, % and _ as they are', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    await testScheme(ctx, { name: 'Perch in bars', fish: 'Perch', secret: 'emerald glaze' })
    await testScheme(ctx, { name: '100% chrome', fish: 'Smelt', secret: 'silver' })
    expect(await names(ctx, query({ words: 'PERCH glaze' }), null)).toEqual(['Perch in bars'])
    expect(await names(ctx, query({ words: 'perch silver' }), null)).toEqual([])
    expect(await names(ctx, query({ words: 'smelt minnow' }), null)).toEqual(['100% chrome'])
    expect(await names(ctx, query({ words: '0%' }), null)).toEqual(['100% chrome'])
    expect(await names(ctx, query({ words: 'p_rch' }), null)).toEqual([])
  })

  it('finds by blank and by paint', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const a = await testScheme(ctx, { name: 'a' })
    const b = await testScheme(ctx, { name: 'b' })
    expect(await names(ctx, query({ blankId: a.blankId }), null)).toEqual(['a'])
    expect(await names(ctx, query({ paintId: b.paintId }), null)).toEqual(['b'])
  })

  it('leaves retired schemes out until they are asked for', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme } = await testScheme(ctx)
    await changeScheme(ctx, scheme.id, 1, { retired: true })
    expect(await names(ctx, query(), null)).toEqual([])
    expect(await names(ctx, query({ retired: 'with' }), null)).toEqual(['Perch in bars'])
  })

  it('says whether the draft went on after the newest revision', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    const ahead = async () => SchemeListItem.parse((await listSchemes(ctx, query(), null))[0])
    expect(await ahead()).toMatchObject({ headNumber: 0, draftIsAhead: true, coats: 2, masks: 1 })
    await publishScheme(ctx, scheme.id, 1, { note: '' })
    expect(await ahead()).toMatchObject({ headNumber: 1, draftIsAhead: false })
    await saveDraft(ctx, scheme.id, 1, withPasses(body, 9))
    expect(await ahead()).toMatchObject({ headNumber: 1, draftIsAhead: true })
  })
})

describe('the front desk', () => {
  async function desk() {
    const { ctx: painter, workshopId } = await testWorkshop({ role: 'painter' })
    const { ctx } = await testPerson({ workshopId, role: 'desk' })
    const made = await testScheme(painter, { secret: 'PLANTED' })
    return { ctx, painter, ...made }
  }

  it('sees published schemes only', async () => {
    const { ctx, painter, scheme } = await desk()
    expect(await names(ctx, query(), null)).toEqual([])
    await expect(lookAtScheme(ctx, scheme.id)).rejects.toMatchObject({ data: { code: 'scheme/not-found' } })
    await publishScheme(painter, scheme.id, 1, { note: 'PLANTED' })
    expect(await names(ctx, query(), null)).toEqual(['Perch in bars'])
  })

  it('never receives a coat, a mix, a mask, a note, a paint, a revision number or a hash', async () => {
    const { ctx, painter, scheme, paintId } = await desk()
    await publishScheme(painter, scheme.id, 1, { note: 'PLANTED' })
    const answers = [...await listSchemes(ctx, query(), null), await lookAtScheme(ctx, scheme.id)]
    for (const answer of answers) {
      const text = JSON.stringify(answer)
      expect(text).not.toContain('PLANTED')
      expect(text).not.toContain(paintId)
      expect(text).not.toMatch(/[0-9a-f]{64}/)
      expect(Object.keys(answer).sort()).toEqual(Object.keys(SchemeLookView.shape).sort())
    }
  })

  it('cannot find a scheme by what is in its coats or by a paint', async () => {
    const { ctx, painter, scheme, paintId } = await desk()
    await publishScheme(painter, scheme.id, 1, { note: '' })
    expect(await names(ctx, query({ words: 'PLANTED' }), null)).toEqual([])
    await expect(listSchemes(ctx, query({ paintId }), null)).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
  })

  it('cannot read a scheme', async () => {
    const { ctx, scheme } = await desk()
    await expect(getScheme(ctx, scheme.id)).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
  })

  it('never sees another workshop\'s', async () => {
    const { painter, scheme } = await desk()
    await publishScheme(painter, scheme.id, 1, { note: '' })
    const { ctx: stranger } = await testWorkshop({ role: 'desk' })
    expect(await names(stranger, query(), null)).toEqual([])
  })
})
