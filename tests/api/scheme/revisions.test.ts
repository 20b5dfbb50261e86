import { describe, expect, it } from 'vitest'
import { eq } from 'drizzle-orm'
import { revisions } from '#server/db/tables'
import { inTransaction } from '#server/services/in-transaction'
import { changeScheme } from '#server/services/scheme/change-scheme'
import { compareRevisions } from '#server/services/scheme/compare-revisions'
import { forkScheme } from '#server/services/scheme/fork-scheme'
import { getRevision } from '#server/services/scheme/get-revision'
import { getScheme } from '#server/services/scheme/get-scheme'
import { listRevisions } from '#server/services/scheme/list-revisions'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { restoreRevision } from '#server/services/scheme/restore-revision'
import { saveDraft } from '#server/services/scheme/save-draft'
import { changePaint } from '#server/services/shelf/change-paint'
import { coatsOf } from '#shared/scheme/stack-order'
import { testWorkshop } from '../factories'
import { asOwner } from '../database'
import { addTestPaint, testScheme, withPasses } from './ground'

const code = (value: string, more: object = {}) => ({ data: { code: value, ...more } })

describe('publishing', () => {
  it('freezes the draft with its note, its paints and its blank, and numbers from 1', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    await addTestPaint(ctx, 'Never used')
    const { scheme, body, paintId } = await testScheme(ctx)
    const revision = await publishScheme(ctx, scheme.id, scheme.version, { note: 'first that holds' })
    expect(revision).toMatchObject({ number: 1, note: 'first that holds', coats: 2, schemeName: 'Perch in bars' })
    expect(revision.body).toEqual(body)
    expect(revision.materials.paints.map(paint => paint.id)).toEqual([paintId])
    expect(await listRevisions(ctx, scheme.id)).toMatchObject([{ number: 1, coats: 2, publishedBy: { id: ctx.personId } }])
  })

  it('two publishes at once make one revision', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme } = await testScheme(ctx)
    const both = await Promise.allSettled([1, 2].map(n => publishScheme(ctx, scheme.id, scheme.version, { note: `${n}` })))
    expect(both.map(each => each.status).sort()).toEqual(['fulfilled', 'rejected'])
    expect(both.find(each => each.status === 'rejected')?.reason).toMatchObject(code('scheme/nothing-changed'))
    expect(await listRevisions(ctx, scheme.id)).toHaveLength(1)
  })

  it('refuses when nothing changed since the newest revision, and takes a change back and forth as another one', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    await publishScheme(ctx, scheme.id, 1, { note: '' })
    await expect(publishScheme(ctx, scheme.id, 1, { note: 'again' })).rejects.toMatchObject(code('scheme/nothing-changed'))
    const { version } = await saveDraft(ctx, scheme.id, 1, withPasses(body, 9))
    expect(await publishScheme(ctx, scheme.id, version, { note: '' })).toMatchObject({ number: 2 })
    const back = await saveDraft(ctx, scheme.id, version, body)
    expect(await publishScheme(ctx, scheme.id, back.version, { note: '' })).toMatchObject({ number: 3 })
  })

  it('refuses a draft somebody changed after one looked at it', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    await saveDraft(ctx, scheme.id, 1, withPasses(body, 9))
    await expect(publishScheme(ctx, scheme.id, 1, { note: '' })).rejects.toMatchObject(code('scheme/changed-meanwhile', { version: 2 }))
  })

  it('says in words why a draft is not ready', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    const { version } = await saveDraft(ctx, scheme.id, 1, { ...body, stack: body.stack.slice(0, -1) })
    await expect(publishScheme(ctx, scheme.id, version, { note: '' }))
      .rejects.toMatchObject(code('scheme/not-publishable', { reasons: ['“net base” is fitted and never lifted.'] }))
  })

  it('is not for the bench, which repeats finishes and does not make them', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme } = await testScheme(ctx)
    await expect(publishScheme({ ...ctx, role: 'bench' }, scheme.id, 1, { note: '' })).rejects.toMatchObject(code('auth/not-allowed'))
  })
})

describe('a revision', () => {
  it('cannot be changed by the server, which may not update the table', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { scheme } = await testScheme(ctx)
    const revision = await publishScheme(ctx, scheme.id, 1, { note: 'as it was' })
    const change = inTransaction(ctx, tx => tx.db.update(revisions).set({ note: 'otherwise' }).where(eq(revisions.id, revision.id)))
    await expect(change).rejects.toMatchObject({ cause: { message: expect.stringContaining('permission denied') } })
  })

  it('cannot be changed by the owner of the table either', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    const { scheme } = await testScheme(ctx)
    const revision = await publishScheme(ctx, scheme.id, 1, { note: 'as it was' })
    await expect(asOwner('update revisions set note = $1 where id = $2', ['otherwise', revision.id])).rejects.toThrow('never changed')
    expect(await getRevision(ctx, scheme.id, 1)).toMatchObject({ note: 'as it was' })
  })

  it('keeps the paint it was made with when the paint gets another colour', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, paintId } = await testScheme(ctx)
    const before = await publishScheme(ctx, scheme.id, 1, { note: '' })
    await changePaint(ctx, paintId, 1, {
      name: 'Now a red', kind: 'opaque', base: 'water', known: { how: 'masstone-hide', masstone: [40, 60, 40], passesToHide: 3 },
      reducerPer100: 80, filmPerPass: 9, volumeSolids: 40, density: 1.3, restMinutes: 1, hazards: [], note: '', volumeLeft: 3,
    })
    expect(await getRevision(ctx, scheme.id, 1)).toEqual(before)
    const draftPaint = (await getScheme(ctx, scheme.id)).materials.paints.find(paint => paint.id === paintId)
    expect(draftPaint).toMatchObject({ name: 'Now a red', filmPerPass: 9 })
    expect(draftPaint?.opticsId).not.toBe(before.materials.paints[0]?.opticsId)
  })

  it('becomes the draft again without any revision being lost', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    await publishScheme(ctx, scheme.id, 1, { note: '' })
    const { version } = await saveDraft(ctx, scheme.id, 1, withPasses(body, 9))
    await publishScheme(ctx, scheme.id, version, { note: '' })
    const restored = await restoreRevision(ctx, scheme.id, version, 1)
    expect(restored.draft).toEqual(body)
    expect(restored.version).toBe(version + 1)
    expect(restored.revisions.map(each => each.number)).toEqual([2, 1])
  })

  it('is compared with the draft, each side with what it was made with', async () => {
    const { ctx } = await testWorkshop({ role: 'bench' })
    const painter = { ...ctx, role: 'painter' as const }
    const { scheme, body } = await testScheme(painter)
    await publishScheme(painter, scheme.id, 1, { note: 'one' })
    await saveDraft(painter, scheme.id, 1, withPasses(body, 9))
    const two = await compareRevisions(ctx, scheme.id, { from: 1, to: 'draft' })
    expect(two.from).toMatchObject({ number: 1, note: 'one', body })
    expect(two.to).toMatchObject({ number: null, body: withPasses(body, 9) })
    expect(two.to.materials).toEqual(two.from.materials)
  })

  it('is compared with a version of another scheme, whichever blank that is on', async () => {
    const { ctx } = await testWorkshop({ role: 'bench' })
    const painter = { ...ctx, role: 'painter' as const }
    const [one, other] = [await testScheme(painter), await testScheme(painter, { name: 'Pike in tracks' })]
    await publishScheme(painter, other.scheme.id, 1, { note: 'pale' })
    const two = await compareRevisions(ctx, one.scheme.id, { from: 'draft', to: 1, other: other.scheme.id })
    expect(two.from).toMatchObject({ scheme: { id: one.scheme.id, name: 'Perch in bars' }, number: null, body: one.body })
    expect(two.to).toMatchObject({ scheme: { id: other.scheme.id, name: 'Pike in tracks' }, number: 1, note: 'pale', body: other.body })
    expect([two.from, two.to].map(side => side.materials.blank.id)).toEqual([one.blankId, other.blankId])
  })

  it('is never compared with a scheme of another workshop, nor by the front desk', async () => {
    const [{ ctx }, { ctx: stranger }, { ctx: desk }] = [await testWorkshop({ role: 'owner' }), await testWorkshop({ role: 'owner' }), await testWorkshop({ role: 'desk' })]
    const [ours, theirs] = [await testScheme(ctx), await testScheme(stranger)]
    const query = { from: 'draft', to: 'draft', other: theirs.scheme.id } as const
    await expect(compareRevisions(ctx, ours.scheme.id, query)).rejects.toMatchObject(code('scheme/not-found'))
    await expect(compareRevisions(desk, ours.scheme.id, query)).rejects.toMatchObject(code('auth/not-allowed'))
  })
})

describe('a colourway', () => {
  it('keeps the ids of its coats and remembers the revision it came from', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    await publishScheme(ctx, scheme.id, 1, { note: '' })
    await saveDraft(ctx, scheme.id, 1, withPasses(body, 9))
    const fork = await forkScheme(ctx, scheme.id, { name: 'Perch by night', number: 1 })
    expect(fork).toMatchObject({ name: 'Perch by night', fish: 'Perch', headNumber: 0, version: 1, origin: { schemeId: scheme.id, schemeName: 'Perch in bars', number: 1 } })
    expect(coatsOf(fork.draft.stack).map(coat => coat.id)).toEqual(coatsOf(body.stack).map(coat => coat.id))
    expect(fork.draft).toEqual(body)
  })

  it('starts from the draft of a scheme that was never published, without an origin', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme, body } = await testScheme(ctx)
    expect(await forkScheme(ctx, scheme.id, { name: 'Another' })).toMatchObject({ draft: body, origin: null })
  })

  it('goes on when the scheme it came from is renamed or retired', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { scheme } = await testScheme(ctx)
    await publishScheme(ctx, scheme.id, 1, { note: '' })
    const fork = await forkScheme(ctx, scheme.id, { name: 'Another', number: 1 })
    await changeScheme(ctx, scheme.id, 1, { name: 'Renamed', retired: true })
    expect((await getScheme(ctx, fork.id)).origin).toMatchObject({ schemeName: 'Renamed' })
  })
})
