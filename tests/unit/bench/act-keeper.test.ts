import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type ActKeeper, createActKeeper, type HandOver, type Setback } from '~/bench/act-keeper'
import type { ActBox } from '~/bench/device/act-box'
import type { KeptAct } from '~/bench/device/bench-device'
import { EVENTS_MAX, type RunEvent, type RunEventAnswer } from '#shared/bench/run-event'
import { event } from './finish'

const done = (n: number) => event(n, { v: 1, kind: 'step-done', stepId: `step:${n}` })
const settle = async () => {
  for (let n = 0; n < 60; n++) await Promise.resolve()
}
const QUIET: HandOver = { network: 'online', waiting: 0, because: null, isSignedOut: false }

/** A tablet's drawer, which outlives its pages. */
function drawer(): ActBox & { all: KeptAct[] } {
  const box: ActBox & { all: KeptAct[] } = {
    all: [],
    async keep(runId, events) {
      for (const one of events) box.all.push({ id: one.id, runId, event: one, stand: 'waiting', reason: '', personId: 'person', workshopId: 'workshop' })
    },
    ofRun: async runId => box.all.filter(act => act.runId === runId),
    waiting: async () => box.all.filter(act => act.stand === 'waiting'),
    async settle(answers) {
      box.all = box.all.map((act) => {
        const answer = answers.find(each => each.id === act.id)
        if (!answer) return act
        return answer.taken ? { ...act, stand: 'handed over' } : { ...act, stand: 'refused', reason: answer.reason }
      })
    },
    async drop(ids) {
      box.all = box.all.filter(act => !ids.includes(act.id))
    },
  }
  return box
}

/** A server that takes each act once, a tablet, a network that comes and goes, and a clock that only moves when told. */
class World {
  network: 'there' | 'gone' | 'answer lost' | 'signed out' = 'there'
  server: RunEvent[] = []
  refuses = new Set<string>()
  unreadable = new Set<string>()
  gone = new Set<string>()
  batches: number[] = []
  timers: (() => void)[] = []
  state = QUIET
  box = drawer()
  keeper: ActKeeper = this.open()

  /** Opens the page, anew after a restart of the tablet. */
  open(): ActKeeper {
    this.timers = []
    this.keeper = createActKeeper(this.box, {
      send: (runId, events) => this.send(runId, events),
      setback: (error): Setback => {
        const said = (error as Error).message
        if (said === 'unreadable') return { kind: 'unreadable', words: 'It cannot be read.' }
        if (said === 'signed out') return { kind: 'signed out', words: 'Signed out.' }
        return said === 'gone' ? { kind: 'refusing', words: 'There is no such run.' } : { kind: 'no network' }
      },
      onAnswers: () => undefined,
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

  async act(n: number, runId = 'run') {
    await this.box.keep(runId, [done(n)])
    void this.keeper.added()
    await settle()
  }

  private async send(runId: string, events: readonly RunEvent[]): Promise<RunEventAnswer[]> {
    await Promise.resolve()
    if (this.network === 'gone') throw new Error('no network')
    if (this.network === 'signed out') throw new Error('signed out')
    if (this.gone.has(runId)) throw new Error('gone')
    if (events.some(each => this.unreadable.has(each.id))) throw new Error('unreadable')
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
    await world.act(1)
    expect(world.server).toEqual([done(1)])
    expect(world.state).toEqual(QUIET)
    expect(await world.box.waiting()).toEqual([])
  })

  it('are kept and counted while there is no network, and handed over in order when it is back', async () => {
    const world = new World()
    world.network = 'gone'
    for (const n of [1, 2, 3]) await world.act(n)
    expect(world.state).toEqual({ ...QUIET, network: 'none', waiting: 3 })
    world.network = 'there'
    await world.keeper.flush()
    expect(world.server).toEqual([1, 2, 3].map(done))
    expect(world.state.waiting).toBe(0)
  })

  it('wait for whoever signs in again when the sign-in has ended', async () => {
    const world = new World()
    world.network = 'signed out'
    await world.act(1)
    expect(world.state).toEqual({ ...QUIET, waiting: 1, because: 'Signed out.', isSignedOut: true })
    world.network = 'there'
    await world.open().flush()
    expect(world.server).toEqual([done(1)])
    expect(world.state).toEqual(QUIET)
  })

  it('that are refused lie aside with the reason, and hold up no other', async () => {
    const world = new World()
    world.refuses.add(done(1).id)
    await world.act(1)
    await world.act(2)
    expect(world.server).toEqual([done(2)])
    expect(world.box.all.find(act => act.id === done(1).id)).toMatchObject({ stand: 'refused', reason: 'No.' })
    expect(world.state.waiting).toBe(0)
  })

  it('are handed over one by one round the one the server cannot read, which lies aside', async () => {
    const world = new World()
    world.network = 'gone'
    for (const n of [1, 2, 3, 4, 5, 6, 7]) await world.act(n)
    world.unreadable.add(done(5).id)
    world.network = 'there'
    await world.keeper.flush()
    expect(world.server).toEqual([1, 2, 3, 4, 6, 7].map(done))
    expect(world.box.all.filter(act => act.stand === 'refused').map(act => act.id)).toEqual([done(5).id])
  })

  it('of a run the server does not know now wait, and hold up no other run', async () => {
    const world = new World()
    world.gone.add('elsewhere')
    await world.act(1, 'elsewhere')
    await world.act(2, 'here')
    await world.passTime()
    expect(world.server).toEqual([done(2)])
    expect(world.state).toMatchObject({ waiting: 1, because: 'There is no such run.' })
  })

  it('go in batches no larger than the server takes', async () => {
    const world = new World()
    world.network = 'gone'
    await world.box.keep('run', Array.from({ length: EVENTS_MAX + 30 }, (_, n) => done(n + 1)))
    world.network = 'there'
    await world.keeper.flush()
    expect(world.batches).toEqual([EVENTS_MAX, 30])
  })

  it('arrive each once and in order, however the network and the tablet behave', async () => {
    const anyStep = fc.constantFrom('act', 'act', 'act', 'gone', 'there', 'answer lost', 'signed out', 'wait', 'restart')
    await fc.assert(fc.asyncProperty(fc.array(anyStep, { maxLength: 40 }), async (steps) => {
      const world = new World()
      let count = 0
      for (const step of steps) {
        if (step === 'act') await world.act(++count)
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
      expect(await world.box.waiting()).toEqual([])
    }), { numRuns: 60 })
  })
})
