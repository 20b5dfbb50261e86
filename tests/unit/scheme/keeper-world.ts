import { createDraftKeeper, type DraftKeeper, type SaveState } from '~/composables/scheme/draft-keeper'
import type { SchemeBody } from '#shared/scheme/body'
import { body } from './bodies'

/** What a draft's keeper stands between: a server that holds one draft, a device, and a clock that only moves when told. */
export class World {
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

  /** Holds back every answer from now on; what it gives lets them go. */
  holdAnswers(): () => void {
    let open = () => {}
    this.gate = new Promise((resolve) => {
      open = resolve
    })
    return open
  }

  get state() {
    return this.states.at(-1)
  }
}

/** Lets every answer that is on its way arrive. */
export const settled = () => new Promise<void>(resolve => setImmediate(resolve))
