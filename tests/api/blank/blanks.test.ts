import { describe, expect, it } from 'vitest'
import { addBlank, changeBlank } from '#server/services/blank/change-blank'
import { furnishWorkshop } from '#server/services/blank/furnish-workshop'
import { getBlank, listBlanks } from '#server/services/blank/list-blanks'
import { blankFromDimensions } from '#shared/blank/blank-from-dimensions'
import { BUILT_IN_BLANKS } from '#shared/blank/built-in-blanks'
import { testScheme } from '../scheme/ground'
import { testWorkshop } from '../factories'

const code = (name: string) => ({ data: expect.objectContaining({ code: name }) })
const SHAPE = blankFromDimensions({
  name: 'our-crank', label: 'Our crank', form: 'minnow-90', length: 70, height: 22, width: 16, hasLip: false, hasFins: true, hasJoints: true,
})

describe('the blanks of a workshop', () => {
  it('are the built-in ones when it opens, and its own after that', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    await furnishWorkshop(ctx)
    const own = await addBlank(ctx, { name: 'Our crank', shape: SHAPE })
    const all = await listBlanks(ctx)
    expect(all).toHaveLength(BUILT_IN_BLANKS.length + 1)
    expect(all.find(blank => blank.id === own.id)).toMatchObject({ builtIn: false, version: 1, schemes: 0 })
    expect((await getBlank(ctx, own.id)).shape).toEqual(SHAPE)
  })

  it('may be renamed and retired when built in, but not redrawn', async () => {
    const { ctx } = await testWorkshop({ role: 'owner' })
    await furnishWorkshop(ctx)
    const [first] = await listBlanks(ctx)
    const renamed = await changeBlank(ctx, first!.id, 1, { name: 'The old mould', shape: first!.shape, retired: true })
    expect(renamed).toMatchObject({ name: 'The old mould', retired: true, builtIn: true, version: 2 })
    await expect(changeBlank(ctx, first!.id, 2, { name: 'x', shape: SHAPE })).rejects.toMatchObject(code('blank/built-in'))
  })

  it('are redrawn when they are its own, by whoever saw the newest', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { id } = await addBlank(ctx, { name: 'Our crank', shape: SHAPE })
    const longer = { ...SHAPE, length: 72 }
    expect((await changeBlank(ctx, id, 1, { name: 'Our crank', shape: longer })).shape.length).toBe(72)
    await expect(changeBlank(ctx, id, 1, { name: 'Late', shape: SHAPE })).rejects.toMatchObject(code('blank/changed-meanwhile'))
  })

  it('say how many schemes are painted on them, also after a change', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { blankId } = await testScheme(ctx)
    const blank = await getBlank(ctx, blankId)
    expect(blank.schemes).toBe(1)
    expect(await changeBlank(ctx, blankId, 1, { name: 'Renamed', shape: blank.shape })).toMatchObject({ schemes: 1 })
  })

  it('are seen by everybody in the workshop, changed by those who paint, and unknown elsewhere', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { ctx: stranger } = await testWorkshop({ role: 'owner', name: 'Elsewhere' })
    const { id } = await addBlank(ctx, { name: 'Our crank', shape: SHAPE })
    expect(await getBlank({ ...ctx, role: 'desk' }, id)).toMatchObject({ name: 'Our crank' })
    await expect(addBlank({ ...ctx, role: 'bench' }, { name: 'x', shape: SHAPE })).rejects.toMatchObject(code('auth/not-allowed'))
    await expect(getBlank(stranger, id)).rejects.toMatchObject(code('blank/not-found'))
    await expect(changeBlank(stranger, id, 1, { name: 'Mine', shape: SHAPE })).rejects.toMatchObject(code('blank/not-found'))
  })
})
