import { describe, expect, it } from 'vitest'
import { paints } from '#server/db/tables'
import { startRun } from '#server/services/bench/start-run'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { changeScheme } from '#server/services/scheme/change-scheme'
import { fillColours } from '#server/services/scheme/fill-colours'
import { getScheme } from '#server/services/scheme/get-scheme'
import { listChoices } from '#server/services/scheme/list-choices'
import { listNear } from '#server/services/scheme/list-near'
import { listSchemes } from '#server/services/scheme/list-schemes'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { putAway } from '#server/services/scheme/put-away'
import { saveDraft } from '#server/services/scheme/save-draft'
import { forgetSearch, listSavedSearches, saveSearch } from '#server/services/scheme/saved-searches'
import { SchemeQuery } from '#shared/scheme/scheme-input'
import { SAVED_SEARCHES_MAX, WallWish } from '#shared/scheme/wall/wall-wish'
import { eq } from 'drizzle-orm'
import { testPerson, testWorkshop } from '../factories'
import { testScheme, withPasses } from './ground'

const query = (more: Partial<SchemeQuery> = {}) => SchemeQuery.parse(more)
const names = async (ctx: Ctx, more: Partial<SchemeQuery> = {}) => (await listSchemes(ctx, query(more), null)).map(row => row.name)
const near = (ctx: Ctx, colour = 'white') => listNear(ctx, query({ near: colour }), null)

describe('colours to find by', () => {
  it('are still to come after a save, and there once they are worked out', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    expect(await near(ctx)).toMatchObject({ rows: [], waiting: 1 })
    expect(await fillColours(ctx)).toBe(1)
    const { rows: [found], waiting } = await near(ctx)
    expect(waiting).toBe(0)
    expect(found).toMatchObject({ row: { id: scheme.id }, near: { label: expect.stringMatching(/\w/) as string } })
    expect(await fillColours(ctx)).toBe(0)
    await saveDraft(ctx, scheme.id, 1, withPasses(body, 1))
    expect((await near(ctx)).waiting).toBe(1)
  })

  it('come due again with a paint of the draft, not with a name', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, paintId } = await testScheme(ctx)
    await testScheme(ctx, { name: 'of another paint' })
    await fillColours(ctx)
    await changeScheme(ctx, scheme.id, 1, { name: 'Renamed', fish: 'Char' })
    expect((await near(ctx)).waiting).toBe(0)
    await inTransaction(ctx, tx => tx.db.update(paints).set({ filmPerPass: 9 }).where(eq(paints.id, paintId)))
    expect((await near(ctx)).waiting).toBe(1)
    expect(await fillColours(ctx)).toBe(1)
  })

  it('are those of the newest revision for the front desk', async () => {
    const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
    const { ctx: desk } = await testPerson({ workshopId, role: 'desk' })
    const { scheme, body } = await testScheme(ctx)
    await fillColours(ctx)
    expect((await near(desk)).rows).toEqual([])
    await publishScheme(ctx, scheme.id, 1, { note: '' })
    await fillColours(desk)
    const before = await near(desk)
    expect(before.rows.map(({ row }) => row)).toMatchObject([{ sees: 'look', id: scheme.id }])
    await saveDraft(ctx, scheme.id, 1, withPasses(body, 0.2))
    await fillColours(ctx)
    expect(await near(desk)).toEqual(before)
    expect((await near(ctx)).rows[0]!.near.distance).not.toBe(before.rows[0]!.near.distance)
  })
})

describe('what a scheme can be found by', () => {
  it('is its fish, who saved it, and where it stands', async () => {
    const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
    const { ctx: other } = await testPerson({ workshopId, role: 'painter' })
    const draft = await testScheme(ctx, { name: 'draft', fish: 'Char' })
    const published = await testScheme(other, { name: 'published' })
    const ahead = await testScheme(ctx, { name: 'ahead' })
    const bench = await testScheme(ctx, { name: 'bench' })
    for (const { scheme } of [published, ahead, bench]) await publishScheme(other, scheme.id, 1, { note: '' })
    await saveDraft(ctx, ahead.scheme.id, 1, withPasses(ahead.body, 7))
    await startRun(ctx, { schemeId: bench.scheme.id, revision: 1, pieces: 3 })
    const away = await testScheme(ctx, { name: 'away' })
    await putAway(ctx, { ids: [away.scheme.id], away: true })

    expect(await names(ctx, { fish: 'Char' })).toEqual(['draft'])
    expect(await names(ctx, { personId: other.personId })).toEqual(['published'])
    expect(await names(ctx, { stands: 'draft' })).toEqual(['draft'])
    expect(await names(ctx, { stands: 'ahead' })).toEqual(['ahead'])
    expect((await names(ctx, { stands: 'published' })).sort()).toEqual(['bench', 'published'])
    expect(await names(ctx, { stands: 'bench' })).toEqual(['bench'])
    expect(await names(ctx, { stands: 'away' })).toEqual(['away'])
    expect(await names(ctx, { stands: 'draft', fish: 'Perch' })).toEqual([])
    expect(draft.scheme.version).toBe(1)
    expect((await listChoices(ctx)).fish).toEqual(['Char', 'Perch'])
    expect((await listChoices(ctx)).people.map(({ id }) => id).sort()).toEqual([ctx.personId, other.personId].sort())
  })

  it('is for the front desk neither a person nor a draft', async () => {
    const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
    const { ctx: desk } = await testPerson({ workshopId, role: 'desk' })
    await testScheme(ctx, { fish: 'Secret char' })
    for (const more of [{ personId: ctx.personId }, { stands: 'ahead' as const }, { stands: 'bench' as const }])
      await expect(listSchemes(desk, query(more), null)).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
    expect(await listChoices(desk)).toEqual({ fish: [], people: [] })
  })
})

describe('putting away', () => {
  it('takes the chosen out of the lists and brings them back, as they were', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme } = await testScheme(ctx, { name: 'one' })
    const { scheme: two } = await testScheme(ctx, { name: 'two' })
    const { done, stayed } = await putAway(ctx, { ids: [scheme.id, two.id, scheme.id], away: true })
    expect(done.map(each => each.name)).toEqual(['one', 'two'])
    expect(stayed).toEqual([])
    expect(await names(ctx)).toEqual([])
    await putAway(ctx, { ids: done.map(each => each.id), away: false })
    expect(await names(ctx)).toEqual(['two', 'one'])
    const { draft, version } = await getScheme(ctx, scheme.id)
    expect({ draft, version }).toEqual({ draft: scheme.draft, version: 3 })
  })

  it('names each that stays, and why', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { ctx: stranger } = await testWorkshop({ role: 'painter' })
    const { scheme: theirs } = await testScheme(stranger)
    const { scheme: running } = await testScheme(ctx, { name: 'running' })
    await publishScheme(ctx, running.id, 1, { note: '' })
    await startRun(ctx, { schemeId: running.id, revision: 1, pieces: 3 })
    const { scheme: away } = await testScheme(ctx, { name: 'away' })
    await putAway(ctx, { ids: [away.id], away: true })
    expect(await putAway(ctx, { ids: [running.id, away.id, theirs.id], away: true })).toEqual({
      done: [],
      stayed: [{ id: running.id, name: 'running', why: 'bench' }, { id: away.id, name: 'away', why: 'already' }, { id: theirs.id, name: null, why: 'gone' }],
    })
    expect(await names(stranger)).toEqual(['Perch in bars'])
  })
})

describe('a search that is kept', () => {
  it('is its person\'s own, has one meaning per name, and can be forgotten', async () => {
    const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
    const { ctx: other } = await testPerson({ workshopId, role: 'owner' })
    await saveSearch(ctx, { name: 'Pike', wish: WallWish.parse({ fish: 'Pike' }) })
    const kept = await saveSearch(ctx, { name: 'Pike', wish: WallWish.parse({ fish: 'Pike', near: '#204060' }) })
    expect(await listSavedSearches(ctx)).toEqual([kept])
    expect(await listSavedSearches(other)).toEqual([])
    await forgetSearch(other, kept.id)
    expect(await listSavedSearches(ctx)).toEqual([kept])
    await forgetSearch(ctx, kept.id)
    expect(await listSavedSearches(ctx)).toEqual([])
  })

  it('is one of a few', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    for (let i = 0; i < SAVED_SEARCHES_MAX; i++) await saveSearch(ctx, { name: `Search ${i}`, wish: WallWish.parse({}) })
    await expect(saveSearch(ctx, { name: 'One more', wish: WallWish.parse({}) })).rejects.toMatchObject({ data: { code: 'input/invalid' } })
    expect(await listSavedSearches(ctx)).toHaveLength(SAVED_SEARCHES_MAX)
  })
})
