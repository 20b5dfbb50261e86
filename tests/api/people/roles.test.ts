import { expect, it } from 'vitest'
import { changeRole, removePerson } from '#server/services/people/change-role'
import { listPeople } from '#server/services/people/list-people'
import { resumeSession } from '#server/services/people/resume-session'
import { testPerson, testWorkshop } from '../factories'

const lastOwner = expect.objectContaining({ data: { code: 'people/last-owner' } })

it('lets a changed role hold from the next request on', async () => {
  const { ctx, workshopId } = await testWorkshop()
  const painter = await testPerson({ workshopId, role: 'painter' })
  await changeRole(ctx, painter.ctx.personId, 'desk')
  expect((await resumeSession(ctx.db, painter.ctx.sessionId))?.membership?.role).toBe('desk')
})

it('ends the sessions of somebody who is taken out, and only those in this workshop', async () => {
  const { ctx, workshopId } = await testWorkshop()
  const painter = await testPerson({ workshopId, role: 'painter' })
  await removePerson(ctx, painter.ctx.personId)
  expect(await resumeSession(ctx.db, painter.ctx.sessionId)).toBeNull()
  expect(await resumeSession(ctx.db, ctx.sessionId)).not.toBeNull()
  expect((await listPeople(ctx)).map(person => person.id)).toEqual([ctx.personId])
})

it('keeps the last owner', async () => {
  const { ctx, workshopId } = await testWorkshop()
  await testPerson({ workshopId, role: 'painter' })
  await expect(changeRole(ctx, ctx.personId, 'painter')).rejects.toEqual(lastOwner)
  await expect(removePerson(ctx, ctx.personId)).rejects.toEqual(lastOwner)
})

it('keeps an owner when two of them let each other go at the same moment', async () => {
  const { ctx, workshopId } = await testWorkshop()
  const { ctx: other } = await testPerson({ workshopId, role: 'owner' })
  const outcome = await Promise.allSettled([removePerson(ctx, other.personId), removePerson(other, ctx.personId)])
  expect(outcome.map(one => one.status).sort()).toEqual(['fulfilled', 'rejected'])
})

it('lets everybody leave, and nobody but an owner take others out', async () => {
  const { workshopId, ctx: owner } = await testWorkshop()
  const { ctx } = await testPerson({ workshopId, role: 'bench' })
  await expect(removePerson(ctx, owner.personId)).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
  await removePerson(ctx, ctx.personId)
  expect(await listPeople(owner)).toHaveLength(1)
})

it('does not find somebody of another workshop', async () => {
  const { ctx } = await testWorkshop()
  const { ctx: stranger } = await testWorkshop()
  for (const act of [() => changeRole(stranger, ctx.personId, 'desk'), () => removePerson(stranger, ctx.personId)])
    await expect(act()).rejects.toMatchObject({ data: { code: 'people/not-found' } })
})

it('shows addresses to owners only, and one\'s own to oneself', async () => {
  const { workshopId, ctx: owner } = await testWorkshop()
  const { ctx: desk } = await testPerson({ workshopId, role: 'desk' })
  expect((await listPeople(owner)).every(person => person.email !== null)).toBe(true)
  expect((await listPeople(desk)).filter(person => person.email !== null).map(person => person.id)).toEqual([desk.personId])
})
