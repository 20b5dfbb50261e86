import type { RunEvent, RunEventAnswer } from '#shared/bench/run-event'
import { refusalOf, type RunPlan } from '#shared/bench/run-state'
import { sameValue } from '#shared/scheme/canonical'

/** The server of a model: takes acts, and tells what it has after a place in the order of arrival. */
export interface Notebook {
  take: (events: readonly RunEvent[]) => Promise<readonly RunEventAnswer[]>
  since: (place: number) => Promise<readonly (RunEvent & { seq: number })[]>
}

/** A server of a few lines that keeps the same promises as ours: each act once under its id, refused by its own words only. */
export class PaperNotebook implements Notebook {
  readonly events: (RunEvent & { seq: number })[] = []
  private readonly byId = new Map<string, RunEvent>()

  constructor(private readonly plan: RunPlan) {}

  async take(events: readonly RunEvent[]): Promise<RunEventAnswer[]> {
    return events.map((event): RunEventAnswer => {
      const { id, act } = event
      const reason = refusalOf(this.plan, act)
      if (reason !== null) return { id, taken: false, reason }
      const known = this.byId.get(id)
      if (known && !sameValue(known.act, act)) return { id, taken: false, reason: 'Its id already stands for another act.' }
      if (!known) {
        this.byId.set(id, event)
        this.events.push({ ...event, seq: this.events.length + 1 })
      }
      return { id, taken: true }
    })
  }

  async since(place: number): Promise<readonly (RunEvent & { seq: number })[]> {
    return this.events.slice(place)
  }
}
