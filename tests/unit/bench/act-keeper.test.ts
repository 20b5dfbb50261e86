import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { createActKeeper, type ActKeeper, type HandOver } from '~/bench/act-keeper'
import { actShelf } from '~/bench/kept-acts'
import { EVENTS_MAX, type RunEvent, type RunEventAnswer } from '#shared/bench/run-event'
import { event } from './finish'

const done = (n: number) => event(n, { v: 1, kind: 'step-done', stepId: `step:${n}` })
const settle = async () => {
  for (let n = 0; n < 20; n++) await Promise.resolve()
}

/** A browser's storage. */
class Drawer implements Storage {
  private readonly kept = new Map<string, string>()
  get length() { return this.kept.size }
  clear() { this.kept.clear() }
  getItem(key: string) { return this.kept.get(key) ?? null }
  key(n: number) { return [...this.kept.keys()][n] ?? null }
  removeItem(key: string) { this.kept.delete(key) }
  setItem(key: string, value: string) { this.kept.set(key, value) }
}

/** A server that takes each act once, a tablet, a network that comes and goes, and a clock that only moves when told. */
class World {
  network: 'there' | 'gone' | 'answer lost' = 'there'
  server: RunEvent[] = []
  refuses = new Set<string>()
  batches: number[] = []
  timers: (() => void)[] = []
  state: HandOver = { network: 'online', kept: 0, because: null }
  answers: RunEventAnswer[] = []
  shelf = actShelf(new Drawer(), 'person')
  keeper: ActKeeper = this.open()

  /** Opens the page, anew after a restart of the tablet. */
  open(): ActKeeper {
    this.timers = []
    this.keeper = createActKeeper(this.shelf.read('run'), {
      send: events => this.send(events),
      reason: error => (error as Error).message === 'refused' ? 'Signed out.' : null,
      keep: kept => this.shelf.write('run', kept),
      forget: id => this.shelf.remove('run', id),
      onAnswers: answers => this.answers.push(...answers),
      onChange: (state) => {
        this.state = state
      },
      later: (_, run) => {
        this.timers.push(run)
        return () => {
          this.timers = this.timers.filter(each => each !== run)
        }
      },
    })
    return this.keeper
  }

  private async send(events: readonly RunEvent[]): Promise<RunEventAnswer[]> {
    await Promise.resolve()
    if (this.network === 'gone') throw new Error('no network')
    this.batches.push(events.length)
    for (const each of events) if (!this.refuses.has(each.id) && !this.server.some(had => had.id === each.id)) this.server.push(each)
    if (this.network === 'answer lost') throw new Error('no network')
    return events.map(({ id }): RunEventAnswer => this.refuses.has(id) ? { id, taken: false, reason: 'No.' } : { id, taken: true })
  }

  async passTime() {
    for (const run of this.timers.splice(0)) run()
    await settle()
  }
}

describe('acts at the bench', () => {
  it('are handed over as they are done', async () => {
    const world = new World()
    world.keeper.add(done(1))
    await settle()
    expect(world.server).toEqual([done(1)])
    expect(world.state).toEqual({ network: 'online', kept: 0, because: null })
    expect(world.shelf.read('run')).toEqual([])
  })

  it('are kept and counted while there is no network, and handed over in order when it is back', async () => {
    const world = new World()
    world.network = 'gone'
    for (const n of [1, 2, 3]) world.keeper.add(done(n))
    await settle()
    expect(world.state).toEqual({ network: 'none', kept: 3, because: null })
    world.network = 'there'
    await world.keeper.flush()
    expect(world.server).toEqual([1, 2, 3].map(done))
    expect(world.state.kept).toBe(0)
  })

  it('survive a restart of the tablet', async () => {
    const world = new World()
    world.network = 'gone'
    world.keeper.add(done(1))
    world.keeper.add(done(2))
    await settle()
    world.network = 'there'
    await world.open().flush()
    expect(world.server).toEqual([1, 2].map(done))
    expect(world.shelf.read('run')).toEqual([])
  })

  it('arrive once when only the answer was lost', async () => {
    const world = new World()
    world.network = 'answer lost'
    world.keeper.add(done(1))
    await settle()
    expect(world.state.kept).toBe(1)
    world.network = 'there'
    await world.passTime()
    expect(world.server).toEqual([done(1)])
    expect(world.state).toEqual({ network: 'online', kept: 0, because: null })
  })

  it('that are refused are told, and hold up no other', async () => {
    const world = new World()
    world.refuses.add(done(1).id)
    world.keeper.add(done(1))
    world.keeper.add(done(2))
    await settle()
    expect(world.server).toEqual([done(2)])
    expect(world.answers.find(answer => !answer.taken)).toEqual({ id: done(1).id, taken: false, reason: 'No.' })
    expect(world.shelf.read('run')).toEqual([])
  })

  it('go in batches no larger than the server takes', async () => {
    const world = new World()
    world.network = 'gone'
    for (let n = 1; n <= EVENTS_MAX + 30; n++) world.keeper.add(done(n))
    await settle()
    world.network = 'there'
    await world.keeper.flush()
    expect(world.batches).toEqual([EVENTS_MAX, 30])
  })

  it('arrive each once and in order, however the network and the tablet behave', async () => {
    const anyStep = fc.constantFrom('act', 'act', 'act', 'gone', 'there', 'answer lost', 'wait', 'restart')
    await fc.assert(fc.asyncProperty(fc.array(anyStep, { maxLength: 40 }), async (steps) => {
      const world = new World()
      let count = 0
      for (const step of steps) {
        if (step === 'act') world.keeper.add(done(++count))
        else if (step === 'wait') await world.passTime()
        else if (step === 'restart') {
          world.keeper.stop()
          await settle()
          world.open()
        }
        else world.network = step as World['network']
        await settle()
      }
      world.network = 'there'
      await world.keeper.flush()
      await world.keeper.flush()
      expect(world.server).toEqual(Array.from({ length: count }, (_, n) => done(n + 1)))
      expect(world.shelf.read('run')).toEqual([])
    }), { numRuns: 60 })
  })

  it('of somebody else stay for them', () => {
    const drawer = new Drawer()
    actShelf(drawer, 'one').write('run', done(1))
    expect(actShelf(drawer, 'other').read('run')).toEqual([])
    expect(actShelf(drawer, 'one').read('run')).toEqual([done(1)])
  })
})
