import { onMounted, ref, type Ref, shallowRef, type ShallowRef } from 'vue'
import { fetchRun } from './bench-link'
import { useBenchClock } from './use-bench-clock'
import { ownerOf, whoIsHere } from './use-bench-who'
import { benchDevice, type Owner } from '~/bench/device/bench-device'
import { type RunShelf, runShelf } from '~/bench/device/run-shelf'
import { explain } from '~/errors/explain'
import { problemOf } from '~/errors/problem-of'
import type { RunView } from '#shared/bench/run-view'

/** A run that is opened on this tablet. */
export interface RunHere {
  run: RunView
  owner: Owner
  shelf: RunShelf
  /** It lies on this tablet, whole. */
  isKept: boolean
  /** When it was brought here, ms. */
  broughtAt: number
}

/** Opening a run: it, or why it cannot be opened. */
export interface OpenRun { here: ShallowRef<RunHere | null>, problem: Ref<string | null>, open: () => Promise<void> }

/**
 * Opens a run to be followed: from this tablet when it lies here, else from the server, and then it is brought here. What was
 * done since is heard of afterwards: the frozen finish never changes.
 */
export function useRunHere(runId: string): OpenRun {
  const here = shallowRef<RunHere | null>(null)
  const problem = ref<string | null>(null)
  const clock = useBenchClock()

  async function bring(shelf: RunShelf): Promise<Pick<RunHere, 'run' | 'isKept' | 'broughtAt'>> {
    const asked = Date.now()
    const run = await fetchRun(runId)
    clock.heard(run.now, asked, Date.now())
    const broughtAt = clock.read()
    const isKept = await shelf.bring(run, broughtAt).then(() => true, () => false)
    return { run, isKept, broughtAt }
  }

  async function open(): Promise<void> {
    problem.value = null
    const who = await whoIsHere()
    if (who.kind === 'nobody') return void await navigateTo({ path: '/sign-in', query: { back: `/runs/${runId}/follow` } })
    if (who.kind === 'no network') {
      problem.value = 'There is no network, and this run was not opened on this tablet before.'
      return
    }
    const owner = ownerOf(who.who)
    const shelf = runShelf(benchDevice, owner)
    const kept = await shelf.read(runId).catch(() => undefined)
    try {
      here.value = { owner, shelf, ...kept ? { run: kept.run, isKept: true, broughtAt: kept.broughtAt } : await bring(shelf) }
    }
    catch (error) {
      const refusal = problemOf(error)
      if (refusal?.code === 'auth/signed-out') return void await navigateTo({ path: '/sign-in', query: { back: `/runs/${runId}/follow` } })
      problem.value = refusal ? explain(error) : 'There is no network, and this run was not opened on this tablet before.'
    }
  }
  onMounted(open)
  return { here, problem, open }
}
