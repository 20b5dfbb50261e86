import { beforeEach, describe, expect, it } from 'vitest'
import { createDraftKeeper, type DraftKeeper, KEEP_WITHIN_MS, NO_ROOM, SAVE_AFTER_MS, type SaveState } from '~/composables/scheme/draft-keeper'
import type { SchemeBody } from '#shared/scheme/body'
import { body } from './bodies'

/** A server that holds one draft, a device, and a clock that only moves when told. */
class World {
  now = 0
  timers: { at: number, run: () => void }[] = []
  server = { version: 1, body: body(1) }
  device: { body: SchemeBody, version: number } | null = null
  states: SaveState[] = []
  conflicts = 0
  isFull = false
  sent = 0
  fails: 'never' | 'no connection' | 'refused' = 'never'
  /** While set, answers wait for it. */
  gate: Promise<void> | null = null
  keeper: DraftKeeper
  /** What the painter has on the page. */
  mine = body(1, 2)

  constructor() {
    this.keeper = createDraftKeeper(1, {
      send: (unsaved, version) => this.send(unsaved, version),
      failure: (error) => {
        const why = (error as Error).message
        return why === 'changed meanwhile' ? { why } : { why: why as 'no connection' | 'refused', because: 'Because.' }
      },
      keep: async (unsaved, version) => {
        if (this.isFull) throw new DOMException('full', 'QuotaExceededError')
        this.device = unsaved && { body: unsaved, version }
      },
      reconcile: async () => {
        if (this.fails !== 'never') throw new Error(this.fails)
        this.conflicts++
        this.keeper.hold(this.mine)
      },
      onState: state => this.states.push(state),
      later: (ms, run) => {
        const timer = { at: this.now + ms, run }
        this.timers.push(timer)
        return () => {
          this.timers = this.timers.filter(each => each !== timer)
        }
      },
    })
  }

  async send(unsaved: SchemeBody, version: number) {
    this.sent++
    await this.gate
    if (this.fails !== 'never') throw new Error(this.fails)
    if (version !== this.server.version) throw new Error('changed meanwhile')
    this.server = { version: version + 1, body: unsaved }
    return { version: version + 1, savedAt: `at ${this.now}` }
  }

  async pass(ms: number) {
    const end = this.now + ms
    for (;;) {
      const next = this.timers.filter(timer => timer.at <= end).sort((a, b) => a.at - b.at)[0]
      if (!next) break
      this.now = next.at
      this.timers = this.timers.filter(timer => timer !== next)
      next.run()
      await settled()
    }
    this.now = end
    await settled()
  }

  get state() {
    return this.states.at(-1)
  }
}

/** Lets every answer that is on its way arrive. */
const settled = () => new Promise<void>(resolve => setImmediate(resolve))

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
    let open = () => {}
    world.gate = new Promise((resolve) => {
      open = resolve
    })
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
      let open = () => {}
      world.gate = new Promise((resolve) => {
        open = resolve
      })
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
    let open = () => {}
    world.gate = new Promise((resolve) => {
      open = resolve
    })
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
    let open = () => {}
    world.gate = new Promise((resolve) => {
      open = resolve
    })
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
