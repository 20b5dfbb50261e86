import { computed, type ComputedRef, onScopeDispose, type Ref, ref, shallowRef, type ShallowRef } from 'vue'
import { type FindThread, startFindThread } from './find-thread'
import type { FindAnswer, FindQuestion, FindReport } from '#shared/scheme/find/find-messages'

/** How a search stands. */
export type FindState = 'nothing asked' | 'searching' | 'found' | 'stopped' | 'failed'

/** A search on the page. */
export interface UseFindCoat {
  state: Ref<FindState>
  /** How far it has come, per cent. */
  percent: ComputedRef<number>
  /** The newest report; while a newer question is looked into, the one before. */
  report: ShallowRef<FindReport | null>
  /** The report is the nearest so far of a search that goes on or was stopped. */
  isSoFar: Ref<boolean>
  /** Why it failed, as a sentence. */
  failed: Ref<string | null>
  /** Asks; a question that was under way is dropped. */
  ask: (question: FindQuestion) => void
  stop: () => void
}

/** Looks for coats away from the page. The newest question wins. Only in a browser. */
export function useFindCoat(start: (hear: (answer: FindAnswer) => void) => FindThread = startFindThread): UseFindCoat {
  const state = ref<FindState>('nothing asked')
  const done = ref(0)
  const report = shallowRef<FindReport | null>(null)
  const isSoFar = ref(false)
  const failed = ref<string | null>(null)
  let thread: FindThread | undefined
  let latest = 0

  function hear(answer: FindAnswer): void {
    if (answer.answer === 'failed' && answer.request === Infinity) thread = undefined
    else if (answer.request !== latest || (state.value !== 'searching' && !(state.value === 'stopped' && answer.answer === 'so far'))) return
    switch (answer.answer) {
      case 'progress':
        done.value = answer.done
        return
      case 'so far':
        report.value = answer.report
        isSoFar.value = true
        return
      case 'found':
        isSoFar.value = false
        report.value = answer.report
        state.value = 'found'
        return
      case 'failed':
        failed.value = `The search could not be done: ${answer.reason.replace(/\.$/, '')}. The scheme is as it was.`
        state.value = 'failed'
    }
  }

  onScopeDispose(() => thread?.end())

  return {
    state, report, isSoFar, failed,
    percent: computed(() => Math.round(100 * done.value)),
    ask(question) {
      thread ??= start(hear)
      done.value = 0
      failed.value = null
      isSoFar.value = false
      state.value = 'searching'
      thread.ask({ ask: 'find', request: ++latest, ...question })
    },
    stop() {
      if (state.value !== 'searching') return
      thread?.ask({ ask: 'stop' })
      state.value = 'stopped'
    },
  }
}
