import { type ActKeeper, createActKeeper, type Setback } from '~/bench/act-keeper'
import type { ActBox } from '~/bench/device/act-box'
import type { KeptAct } from '~/bench/device/bench-device'
import { newActs } from '~/bench/new-acts'
import type { RunAct, RunEvent, RunEventAnswer } from '#shared/bench/run-event'
import type { Notebook } from './notebook'

export type Air = 'there' | 'gone' | 'answer lost' | 'twice' | 'late' | 'signed out' | 'refusing'

/** A hand-over that failed, as the keeper is told of it. */
class Failed extends Error {
  constructor(readonly setback: Setback) {
    super(setback.kind)
  }
}

/** A page on a tablet: everything that is gone when the tablet is switched off. */
interface Page { isAlive: boolean, keeper: ActKeeper, heard: readonly Heard[], timers: (() => void)[], /** Acts are kept one press after the other. */ keeping: Promise<unknown> }

type Heard = RunEvent & { seq: number }

const OWNER = { personId: 'person', workshopId: 'workshop' }
const RUN = 'run'
/** Waits for ever: a page that was switched off comes back to nothing. */
const never = <T>() => new Promise<T>(() => undefined)

/**
 * A tablet with the keeper as it is, a disk on which each write is whole or not at all, a page that can be switched off
 * between any two writes, and an air that loses, doubles and delays what is said.
 */
export class Tablet {
  readonly disk: KeptAct[] = []
  /** What it heard of the run, as it lies on the disk. */
  private heardOnDisk: readonly Heard[] = []
  /** What somebody was shown as kept. */
  readonly shown = new Set<string>()
  /** What was ever done here, shown or not, in the order it was done. */
  readonly done: RunEvent[] = []
  air: Air = 'there'
  isFull = false
  /** Hand-overs on their way, which arrive when they like. */
  private readonly underWay: (readonly RunEvent[])[] = []
  private page: Page

  /** `clock` is what this tablet takes for the time, ms; it may be wrong and may jump. */
  constructor(private readonly notebook: Notebook, private readonly isReadable: (event: RunEvent) => boolean, readonly clock: { now: number }) {
    this.page = this.open()
  }

  /** Opens the app, first or anew; what lies on the disk is there. */
  private open(): Page {
    const page: Page = { isAlive: true, heard: this.heardOnDisk, timers: [], keeping: Promise.resolve(), keeper: { added: never, flush: never, stop: () => undefined } }
    page.keeper = createActKeeper(this.box(page), {
      send: (_, events) => this.send(page, events),
      setback: error => error instanceof Failed ? error.setback : { kind: 'no network' },
      onAnswers: () => undefined,
      onChange: () => undefined,
      later: (_, run) => {
        page.timers.push(run)
        return () => {
          page.timers = page.timers.filter(each => each !== run)
        }
      },
    })
    return page
  }

  /** The box of a page: the page may end before a write, or after it and before it is told. */
  private box(page: Page): ActBox {
    const write = async <T>(change: () => T): Promise<T> => {
      await Promise.resolve()
      if (!page.isAlive) return never()
      const answer = change()
      await Promise.resolve()
      return page.isAlive ? answer : never()
    }
    const replace = (id: string, by: (act: KeptAct) => KeptAct | null) => {
      const at = this.disk.findIndex(act => act.id === id)
      const act = this.disk[at]
      if (!act) return
      const now = by(act)
      this.disk.splice(at, 1, ...now ? [now] : [])
    }
    return {
      keep: (runId, events) => write(() => {
        if (this.isFull) throw new Error('full')
        this.disk.push(...events.map(event => ({ ...OWNER, id: event.id, runId, event, stand: 'waiting' as const, reason: '' })))
      }),
      ofRun: () => write(() => [...this.disk]),
      waiting: () => write(() => this.disk.filter(act => act.stand === 'waiting')),
      settle: answers => write(() => answers.forEach((answer: RunEventAnswer) => replace(answer.id, act =>
        answer.taken ? { ...act, stand: 'handed over' } : { ...act, stand: 'refused', reason: answer.reason }))),
      drop: ids => write(() => ids.forEach(id => replace(id, () => null))),
    }
  }

  private async send(page: Page, events: readonly RunEvent[]): Promise<readonly RunEventAnswer[]> {
    await Promise.resolve()
    if (this.air === 'signed out') throw new Failed({ kind: 'signed out', words: 'Signed out.' })
    if (this.air === 'refusing') throw new Failed({ kind: 'refusing', words: 'Not now.' })
    if (this.air === 'late') this.underWay.push(events)
    if (this.air === 'gone' || this.air === 'late') throw new Failed({ kind: 'no network' })
    if (!events.every(this.isReadable)) throw new Failed({ kind: 'unreadable', words: 'Not readable.' })
    const answers = await this.notebook.take(events)
    if (this.air === 'twice') await this.notebook.take(events)
    if (!page.isAlive) return never()
    if (this.air === 'answer lost') throw new Failed({ kind: 'no network' })
    return answers
  }

  /** What the tablet knows of the run: what it heard, then what is only here. */
  get known(): readonly RunEvent[] {
    const heard = new Set(this.page.heard.map(event => event.id))
    return [...this.page.heard, ...this.disk.filter(act => act.stand !== 'refused' && !heard.has(act.id)).map(act => act.event)]
  }

  /** Somebody does something: it is kept, then shown. */
  do(acts: readonly RunAct[]): void {
    const { page } = this
    page.keeping = page.keeping.then(async () => {
      const events = newActs(acts, this.known, this.clock.now)
      this.done.push(...events)
      await this.box(page).keep(RUN, events)
      for (const event of events) this.shown.add(event.id)
      void page.keeper.added()
    }).catch(() => undefined)
  }

  /** Hears what the notebook has, lets go of what it shows. */
  async hear(): Promise<void> {
    const { page } = this
    if (this.air !== 'there' && this.air !== 'twice') return
    const more = await this.notebook.since(page.heard.at(-1)?.seq ?? 0)
    if (!page.isAlive) return
    const last = page.heard.at(-1)?.seq ?? 0
    page.heard = [...page.heard, ...more.filter(event => event.seq > last)]
    this.heardOnDisk = page.heard
    void this.box(page).drop(more.map(event => event.id))
  }

  /** A hand-over that was given up arrives after all. */
  async arrive(): Promise<void> {
    const events = this.underWay.shift()
    if (events?.every(this.isReadable)) await this.notebook.take(events)
  }

  flush(): void {
    void this.page.keeper.flush()
  }

  /** Time passes: what was to be tried again is. */
  wait(): void {
    for (const run of this.page.timers.splice(0)) run()
  }

  /** The tablet is switched off in the middle of whatever it does, and on again. */
  kill(): void {
    this.page.isAlive = false
    this.page.timers = []
    this.page = this.open()
    void this.page.keeper.flush()
  }
}
