import { describe, expect, it } from 'vitest'
import { addBuildUp, changeBuildUp } from '#server/services/build-ups/change-build-up'
import { listBuildUps } from '#server/services/build-ups/list-build-ups'
import { takeInScheme } from '#server/services/files/take-in-scheme'
import { writeSchemeFile } from '#server/services/files/write-scheme-file'
import { getScheme } from '#server/services/scheme/get-scheme'
import { saveDraft } from '#server/services/scheme/save-draft'
import type { SchemeBody } from '#shared/scheme/body'
import { BuildUpDraft } from '#shared/scheme/build-up'
import { cutOut } from '#shared/scheme/build-up-lay'
import { changedSince, linkCoats, linkedCoats } from '#shared/scheme/build-up-link'
import { coatsOf } from '#shared/scheme/stack-order'
import { testPerson, testWorkshop } from '../factories'
import { testScheme } from '../scheme/ground'

const whole = (body: SchemeBody) => cutOut(body, coatsOf(body.stack).map(coat => coat.id))

describe('a build-up of the workshop', () => {
  it('keeps its coats and masks, and has another edition when its coats change but not when its name does', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { body } = await testScheme(ctx)
    const made = await addBuildUp(ctx, BuildUpDraft.parse({ name: ' Scaled flank over white ', sequence: whole(body) }))
    expect(made).toMatchObject({ name: 'Scaled flank over white', edition: 1, version: 1, sequence: whole(body) })
    const named = await changeBuildUp(ctx, made.id, 1, { name: 'Scaled flank' })
    expect(named).toMatchObject({ edition: 1, version: 2 })
    const shorter = await changeBuildUp(ctx, made.id, 2, { sequence: cutOut(body, [coatsOf(body.stack)[0]!.id]) })
    expect(shorter).toMatchObject({ edition: 2, version: 3 })
    await expect(changeBuildUp(ctx, made.id, 2, { name: 'Late' })).rejects.toMatchObject({ data: { code: 'build-up/changed-meanwhile' } })
    expect(await listBuildUps(ctx)).toEqual([shorter])
  })

  it('changes no scheme by changing: the scheme is told of it instead', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    const buildUp = await addBuildUp(ctx, { name: 'Scaled', sequence: whole(body) })
    await saveDraft(ctx, scheme.id, 1, linkCoats(body, buildUp, crypto.randomUUID()))
    const before = (await getScheme(ctx, scheme.id)).draft
    const later = await changeBuildUp(ctx, buildUp.id, 1, { sequence: cutOut(body, [coatsOf(body.stack)[1]!.id]) })
    const after = (await getScheme(ctx, scheme.id)).draft
    expect(after).toEqual(before)
    expect(changedSince(after, [later])).toHaveLength(1)
  })

  it('of paints of another workshop is refused, and found by nobody there', async () => {
    const { ctx: here } = await testWorkshop({ role: 'painter' })
    const { ctx: there } = await testWorkshop({ role: 'painter' })
    const { body } = await testScheme(here)
    const made = await addBuildUp(here, { name: 'Ours', sequence: whole(body) })
    await expect(addBuildUp(there, { name: 'Theirs', sequence: whole(body) })).rejects.toMatchObject({ data: { code: 'paint/not-found' } })
    await expect(changeBuildUp(there, made.id, 1, { name: 'Theirs' })).rejects.toMatchObject({ data: { code: 'build-up/not-found' } })
    expect(await listBuildUps(there)).toEqual([])
  })

  it('is read by the bench and made by painters', async () => {
    const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
    const { body } = await testScheme(ctx)
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    await expect(addBuildUp(bench, { name: 'No', sequence: whole(body) })).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
    expect(await listBuildUps(bench)).toEqual([])
  })

  it.each([
    ['without a coat', { stack: [], masks: [] }],
    ['with a mask that is never lifted', { stack: [{ act: 'fit', maskId: '00000000-0000-4000-8000-000000000001' }], masks: [] }],
  ])('%s is none', (_, sequence) => {
    expect(BuildUpDraft.safeParse({ name: 'Bad', sequence }).success).toBe(false)
  })
})

it('a scheme in a file keeps its links where its build-ups are, and is cut free elsewhere, saying so', async () => {
  const { ctx: here } = await testWorkshop({ role: 'painter' })
  const { ctx: there } = await testWorkshop({ role: 'painter' })
  const { scheme, body } = await testScheme(here)
  const buildUp = await addBuildUp(here, { name: 'Scaled', sequence: whole(body) })
  await saveDraft(here, scheme.id, 1, linkCoats(body, buildUp, crypto.randomUUID()))
  const file = await writeSchemeFile(here, scheme.id)
  const home = await takeInScheme(here, file)
  expect(linkedCoats((await getScheme(here, home.schemeId!)).draft)).toHaveLength(1)
  const away = await takeInScheme(there, file)
  expect(linkedCoats((await getScheme(there, away.schemeId!)).draft)).toEqual([])
  expect(away.plan.notes.join(' ')).toContain('standing by themselves')
})
