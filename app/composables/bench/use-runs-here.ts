import { onMounted, ref, type Ref, shallowRef, type ShallowRef } from 'vue'
import { ownerOf, whoIsHere } from './use-bench-who'
import { actBox } from '~/bench/device/act-box'
import { benchDevice } from '~/bench/device/bench-device'
import { runShelf } from '~/bench/device/run-shelf'
import { runState } from '#shared/bench/run-state'
import type { RunView } from '#shared/bench/run-view'

/** A run that lies on this tablet. */
export interface RunOnTablet {
  run: RunView
  /** Acts of it that wait to be handed over. */
  waiting: number
  isFinished: boolean
}

/** The runs on this tablet of whoever works here; null until they are found. */
export interface RunsHere {
  runs: Readonly<ShallowRef<readonly RunOnTablet[] | null>>
  /** Why there are none, as a sentence; empty when there are some. */
  word: Readonly<Ref<string>>
}

/** Looks for what can be opened without a network. Only in a browser. */
export function useRunsHere(): RunsHere {
  const runs = shallowRef<readonly RunOnTablet[] | null>(null)
  const word = ref('')

  async function look(): Promise<readonly RunOnTablet[]> {
    const who = await whoIsHere()
    if (who.kind !== 'known') {
      word.value = who.kind === 'nobody' ? 'Nobody is signed in on this tablet.' : 'There is no network, and nobody worked on this tablet before.'
      return []
    }
    const owner = ownerOf(who.who)
    const waiting = await actBox(benchDevice, owner).waiting()
    const kept = await runShelf(benchDevice, owner).all()
    if (kept.length === 0) word.value = 'None yet. A run that was opened once with a network lies here from then on.'
    return kept.map(({ run }) => ({
      run,
      waiting: waiting.filter(act => act.runId === run.id).length,
      isFinished: runState(run.events).finishedAt !== null,
    }))
  }

  onMounted(async () => {
    try {
      runs.value = await look()
    }
    catch {
      word.value = 'This tablet keeps nothing.'
      runs.value = []
    }
  })
  return { runs, word }
}
