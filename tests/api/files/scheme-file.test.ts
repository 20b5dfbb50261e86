import fc from 'fast-check'
import sharp from 'sharp'
import { describe, expect, it } from 'vitest'
import { writeSchemeFile } from '#server/services/files/write-scheme-file'
import { checkedSchemeFile } from '#server/services/files/checked-scheme-file'
import { lookAtSchemeFile, takeInScheme } from '#server/services/files/take-in-scheme'
import { getScheme } from '#server/services/scheme/get-scheme'
import { listPaints } from '#server/services/shelf/list-paints'
import { changePaint } from '#server/services/shelf/change-paint'
import { getPaint } from '#server/services/shelf/get-paint'
import type { FilePicture, SchemeFile } from '#shared/files/scheme-file'
import { asOwner } from '../database'
import { testPerson, testWorkshop } from '../factories'
import { byOrderOfIds, Carried, carriedScheme } from './ground'

const PLAIN: Carried = { name: 'Perch in bars', coats: [{ paint: 0, passes: 3, reducer: 5, byHand: false, note: '' }, { paint: 3, passes: 2, reducer: 0, byHand: true, note: '' }], masked: true, ownMask: true, eyes: true, revisions: 1, ahead: true }

/** Mean distance of two pictures, levels of 255: what lossy files of the same drawing may differ by is well below one. */
const SAME_TO_THE_EYE = 0.5

async function apart(one: FilePicture, other: FilePicture): Promise<number> {
  const [a, b] = await Promise.all([one, other].map(({ base64 }) => sharp(Buffer.from(base64, 'base64')).ensureAlpha().raw().toBuffer()))
  return a!.reduce((sum, level, i) => sum + Math.abs(level - b![i]!), 0) / a!.length
}

/** Masks of thousands of points each. */
const heavyMasks = (file: SchemeFile) => Array.from({ length: 12 }, (_, i) => ({
  ...file.draft.masks[0]!,
  id: i === 0 ? file.draft.masks[0]!.id : crypto.randomUUID(),
  form: { kind: 'stencil', does: 'opens', soft: 0.3, wobble: 0, outlines: Array.from({ length: 40 }, () => Array.from({ length: 300 }, (_, k) => [k / 300, 0.123456])) },
}))

/** As it lies on a disk. */
const saved = (file: SchemeFile) => checkedSchemeFile(JSON.parse(JSON.stringify(file)))

async function plainFile(): Promise<{ file: SchemeFile, ctx: Awaited<ReturnType<typeof testWorkshop>>['ctx'] }> {
  const { ctx } = await testWorkshop({ role: 'painter' })
  return { ctx, file: saved(await writeSchemeFile(ctx, await carriedScheme(ctx, PLAIN))) }
}

describe('a scheme carried to another workshop in a file', () => {
  it('is the same scheme there, to the last figure and the last revision, whatever it is made of', async () => {
    await fc.assert(fc.asyncProperty(Carried, async (wish) => {
      const { ctx: here } = await testWorkshop({ role: 'painter' })
      const { ctx: there } = await testWorkshop({ role: 'painter', name: 'Elsewhere' })
      const file = saved(await writeSchemeFile(here, await carriedScheme(here, wish)))
      const { schemeId } = await takeInScheme(there, file)
      const again = saved(await writeSchemeFile(there, schemeId!))
      expect(byOrderOfIds({ ...again, pictures: [] })).toEqual(byOrderOfIds({ ...file, pictures: [] }))
      expect(again.pictures.map(({ base64: _bytes, ...picture }) => picture)).toEqual(file.pictures.map(({ base64: _bytes, ...picture }) => picture))
      for (const [i, picture] of again.pictures.entries()) expect(await apart(picture, file.pictures[i]!)).toBeLessThan(SAME_TO_THE_EYE)
      expect(again.draft.stack).not.toEqual([])
    }), { numRuns: 8 })
  }, 120_000)

  it('brings pictures of the draft and of the newest revision, as they are drawn there too', async () => {
    const { file } = await plainFile()
    expect(file.pictures.map(({ of, side }) => [of, side])).toEqual([['draft', 'left'], [1, 'left']])
    expect(Buffer.from(file.pictures[0]!.base64, 'base64').subarray(8, 12).toString()).toBe('WEBP')
  })

  it('names nothing of the workshop it comes from: no price, no stock, no person', async () => {
    const { ctx, file } = await plainFile()
    const text = JSON.stringify(file)
    for (const word of [ctx.workshopId, ctx.personId, 'Test painter', 'pricePerMl', 'volumeLeft']) expect(text).not.toContain(word)
  })
})

describe('what a file will do', () => {
  it('is told before anything is done, and nothing is done by telling it', async () => {
    const { file } = await plainFile()
    const { ctx: there, workshopId } = await testWorkshop({ role: 'painter' })
    const { schemeId, plan } = await lookAtSchemeFile(there, file)
    expect(schemeId).toBeNull()
    expect(plan).toMatchObject({ nameIsTaken: false, paints: [{ name: 'Paint 0', is: 'new' }, { name: 'Paint 3', is: 'new' }], blanks: [{ name: 'Own shad', is: 'new' }], masks: [{ name: 'Scale net', is: 'new' }], revisions: [1] })
    expect(await asOwner('select 1 from schemes where workshop_id = $1 union all select 1 from paints where workshop_id = $1', [workshopId])).toEqual([])
  })

  it('in its own workshop adds a scheme and nothing else', async () => {
    const { ctx, file } = await plainFile()
    const before = await listPaints(ctx)
    const { schemeId, plan } = await takeInScheme(ctx, file)
    expect(plan).toMatchObject({ nameIsTaken: true, paints: [{ is: 'on the shelf', because: '' }, { is: 'on the shelf' }], blanks: [{ is: 'here' }], masks: [{ is: 'here' }] })
    expect((await listPaints(ctx)).map(paint => paint.id)).toEqual(before.map(paint => paint.id))
    expect((await getScheme(ctx, schemeId!)).draft).toEqual(file.draft)
  })

  it('beside a paint of the same name and another colour is to add a second one, and leave the first alone', async () => {
    const { ctx, file } = await plainFile()
    const own = await getPaint(ctx, file.paints[0]!.id)
    await changePaint(ctx, own.id, own.version, { ...own, known: { how: 'masstone-hide', masstone: [20, 0, 0], passesToHide: 3 } })
    const { plan } = await takeInScheme(ctx, file)
    expect(plan.paints[0]).toEqual({ name: 'Paint 0', is: 'new', because: 'A paint of this name is on the shelf, of another colour. Both stay.' })
    const named = (await listPaints(ctx)).filter(paint => paint.name === 'Paint 0').map(paint => paint.known)
    expect(named).toHaveLength(2)
    expect(named).toContainEqual({ how: 'masstone-hide', masstone: [20, 0, 0], passesToHide: 3 })
  })
})

describe('a file that cannot be taken in', () => {
  const refusal = (change: (file: SchemeFile) => unknown) => plainFile().then(({ file }) => {
    try {
      checkedSchemeFile(change(file))
      return null
    }
    catch (error) {
      return (error as { data: { fields: { path: string, message: string }[] } }).data.fields
    }
  })

  it.each<[string, (file: SchemeFile) => unknown, string, RegExp]>([
    ['of something else', () => ({ hello: 1 }), 'format', /no scheme file/],
    ['that is a list', () => [], '', /no scheme file/],
    ['of a later version', file => ({ ...file, version: 2 }), 'version', /newer workshop/],
    ['with a field nobody knows', file => ({ ...file, scheme: { ...file.scheme, colour: 'red' } }), 'scheme.colour', /no such field/],
    ['with a word where a figure stands', file => ({ ...file, paints: [{ ...file.paints[0], density: 'heavy' }] }), 'paints.0.density', /./],
    ['that names a paint it does not hold', file => ({ ...file, paints: [], optics: [], revisions: [], pictures: [] }), 'draft.stack.1.coat.mix.parts.0.paintId', /does not hold/],
    ['with a paint twice', file => ({ ...file, paints: [...file.paints, file.paints[0]] }), 'paints.2', /twice/],
    ['with a revision nobody could publish', file => ({ ...file, revisions: [{ ...file.revisions[0], body: { ...file.revisions[0]!.body, stack: [], masks: [] } }] }), 'revisions.0.body', /no coats/],
    ['with a draft nobody could save again', file => ({ ...file, draft: { ...file.draft, answered: Array.from({ length: 200 }, () => 'x'.repeat(200)), masks: heavyMasks(file) } }), 'draft', /larger than/],
    ['with a picture that is no base64', file => ({ ...file, pictures: [{ ...file.pictures[0], base64: '<svg onload=x>' }] }), 'pictures.0.base64', /base64/],
  ])('%s is refused with its place', async (_, change, path, says) => {
    const fields = await refusal(change)
    expect(fields?.map(field => field.path)).toContain(path)
    expect(fields?.find(field => field.path === path)?.message).toMatch(says)
  })

  it('for a paint whose colour the engine cannot use says which', async () => {
    const { file } = await plainFile()
    const { ctx } = await testWorkshop({ role: 'painter' })
    const broken: SchemeFile = { ...file, paints: file.paints.map((paint, i) => i === 1 ? { ...paint, known: { how: 'flake', oxide: 'rutile', flakesPerPass: 0.4, sigma: 9, edge: 0.1 } } : paint) }
    await expect(lookAtSchemeFile(ctx, broken)).rejects.toMatchObject({ data: { code: 'input/invalid', fields: [{ path: 'paints.1.known' }] } })
  })

  it('leaves nothing behind when it fails at the very end', async () => {
    const { file } = await plainFile()
    const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
    await expect(takeInScheme(ctx, { ...file, revisions: [file.revisions[0]!, file.revisions[0]!] })).rejects.toThrow()
    for (const table of ['paints', 'paint_optics', 'blanks', 'masks', 'schemes', 'revisions'])
      expect(await asOwner(`select 1 from ${table} where workshop_id = $1`, [workshopId]), table).toEqual([])
  })
})

it('the bench takes a scheme out and brings none in; the front desk does neither', async () => {
  const { ctx, workshopId } = await testWorkshop({ role: 'painter' })
  const schemeId = await carriedScheme(ctx, PLAIN)
  const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
  const { ctx: desk } = await testPerson({ workshopId, role: 'desk' })
  const file = await writeSchemeFile(bench, schemeId)
  await expect(takeInScheme(bench, file)).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
  await expect(lookAtSchemeFile(bench, file)).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
  await expect(writeSchemeFile(desk, schemeId)).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
})
