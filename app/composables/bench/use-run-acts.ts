import { computed, type ComputedRef, onBeforeUnmount, onMounted, ref, type Ref, shallowRef } from 'vue'
import { useEventListener, useIntervalFn } from '@vueuse/core'
import { type ActKeeper, createActKeeper, type HandOver } from '~/bench/act-keeper'
import { actShelf } from '~/bench/kept-acts'
import { newId } from '~/bench/new-id'
import { useSession } from '~/composables/people/use-session'
import { explain } from '~/errors/explain'
import { problemOf } from '~/errors/problem-of'
import type { RunAct, RunEvent, RunEventAnswer } from '#shared/bench/run-event'
import { standingActs } from '#shared/bench/run-state'
import type { RunEventView, RunView } from '#shared/bench/run-view'

/** How often one asks what others did meanwhile, ms. */
const LISTEN_MS = 4_000

/** What was done in a run, here and elsewhere. */
export interface RunActs {
  /** The server's acts in the order of arrival, then those that are only here. */
  events: ComputedRef<readonly RunEvent[]>
  handOver: Readonly<Ref<HandOver>>
  /** Number of the scheme's newest revision, as far as is known. */
  headNumber: Readonly<Ref<number>>
  /** Does acts: they count at once and are handed over when they can be. */
  do: (...acts: RunAct[]) => void
  /** The last thing one did oneself that still stands; undefined when there is nothing to take back. */
  last: ComputedRef<RunEvent | undefined>
}

/** Keeps, hands over and listens for the acts of a run; `onRefused` hears why one could not be noted. Called in the set-up of the page that follows it. */
export function useRunActs(run: RunView, onRefused: (reason: string) => void): RunActs {
  const { session } = useSession()
  const personId = session.value?.person.id ?? 'nobody'
  const heard = shallowRef<readonly RunEventView[]>(run.events)
  const own = shallowRef<readonly RunEvent[]>([])
  const handOver = ref<HandOver>({ network: 'online', kept: 0, because: null })
  const headNumber = ref(run.headNumber)
  let keeper: ActKeeper | null = null

  const events = computed(() => {
    const known = new Set(heard.value.map(event => event.id))
    return [...heard.value, ...own.value.filter(event => !known.has(event.id))]
  })

  function onAnswers(answers: readonly RunEventAnswer[]): void {
    const refused = new Map(answers.flatMap(answer => answer.taken ? [] : [[answer.id, answer.reason] as const]))
    own.value = own.value.filter(event => !refused.has(event.id))
    refused.forEach(reason => onRefused(reason))
    void listen()
  }

  async function send(batch: readonly RunEvent[]): Promise<readonly RunEventAnswer[]> {
    const { answers } = await $fetch(`/api/runs/${run.id}/events`, { method: 'POST', body: { events: batch } })
    return answers
  }

  function reason(error: unknown): string | null {
    const problem = problemOf(error)
    return problem === null ? null : explain(error)
  }

  async function listen(): Promise<void> {
    if (document.visibilityState === 'hidden') return
    const since = heard.value.at(-1)?.seq ?? 0
    try {
      const more = await $fetch(`/api/runs/${run.id}/events`, { query: { since } })
      headNumber.value = more.headNumber
      // Another answer may have come first.
      const fresh = more.events.filter(event => event.seq > (heard.value.at(-1)?.seq ?? 0))
      if (fresh.length > 0) heard.value = [...heard.value, ...fresh]
      if (handOver.value.network === 'none') await keeper?.flush()
      if (handOver.value.kept === 0) handOver.value = { network: 'online', kept: 0, because: null }
    }
    catch (error) {
      if (problemOf(error) === null) handOver.value = { ...handOver.value, network: 'none' }
    }
  }

  onMounted(() => {
    const shelf = actShelf(window.localStorage, personId)
    const left = shelf.read(run.id)
    own.value = left
    keeper = createActKeeper(left, {
      send, reason, onAnswers,
      keep: event => shelf.write(run.id, event),
      forget: id => shelf.remove(run.id, id),
      onChange: (state) => {
        handOver.value = state
      },
      later: (ms, run) => {
        const timer = window.setTimeout(run, ms)
        return () => window.clearTimeout(timer)
      },
    })
    void keeper.flush()
    void listen()
  })
  onBeforeUnmount(() => keeper?.stop())
  if (import.meta.client) {
    useIntervalFn(listen, LISTEN_MS)
    useEventListener(window, 'online', () => void keeper?.flush().then(listen))
    useEventListener(window, 'offline', () => {
      handOver.value = { ...handOver.value, network: 'none' }
    })
    useEventListener(document, 'visibilitychange', () => void listen())
  }

  return {
    events,
    handOver,
    headNumber,
    do(...acts) {
      const doneAt = new Date().toISOString()
      const done = acts.map(act => ({ id: newId(), doneAt, act }))
      own.value = [...own.value, ...done]
      done.forEach(event => keeper?.add(event))
    },
    last: computed(() => {
      const mine = new Set([...heard.value.filter(event => event.by?.id === personId), ...own.value].map(event => event.id))
      return standingActs(events.value).findLast(event => mine.has(event.id))
    }),
  }
}
