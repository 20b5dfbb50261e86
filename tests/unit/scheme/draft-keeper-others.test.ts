import { beforeEach, describe, expect, it } from 'vitest'
import { SAVE_AFTER_MS } from '~/composables/scheme/draft-keeper'
import { body } from './bodies'
import { settled, World } from './keeper-world'

let world: World
beforeEach(() => {
  world = new World()
})

describe('when somebody else saved meanwhile', () => {
  beforeEach(async () => {
    world.server = { version: 2, body: body(9) }
    world.keeper.change(body(1, 2))
    await world.pass(SAVE_AFTER_MS)
  })

  it('nothing of theirs is overwritten and nothing of mine is lost', async () => {
    expect(world.conflicts).toBe(1)
    expect(world.state).toEqual({ is: 'conflict' })
    expect(world.states.map(state => state.is)).toEqual(['saving', 'saving', 'conflict'])
    world.keeper.change(body(1, 2, 3))
    await world.pass(60_000)
    expect(world.server.body).toEqual(body(9))
    expect(world.device).toEqual({ body: body(1, 2, 3), version: 1 })
    expect(world.sent).toBe(1)
  })

  it('nothing is sent by hand either before one version is chosen', async () => {
    await world.keeper.flush()
    expect([world.sent, world.conflicts]).toEqual([1, 1])
  })

  it('mine goes out once it is chosen, on top of theirs', async () => {
    world.keeper.settle(2, body(1, 2), 'then')
    await world.pass(SAVE_AFTER_MS)
    expect(world.server).toEqual({ version: 3, body: body(1, 2) })
    expect(world.device).toBeNull()
  })

  it('theirs is left as it is once it is chosen, and mine leaves the device', async () => {
    world.keeper.settle(2, null, 'then')
    await world.pass(60_000)
    expect(world.server).toEqual({ version: 2, body: body(9) })
    expect(world.device).toBeNull()
    expect(world.state).toEqual({ is: 'saved', at: 'then' })
  })
})

describe('word of somebody else\'s save', () => {
  it('has theirs read at once, though there is nothing of one\'s own to save', async () => {
    world.keeper.heard(2)
    await settled()
    expect(world.conflicts).toBe(1)
  })

  it('means nothing when it is one\'s own, even if it comes before the answer', async () => {
    const open = world.holdAnswers()
    world.keeper.change(body(1, 2))
    await world.pass(SAVE_AFTER_MS)
    world.keeper.heard(2)
    open()
    await world.pass(60_000)
    world.keeper.heard(2)
    await settled()
    expect([world.conflicts, world.state?.is]).toEqual([0, 'saved'])
  })

  it('that came while one\'s own was on its way is acted on after it', async () => {
    const open = world.holdAnswers()
    world.keeper.change(body(1, 2))
    await world.pass(SAVE_AFTER_MS)
    world.keeper.heard(3)
    open()
    await world.pass(10)
    expect(world.conflicts).toBe(1)
  })

  it('is read later when it cannot be read now', async () => {
    world.fails = 'no connection'
    world.keeper.heard(2)
    await settled()
    expect(world.conflicts).toBe(0)
    world.fails = 'never'
    await world.pass(5_000)
    expect(world.conflicts).toBe(1)
  })
})
