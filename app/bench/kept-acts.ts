import { z } from 'zod'
import { RunEvent } from '#shared/bench/run-event'

/** An act as it lies on the tablet, with its place in the order in which things were done here. */
const KeptAct = z.object({ place: z.number(), event: RunEvent })

/** Where acts lie on this tablet until the server has them. */
export interface ActShelf {
  /** What is kept for a run, in the order it was done. */
  read: (runId: string) => RunEvent[]
  write: (runId: string, event: RunEvent) => void
  remove: (runId: string, eventId: string) => void
}

/**
 * Keeps acts of one person in a browser's storage, each under a key of its own, so that two pages of the same run never
 * write over each other. Acts of somebody else who used this tablet stay for them. A full or closed storage loses only the
 * safety net, never the work on the page.
 */
export function actShelf(storage: Storage, personId: string): ActShelf {
  const prefix = (runId: string) => `countershade:act:${personId}:${runId}:`
  const quietly = <T>(work: () => T, otherwise: T): T => {
    try {
      return work()
    }
    catch {
      return otherwise
    }
  }
  const keys = (runId: string) => Array.from({ length: storage.length }, (_, n) => storage.key(n) ?? '').filter(key => key.startsWith(prefix(runId)))
  const kept = (runId: string) => keys(runId).flatMap((key) => {
    const text = storage.getItem(key)
    const read = text === null ? null : quietly(() => KeptAct.safeParse(JSON.parse(text)).data, undefined)
    return read ? [read] : []
  }).sort((a, b) => a.place - b.place)

  return {
    read: runId => quietly(() => kept(runId).map(({ event }) => event), []),
    write: (runId, event) => quietly(() => {
      const place = (kept(runId).at(-1)?.place ?? 0) + 1
      storage.setItem(`${prefix(runId)}${event.id}`, JSON.stringify({ place, event }))
    }, undefined),
    remove: (runId, eventId) => quietly(() => storage.removeItem(`${prefix(runId)}${eventId}`), undefined),
  }
}
