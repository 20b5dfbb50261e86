import { beforeEach, describe, expect, it } from 'vitest'
import { KEEP_WITHIN_MS, NO_ROOM, SAVE_AFTER_MS } from '~/composables/scheme/draft-keeper'
import { body } from './bodies'
import { settled, World } from './keeper-world'

let world: World
beforeEach(() => {
  world = new World()
})

describe('a draft that is worked on', () => {
  it('is sent once it has been left alone for a moment, however many changes there were', async () => {
    for (const n of [2, 3, 4]) {
      world.keeper.change(body(1, n))
      await world.pass(SAVE_AFTER_MS - 100)
    }
    expect(world.sent).toBe(0)
    await world.pass(SAVE_AFTER_MS)
    expect(world.sent).toBe(1)
    expect(world.server).toEqual({ version: 2, body: body(1, 4) })
    expect(world.state).toMatchObject({ is: 'saved' })
    expect(world.device).toBeNull()
  })

  it('lies on the device well within a second, so that a sudden end loses less', async () => {
    world.keeper.change(body(1, 2))
    await world.pass(KEEP_WITHIN_MS)
    expect(world.device).toEqual({ body: body(1, 2), version: 1 })
    expect(KEEP_WITHIN_MS).toBeLessThan(1000)
  })

  it('that changes while a save is on its way is saved again after it, from the version that save made', async () => {
    const open = world.holdAnswers()
    world.keeper.change(body(1, 2))
    await world.pass(SAVE_AFTER_MS)
    world.keeper.change(body(1, 2, 3))
    await world.pass(SAVE_AFTER_MS)
    expect(world.sent).toBe(1)
    open()
    await settled()
    expect(world.server).toEqual({ version: 3, body: body(1, 2, 3) })
    expect(world.conflicts).toBe(0)
    expect(world.keeper.isUnsaved()).toBe(false)
  })

  it('keeps the newest change on the device while an older one is on its way, whether that one arrives or not', async () => {
    for (const fails of ['never', 'no connection'] as const) {
      world = new World()
      const open = world.holdAnswers()
      world.keeper.change(body(1, 2))
      await world.pass(SAVE_AFTER_MS)
      world.keeper.change(body(1, 2, 3))
      const first = world.gate
      world.gate = new Promise(() => {})
      world.fails = fails
      open()
      await first
      await settled()
      expect(world.device).toEqual({ body: body(1, 2, 3), version: fails === 'never' ? 2 : 1 })
      expect(world.state?.is).not.toBe('saved')
    }
  })

  it('can be sent at once', async () => {
    world.keeper.change(body(1, 2))
    await world.keeper.flush()
    expect(world.server.body).toEqual(body(1, 2))
    expect(world.timers).toHaveLength(0)
  })
})

describe('without a connection', () => {
  it('the work stays on the device and says so, without flicker, and goes out when the line is back', async () => {
    world.fails = 'no connection'
    world.keeper.change(body(1, 2))
    await world.pass(SAVE_AFTER_MS)
    world.keeper.change(body(1, 2, 3))
    await world.pass(10_000)
    const offline = world.states.slice(world.states.findLastIndex(state => state.is === 'saving') + 1)
    expect(offline.length).toBeGreaterThan(1)
    expect(offline.every(state => state.is === 'on this device')).toBe(true)
    expect(world.device?.body).toEqual(body(1, 2, 3))
    world.fails = 'never'
    await world.pass(60_000)
    expect(world.server.body).toEqual(body(1, 2, 3))
    expect(world.state).toMatchObject({ is: 'saved' })
  })

  it('says that a change is on the device only once the device has said so', async () => {
    world.fails = 'no connection'
    world.keeper.change(body(1, 2))
    await world.pass(SAVE_AFTER_MS)
    expect(world.state?.is).toBe('on this device')
    world.keeper.change(body(1, 2, 3))
    await settled()
    expect(world.state?.is).toBe('saving')
    await world.pass(KEEP_WITHIN_MS)
    expect([world.state?.is, world.device?.body]).toEqual(['on this device', body(1, 2, 3)])
  })

  it('says so when the device has no room for it either, and saves when the line is back', async () => {
    world.fails = 'no connection'
    world.isFull = true
    world.keeper.change(body(1, 2))
    await world.pass(SAVE_AFTER_MS)
    expect(world.state).toEqual({ is: 'cannot save', because: `Because. ${NO_ROOM}` })
    world.fails = 'never'
    await world.pass(60_000)
    expect(world.server.body).toEqual(body(1, 2))
    expect(world.state).toMatchObject({ is: 'saved' })
  })

  it('tries are spaced further and further apart', async () => {
    world.fails = 'no connection'
    world.keeper.change(body(1, 2))
    await world.pass(SAVE_AFTER_MS + 60_000)
    expect(world.sent).toBeLessThanOrEqual(7)
    expect(world.sent).toBeGreaterThanOrEqual(4)
  })
})

it('what is sent at once lies on the device too until the answer comes', async () => {
  world.gate = new Promise(() => {})
  world.keeper.change(body(1, 2))
  void world.keeper.flush()
  await world.pass(KEEP_WITHIN_MS)
  expect(world.device?.body).toEqual(body(1, 2))
})

it('a save that is refused says why, keeps the work, and is tried again with the next change', async () => {
  world.fails = 'refused'
  world.keeper.change(body(1, 2))
  await world.pass(60_000)
  expect(world.sent).toBe(1)
  expect(world.state).toEqual({ is: 'cannot save', because: 'Because.' })
  expect(world.device?.body).toEqual(body(1, 2))
  world.fails = 'never'
  world.keeper.change(body(1, 2, 3))
  await world.pass(SAVE_AFTER_MS)
  expect(world.server.body).toEqual(body(1, 2, 3))
})

it('a page that goes away leaves what is unsaved on the device', () => {
  world.keeper.change(body(1, 2))
  world.keeper.stop()
  expect(world.device?.body).toEqual(body(1, 2))
  expect(world.timers).toHaveLength(0)
})
