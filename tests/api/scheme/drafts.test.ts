import { describe, expect, it } from 'vitest'
import { changeScheme } from '#server/services/scheme/change-scheme'
import { compareRevisions } from '#server/services/scheme/compare-revisions'
import { createScheme } from '#server/services/scheme/create-scheme'
import { forkScheme } from '#server/services/scheme/fork-scheme'
import { getMaterials } from '#server/services/scheme/get-materials'
import { getRevision } from '#server/services/scheme/get-revision'
import { getScheme } from '#server/services/scheme/get-scheme'
import { listRevisions } from '#server/services/scheme/list-revisions'
import { lookAtScheme } from '#server/services/scheme/look-at-scheme'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { restoreRevision } from '#server/services/scheme/restore-revision'
import { saveDraft } from '#server/services/scheme/save-draft'
import { coatsOf } from '#shared/scheme/stack-order'
import { testWorkshop } from '../factories'
import { addTestBlank, addTestPaint, testScheme, withPasses } from './ground'

const code = (value: string, more: object = {}) => ({ data: { code: value, ...more } })

describe('starting a scheme', () => {
  it('begins with a white base coat when the shelf has a white', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const blankId = await addTestBlank(ctx)
    await addTestPaint(ctx, 'Opaque red', { how: 'masstone-hide', masstone: [45, 60, 40], passesToHide: 4 })
    const white = await addTestPaint(ctx)
    const scheme = await createScheme(ctx, { name: 'New', fish: '', blankId })
    expect(coatsOf(scheme.draft.stack).map(coat => [coat.name, coat.mix.parts.map(part => part.paintId)])).toEqual([['White base', [white]]])
    expect(scheme).toMatchObject({ version: 1, headNumber: 0, revisions: [], savedBy: { id: ctx.personId } })
  })

  it('begins bare on an empty shelf, and not at all on a blank of another workshop', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { ctx: other } = await testWorkshop({ role: 'painter' })
    expect((await createScheme(ctx, { name: 'New', fish: '', blankId: await addTestBlank(ctx) })).draft.stack).toEqual([])
    await expect(createScheme(ctx, { name: 'New', fish: '', blankId: await addTestBlank(other) })).rejects.toMatchObject(code('blank/not-found'))
  })
})

describe('saving a draft', () => {
  it('gives back just what was saved, under the next version', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    expect(await saveDraft(ctx, scheme.id, 1, withPasses(body, 9))).toMatchObject({ version: 2 })
    expect(await getScheme(ctx, scheme.id)).toMatchObject({ version: 2, draft: withPasses(body, 9) })
  })

  it('never overwrites what somebody else saved meanwhile, and says which version is there', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    await saveDraft(ctx, scheme.id, 1, withPasses(body, 9))
    await expect(saveDraft(ctx, scheme.id, 1, withPasses(body, 5))).rejects.toMatchObject(code('scheme/changed-meanwhile', { version: 2 }))
    expect((await getScheme(ctx, scheme.id)).draft).toEqual(withPasses(body, 9))
  })

  it('lets one of two saves at once through', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    const both = await Promise.allSettled([5, 9].map(passes => saveDraft(ctx, scheme.id, 1, withPasses(body, passes))))
    expect(both.map(each => each.status).sort()).toEqual(['fulfilled', 'rejected'])
  })

  it('takes the same body again without calling it work', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    expect(await saveDraft(ctx, scheme.id, 1, body)).toEqual({ version: 1, savedAt: scheme.savedAt })
  })

  it('refuses a blank of another workshop', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { ctx: other } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    await expect(saveDraft(ctx, scheme.id, 1, { ...body, blankId: await addTestBlank(other) })).rejects.toMatchObject(code('blank/not-found'))
  })

  it('shows nothing of a paint of another workshop that a body names', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { ctx: other } = await testWorkshop({ role: 'painter' })
    const theirs = await addTestPaint(other, 'Their secret')
    const { scheme, body } = await testScheme(ctx)
    const stolen: typeof body = { ...body, stack: body.stack.map(item => item.act === 'coat' ? { act: 'coat', coat: { ...item.coat, mix: { parts: [{ paintId: theirs, drops: 1 }], reducer: 0 } } } : item) }
    const { version } = await saveDraft(ctx, scheme.id, 1, stolen)
    expect(JSON.stringify(await getScheme(ctx, scheme.id))).not.toContain('Their secret')
    await expect(publishScheme(ctx, scheme.id, version, { note: '' })).rejects.toMatchObject(code('scheme/not-publishable'))
  })
})

describe('materials', () => {
  it('are the whole shelf and the blank, or another blank that is tried', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, paintId } = await testScheme(ctx)
    const other = await addTestPaint(ctx, 'Opaque black')
    const wide = await addTestBlank(ctx, 'Another')
    const materials = await getMaterials(ctx, scheme.id, wide)
    expect(materials.paints.map(paint => paint.id).sort()).toEqual([paintId, other].sort())
    expect(materials.blank.id).toBe(wide)
  })
})

describe('a stranger', () => {
  it('finds no scheme of another workshop by any verb', async () => {
    const { ctx: painter } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(painter)
    await publishScheme(painter, scheme.id, 1, { note: '' })
    const { ctx } = await testWorkshop({ role: 'owner' })
    const verbs = [
      getScheme(ctx, scheme.id), lookAtScheme(ctx, scheme.id), getMaterials(ctx, scheme.id), listRevisions(ctx, scheme.id), getRevision(ctx, scheme.id, 1),
      compareRevisions(ctx, scheme.id, { from: 1, to: 'draft' }), saveDraft(ctx, scheme.id, 1, body), publishScheme(ctx, scheme.id, 1, { note: '' }),
      restoreRevision(ctx, scheme.id, 1, 1), forkScheme(ctx, scheme.id, { name: 'Mine' }), changeScheme(ctx, scheme.id, 1, { name: 'Mine' }),
    ]
    for (const verb of await Promise.allSettled(verbs)) expect(verb).toMatchObject({ status: 'rejected', reason: code('scheme/not-found') })
  })
})
