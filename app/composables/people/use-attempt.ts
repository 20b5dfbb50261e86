import { type Ref, readonly, ref } from 'vue'
import { explain } from '~/errors/explain'
import { fieldsOf } from '~/errors/problem-of'

/** One thing tried at a time: whether it is under way, and what went wrong, for the whole and by field. */
export interface Attempt {
  busy: Readonly<Ref<boolean>>
  /** One sentence; null while nothing is wrong. */
  problem: Readonly<Ref<string | null>>
  /** By the field's path. */
  wrong: Readonly<Ref<Readonly<Record<string, string>>>>
  /** Tries it, unless a try is under way; true when it was done. */
  attempt: (work: () => Promise<unknown>) => Promise<boolean>
}

/** Sending a form: the work throws, this catches and says it once. */
export function useAttempt(): Attempt {
  const busy = ref(false)
  const problem = ref<string | null>(null)
  const wrong = ref<Readonly<Record<string, string>>>({})

  async function attempt(work: () => Promise<unknown>): Promise<boolean> {
    if (busy.value) return false
    busy.value = true
    problem.value = null
    wrong.value = {}
    try {
      await work()
      return true
    }
    catch (error) {
      wrong.value = fieldsOf(error)
      problem.value = explain(error)
      return false
    }
    finally {
      busy.value = false
    }
  }
  return { busy: readonly(busy), problem: readonly(problem), wrong: readonly(wrong), attempt }
}
