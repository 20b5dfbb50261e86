import type { BenchDevice, KeptAct, Owner } from './bench-device'
import type { RunEvent, RunEventAnswer } from '#shared/bench/run-event'

/** Where the acts of one person lie on this tablet until the notebook shows them. */
export interface ActBox {
  /** Keeps acts of a run, all or none. When it has returned they survive a sudden end; when it throws, none is kept. */
  keep: (runId: string, events: readonly RunEvent[]) => Promise<void>
  /** Everything of one run, in the order it was done. */
  ofRun: (runId: string) => Promise<KeptAct[]>
  /** Everything that waits to be handed over, of all runs, in the order it was done. */
  waiting: () => Promise<KeptAct[]>
  /** Notes the server's answers: what was taken waits to be heard of, what was refused lies aside with its reason. */
  settle: (answers: readonly RunEventAnswer[]) => Promise<void>
  /** Lets go of acts that the notebook shows by now, or whose refusal was read. */
  drop: (ids: readonly string[]) => Promise<void>
}

/** Whatever confirms a write only when it is on the disk, not in the system's memory. */
const STRICT = { durability: 'strict' } as const

/** The box of one person in one workshop. Acts of anybody else who used this tablet stay for them. */
export function actBox(open: () => Promise<BenchDevice>, owner: Owner): ActBox {
  const isOwn = (act: KeptAct) => act.personId === owner.personId && act.workshopId === owner.workshopId
  const all = async () => (await (await open()).getAllFromIndex('acts', 'person', owner.personId)).filter(isOwn)

  /** Changes each of these acts, or lets it go when the change is null. */
  async function change(ids: readonly string[], to: (act: KeptAct) => KeptAct | null): Promise<void> {
    if (ids.length === 0) return
    const work = (await open()).transaction('acts', 'readwrite', STRICT)
    const acts = work.store.index('id')
    for (const id of ids) {
      const place = await acts.openCursor(id)
      if (!place) continue
      const changed = to(place.value)
      await (changed === null ? place.delete() : place.update(changed))
    }
    await work.done
  }

  return {
    async keep(runId, events) {
      const work = (await open()).transaction('acts', 'readwrite', STRICT)
      // One that fails ends the whole: what was done with one press is kept whole or not at all.
      const writes = events.map(event => work.store.add({ ...owner, id: event.id, runId, event, stand: 'waiting', reason: '' }))
      await Promise.all([...writes, work.done])
    },
    ofRun: async runId => (await all()).filter(act => act.runId === runId),
    waiting: async () => (await all()).filter(act => act.stand === 'waiting'),
    async settle(answers) {
      const answerOf = new Map(answers.map(answer => [answer.id, answer]))
      await change([...answerOf.keys()], (act) => {
        const answer = answerOf.get(act.id)
        return answer?.taken === false ? { ...act, stand: 'refused', reason: answer.reason } : { ...act, stand: 'handed over' }
      })
    },
    drop: ids => change(ids, () => null),
  }
}
