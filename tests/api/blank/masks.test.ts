import { describe, expect, it } from 'vitest'
import { addMask, changeMask } from '#server/services/blank/change-mask'
import { furnishWorkshop } from '#server/services/blank/furnish-workshop'
import { listMasks } from '#server/services/blank/list-masks'
import { getScheme } from '#server/services/scheme/get-scheme'
import { MaskForm } from '#shared/scheme/mask'
import { STARTER_MASKS } from '#shared/scheme/starter-masks'
import { MESH, testScheme } from '../scheme/ground'
import { testWorkshop } from '../factories'

const code = (name: string) => ({ data: expect.objectContaining({ code: name }) })
const net = (pitch: number) => MaskForm.parse({ kind: 'mesh', weave: 'hexagon', pitch, thread: 0.2 })

describe('the masks of a workshop', () => {
  it('are the starter nets and stencils when it opens', async () => {
    const { ctx } = await testWorkshop({ role: 'bench' })
    await furnishWorkshop(ctx)
    expect((await listMasks(ctx)).map(mask => mask.name).sort()).toEqual(STARTER_MASKS.map(mask => mask.name).sort())
  })

  it('are changed by whoever saw the newest, and then retired', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { id } = await addMask(ctx, { name: 'Fine net', form: net(1.6) })
    expect(await changeMask(ctx, id, 1, { name: 'Fine net', form: net(1.8) })).toMatchObject({ form: { pitch: 1.8 }, version: 2 })
    await expect(changeMask(ctx, id, 1, { name: 'Late', form: net(2) })).rejects.toMatchObject(code('mask/changed-meanwhile'))
    expect(await changeMask(ctx, id, 2, { name: 'Fine net', form: net(1.8), retired: true })).toMatchObject({ retired: true })
  })

  it('change no scheme that holds a copy', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { id } = await addMask(ctx, { name: 'Fine net', form: MESH.form })
    const { scheme } = await testScheme(ctx)
    await changeMask(ctx, id, 1, { name: 'Wide net', form: net(4) })
    expect((await getScheme(ctx, scheme.id)).draft.masks[0]?.form).toEqual(MESH.form)
  })

  it('are not the front desk’s, nor another workshop’s', async () => {
    const { ctx } = await testWorkshop({ role: 'painter' })
    const { ctx: stranger } = await testWorkshop({ role: 'owner', name: 'Elsewhere' })
    const { id } = await addMask(ctx, { name: 'Fine net', form: net(1.6) })
    await expect(listMasks({ ...ctx, role: 'desk' })).rejects.toMatchObject(code('auth/not-allowed'))
    await expect(addMask({ ...ctx, role: 'bench' }, { name: 'x', form: net(1) })).rejects.toMatchObject(code('auth/not-allowed'))
    await expect(changeMask(stranger, id, 1, { name: 'Mine', form: net(1) })).rejects.toMatchObject(code('mask/not-found'))
    expect(await listMasks(stranger)).toEqual([])
  })
})
