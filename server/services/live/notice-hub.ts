import type { NoticeLine, NoticePorts } from '#server/db/notices'
import { Problem } from '#shared/errors/problem'

/** Screens one process keeps informed at most by one hub, and those of one person: a tablet in each hand, and some that were left open. */
export const LISTENERS_MAX = 300
export const LISTENERS_OF_ONE_MAX = 8

/** What is heard: the notice itself, or null when the line was opened again and something may have been missed. */
export type Hear = (payload: string | null) => void

/** What a hub is about. */
export interface HubKind {
  /** The thing a notice is about; null for what is not of the channel's form. */
  topicOf: (payload: string) => string | null
  /** What one too many is refused with. */
  tooMany: 'run/too-many-listening' | 'scheme/too-many-listening'
}

/** Tells those who follow something what was said of it, on whichever process, over one line to the database. */
export class NoticeHub {
  private readonly hearers = new Map<string, Set<Hear>>()
  private readonly ofPerson = new Map<string, number>()
  private line: NoticeLine | undefined
  private count = 0

  constructor(private readonly open: (ports: NoticePorts) => NoticeLine, private readonly kind: HubKind) {}

  /**
   * Calls `hear` with every notice about the topic, until the answer is called. The line is open while anybody listens.
   * @throws {Problem} when too many listen
   */
  listen(personId: string, topic: string, hear: Hear): () => void {
    this.assertRoom(personId)
    this.count++
    this.ofPerson.set(personId, (this.ofPerson.get(personId) ?? 0) + 1)
    const hearers = this.hearers.get(topic) ?? new Set()
    hearers.add(hear)
    this.hearers.set(topic, hearers)
    this.line ??= this.open({ onNotice: payload => this.tell(payload), onOpen: () => this.tellAll() })

    let isOver = false
    return () => {
      if (isOver) return
      isOver = true
      this.count--
      const left = (this.ofPerson.get(personId) ?? 1) - 1
      if (left > 0) this.ofPerson.set(personId, left)
      else this.ofPerson.delete(personId)
      hearers.delete(hear)
      if (hearers.size === 0 && this.hearers.get(topic) === hearers) this.hearers.delete(topic)
      if (this.count === 0) void this.close()
    }
  }

  /** @throws {Problem} when too many listen, on this process or of this person */
  assertRoom(personId: string): void {
    const own = this.ofPerson.get(personId) ?? 0
    if (this.count >= LISTENERS_MAX || own >= LISTENERS_OF_ONE_MAX) throw new Problem({ code: this.kind.tooMany })
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
    const topic = this.kind.topicOf(payload)
    if (topic !== null) for (const hear of this.hearers.get(topic) ?? []) hear(payload)
  }

  private tellAll(): void {
    for (const hearers of this.hearers.values()) for (const hear of hearers) hear(null)
  }
}
