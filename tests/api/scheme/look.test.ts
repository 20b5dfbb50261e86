import { describe, expect, it } from 'vitest'
import { lookOfScheme } from '#server/services/scheme/look-of-scheme'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { saveDraft } from '#server/services/scheme/save-draft'
import { coatsOf } from '#shared/scheme/stack-order'
import { testPerson, testWorkshop } from '../factories'
import { testScheme, withPasses } from './ground'

const code = (value: string) => ({ data: { code: value } })

async function ground() {
  const { ctx: painter, workshopId } = await testWorkshop({ role: 'painter' })
  const { ctx: desk } = await testPerson({ workshopId, role: 'desk' })
  return { painter, desk, ...await testScheme(painter) }
}

describe('the look a picture is drawn from', () => {
  it('is the draft for the painter, and the newest revision for the front desk', async () => {
    const { painter, desk, scheme, body } = await ground()
    await publishScheme(painter, scheme.id, 1, { note: '' })
    await saveDraft(painter, scheme.id, 1, withPasses(body, 9))
    expect(await lookOfScheme(painter, scheme.id, { clear: true })).toMatchObject({ isFrozen: false, look: { body: withPasses(body, 9) } })
    expect(await lookOfScheme(desk, scheme.id, { clear: true })).toMatchObject({ isFrozen: true, look: { body } })
  })

  it('is never told apart by coats for the front desk: no single coat, no older revision, nothing before the clear', async () => {
    const { painter, desk, scheme, body } = await ground()
    await publishScheme(painter, scheme.id, 1, { note: '' })
    const upTo = coatsOf(body.stack)[0]!.id
    for (const wish of [{ clear: true, upTo }, { clear: true, upTo: 'ground' as const }, { clear: true, revision: 1 }, { clear: false }]) {
      await expect(lookOfScheme(desk, scheme.id, wish)).rejects.toMatchObject(code('auth/not-allowed'))
    }
  })

  it('is not there for the front desk before it is published', async () => {
    const { desk, scheme } = await ground()
    await expect(lookOfScheme(desk, scheme.id, { clear: true })).rejects.toMatchObject(code('scheme/not-found'))
  })

  it('has another tag when anything of the draft changes, and no hash of the recipe when it is a revision\'s', async () => {
    const { painter, scheme, body } = await ground()
    const revision = await publishScheme(painter, scheme.id, 1, { note: '' })
    const before = await lookOfScheme(painter, scheme.id, { clear: true })
    await saveDraft(painter, scheme.id, 1, withPasses(body, 9))
    const after = await lookOfScheme(painter, scheme.id, { clear: true })
    expect(after.tag).not.toBe(before.tag)
    expect((await lookOfScheme(painter, scheme.id, { clear: true, revision: 1 })).tag).toBe(revision.id)
  })

  it('of another workshop is not found', async () => {
    const { painter, scheme } = await ground()
    await publishScheme(painter, scheme.id, 1, { note: '' })
    const { ctx: stranger } = await testWorkshop({ role: 'owner' })
    await expect(lookOfScheme(stranger, scheme.id, { clear: true })).rejects.toMatchObject(code('scheme/not-found'))
  })
})
