import type { BenchDevice, KeptRun, Owner } from './bench-device'
import type { RunEventView } from '#shared/bench/run-view'
import { RunView } from '#shared/bench/run-view'

/** Runs that lie on this tablet, of one person in one workshop. */
export interface RunShelf {
  read: (runId: string) => Promise<KeptRun | undefined>
  /** All of them, the newest run first. */
  all: () => Promise<KeptRun[]>
  bring: (run: RunView, broughtAt: number) => Promise<void>
  /** Adds what was heard of since, so that a reload without a network shows it. */
  hear: (runId: string, heard: { events: readonly RunEventView[], headNumber: number }) => Promise<void>
  remove: (runId: string) => Promise<void>
}

/** The shelf of one person. What an older form of the application left and nobody can read now counts as not there. */
export function runShelf(open: () => Promise<BenchDevice>, { personId, workshopId }: Owner): RunShelf {
  const keyOf = (runId: string) => `${personId} ${runId}`
  const readable = (kept: KeptRun | undefined) => kept?.workshopId === workshopId && RunView.safeParse(kept.run).success ? kept : undefined

  return {
    read: async runId => readable(await (await open()).get('runs', keyOf(runId))),
    async all() {
      const kept = await (await open()).getAll('runs', IDBKeyRange.bound(`${personId} `, `${personId}!`, false, true))
      return kept.filter(readable).sort((a, b) => b.run.number - a.run.number)
    },
    async bring(run, broughtAt) {
      const work = (await open()).transaction('runs', 'readwrite', { durability: 'strict' })
      await Promise.all([work.store.put({ key: keyOf(run.id), personId, workshopId, run, broughtAt }), work.done])
    },
    async hear(runId, { events, headNumber }) {
      const work = (await open()).transaction('runs', 'readwrite')
      const kept = await work.store.get(keyOf(runId))
      if (kept) {
        const last = kept.run.events.at(-1)?.seq ?? 0
        const fresh = events.filter(event => event.seq > last)
        await work.store.put({ ...kept, run: { ...kept.run, headNumber, events: [...kept.run.events, ...fresh] } })
      }
      await work.done
    },
    remove: async runId => (await open()).delete('runs', keyOf(runId)),
  }
}
