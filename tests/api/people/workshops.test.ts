import { expect, it } from 'vitest'
import { listBlanks } from '#server/services/blank/list-blanks'
import { changeWorkshop, getWorkshop, removeDemo } from '#server/services/people/change-workshop'
import { chooseWorkshop } from '#server/services/people/choose-workshop'
import { getSession } from '#server/services/people/get-session'
import { addWorkshop } from '#server/services/people/open-workshop'
import { resumeSession } from '#server/services/people/resume-session'
import { settingsOf } from '#server/services/people/workshop-view'
import { asOwner } from '../database'
import { testWorkshop } from '../factories'

it('takes a new name, other units and a lamp, each without the others', async () => {
  const { ctx, workshopId } = await testWorkshop({ name: 'Old name' })
  expect(await changeWorkshop(ctx, workshopId, { units: 'inch' })).toMatchObject({ name: 'Old name', settings: { units: 'inch' } })
  expect(await changeWorkshop(ctx, workshopId, { name: 'New name' })).toMatchObject({ name: 'New name', settings: { units: 'inch' } })
  expect(await changeWorkshop(ctx, workshopId, { ownLamp: 5300 })).toMatchObject({ name: 'New name', settings: { units: 'inch', ownLamp: 5300 } })
  expect((await getSession(ctx, workshopId)).workshop).toMatchObject({ name: 'New name', units: 'inch', ownLamp: 5300 })
  expect(await changeWorkshop(ctx, workshopId, { ownLamp: null })).toMatchObject({ settings: { units: 'inch', ownLamp: null } })
})

it('keeps single units and planning values it chose, and reads settings from before it could', async () => {
  const { ctx, workshopId } = await testWorkshop()
  await changeWorkshop(ctx, workshopId, { ownUnits: { pressure: 'kPa' } })
  await changeWorkshop(ctx, workshopId, { planning: { room: 18, transfer: { airbrush: 0.3 } } })
  expect((await getSession(ctx, workshopId)).workshop).toMatchObject({ units: 'metric', ownUnits: { pressure: 'kPa' }, planning: { room: 18, transfer: { airbrush: 0.3 } } })
  await changeWorkshop(ctx, workshopId, { planning: {} })
  expect((await getSession(ctx, workshopId)).workshop?.planning).toEqual({})
  expect(settingsOf({ settings: { units: 'inch' } })).toEqual({ units: 'inch', ownUnits: {}, planning: {}, ownLamp: null })
})

it('is not found by the owner of another', async () => {
  const { workshopId } = await testWorkshop()
  const { ctx: stranger } = await testWorkshop()
  const notFound = { data: { code: 'workshop/not-found' } }
  await expect(getWorkshop(stranger, workshopId)).rejects.toMatchObject(notFound)
  await expect(changeWorkshop(stranger, workshopId, { name: 'Mine' })).rejects.toMatchObject(notFound)
  await expect(chooseWorkshop(stranger, workshopId)).rejects.toMatchObject(notFound)
})

it('opens beside the first, furnished, and the session goes over to it and back', async () => {
  const { ctx, workshopId: first } = await testWorkshop()
  const second = await addWorkshop(ctx, 'The other shed')
  const session = await resumeSession(ctx.db, ctx.sessionId)
  expect(session?.membership).toEqual({ workshopId: second, role: 'owner' })
  expect(await listBlanks({ ...ctx, workshopId: second })).toHaveLength(9)
  expect(await listBlanks(ctx)).toEqual([])
  await chooseWorkshop(ctx, first)
  expect((await resumeSession(ctx.db, ctx.sessionId))?.membership?.workshopId).toBe(first)
})

it('goes with everything in it when it is a demo, and leaves its people where they were', async () => {
  const { ctx, workshopId } = await testWorkshop()
  await asOwner('update workshops set is_demo = true where id = $1', [workshopId])
  await asOwner(`insert into blanks (workshop_id, name, shape) values ($1, 'Skerry', '{}')`, [workshopId])
  await asOwner(`insert into schemes (workshop_id, name, blank_id, draft) select $1, 'Roach', id, '{}' from blanks where workshop_id = $1`, [workshopId])
  await asOwner(`insert into revisions (workshop_id, scheme_id, number, note, body, materials, body_hash, engine_version)
    select $1, id, 1, '', '{}', '{}', 'h', '1' from schemes where workshop_id = $1`, [workshopId])
  await asOwner(`insert into runs (workshop_id, number, scheme_id, revision_id, pieces) select $1, 1, scheme_id, id, 3 from revisions where workshop_id = $1`, [workshopId])
  await asOwner(`insert into run_events (id, workshop_id, run_id, kind, body, done_at) select gen_random_uuid(), $1, id, 'x', '{}', now() from runs where workshop_id = $1`, [workshopId])

  await removeDemo(ctx, workshopId)
  for (const table of ['blanks', 'schemes', 'revisions', 'runs', 'run_events', 'memberships'])
    expect(await asOwner(`select 1 from ${table} where workshop_id = $1`, [workshopId])).toEqual([])
  const session = await resumeSession(ctx.db, ctx.sessionId)
  expect(session).toMatchObject({ personId: ctx.personId, membership: null })
  expect(await getSession(ctx, null)).toMatchObject({ workshop: null, role: null, workshops: [] })
})

it('stays, with everything in it, when it is no demo', async () => {
  const { ctx, workshopId } = await testWorkshop()
  await expect(removeDemo(ctx, workshopId)).rejects.toMatchObject({ data: { code: 'workshop/not-demo' } })
})
