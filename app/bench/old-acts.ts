import { z } from 'zod'
import type { ActBox } from './device/act-box'
import { RunEvent } from '#shared/bench/run-event'

/** An act as earlier forms of the application kept it, with its place in the order in which things were done. */
const OldAct = z.object({ place: z.number(), event: RunEvent })
const PREFIX = 'countershade:act:'

interface Found { key: string, runId: string, place: number, event: RunEvent }

/**
 * Moves acts of one person from where earlier forms of the application kept them into the box; what cannot be read stays
 * where it is. Moved twice, by two pages at once, an act still lies in the box once.
 */
export async function moveOldActs(storage: Storage, personId: string, box: ActBox): Promise<void> {
  const keys = Array.from({ length: storage.length }, (_, n) => storage.key(n) ?? '').filter(key => key.startsWith(`${PREFIX}${personId}:`))
  const found = keys.flatMap((key): Found[] => {
    const old = OldAct.safeParse(readJson(storage.getItem(key)))
    const runId = key.split(':')[3]
    return old.success && runId ? [{ key, runId, ...old.data }] : []
  }).sort((a, b) => a.place - b.place)

  for (const { key, runId, event } of found) {
    const isThere = (await box.ofRun(runId)).some(act => act.id === event.id)
    if (!isThere) await box.keep(runId, [event])
    storage.removeItem(key)
  }
}

function readJson(text: string | null): unknown {
  try {
    return JSON.parse(text ?? '')
  }
  catch {
    return null
  }
}
