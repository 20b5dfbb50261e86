import { type NoticeLine, type NoticePorts, openNotices } from '#server/db/notices'
import { settings } from '#server/settings'
import { Problem } from '#shared/errors/problem'
import { readRunNews, RUN_CHANNEL } from './run-news'

/** Screens one process keeps informed at most, and those of one person: a tablet in each hand, and some that were left open. */
export const LISTENERS_MAX = 300
export const LISTENERS_OF_ONE_MAX = 8

/** Tells those who follow a run that something arrived in it, whichever process took it in, over one line to the database. */
export class RunHub {
  private readonly wakes = new Map<string, Set<() => void>>()
  private readonly ofPerson = new Map<string, number>()
  private line: NoticeLine | undefined
  private count = 0

  constructor(private readonly open: (ports: NoticePorts) => NoticeLine) {}

  /**
   * Calls `wake` whenever acts may have arrived in the run, until the answer is called. The line is open while anybody listens.
   * @throws {Problem} run/too-many-listening
   */
  listen(personId: string, runId: string, wake: () => void): () => void {
    this.assertRoom(personId)
    this.count++
    this.ofPerson.set(personId, (this.ofPerson.get(personId) ?? 0) + 1)
    const wakes = this.wakes.get(runId) ?? new Set()
    wakes.add(wake)
    this.wakes.set(runId, wakes)
    this.line ??= this.open({ onNotice: payload => this.tell(payload), onOpen: () => this.tellAll() })

    let isOver = false
    return () => {
      if (isOver) return
      isOver = true
      this.count--
      const left = (this.ofPerson.get(personId) ?? 1) - 1
      if (left > 0) this.ofPerson.set(personId, left)
      else this.ofPerson.delete(personId)
      wakes.delete(wake)
      if (wakes.size === 0 && this.wakes.get(runId) === wakes) this.wakes.delete(runId)
      if (this.count === 0) void this.close()
    }
  }

  /** @throws {Problem} run/too-many-listening */
  assertRoom(personId: string): void {
    const own = this.ofPerson.get(personId) ?? 0
    if (this.count >= LISTENERS_MAX || own >= LISTENERS_OF_ONE_MAX) throw new Problem({ code: 'run/too-many-listening' })
  }

  /** How many listen now. */
  get listeners(): number {
    return this.count
  }

  /** Lets go of the line. */
  async close(): Promise<void> {
    const { line } = this
    this.line = undefined
    await line?.close()
  }

  private tell(payload: string): void {
    const news = readRunNews(payload)
    if (news) for (const wake of this.wakes.get(news.runId) ?? []) wake()
  }

  private tellAll(): void {
    for (const wakes of this.wakes.values()) for (const wake of wakes) wake()
  }
}

let current: RunHub | undefined

/** The hub of this process. */
export function runHub(): RunHub {
  current ??= new RunHub(ports => openNotices(settings().databaseUrl, RUN_CHANNEL, ports))
  return current
}
