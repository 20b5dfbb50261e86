import { computed, type ComputedRef, ref, type Ref } from 'vue'
import { useBenchClock } from './use-bench-clock'
import { type RunActs, useRunActs } from './use-run-acts'
import type { RunHere } from './use-run-here'
import { goingOn, leavingEarly, type LeavingEarly, type Readiness, readiness } from '~/bench/going-on'
import type { RunAct, RunEvent } from '#shared/bench/run-event'
import { type Part, partsOf } from '#shared/bench/run-parts'
import { onceFor, workNow } from '#shared/bench/work-now'
import { newActs } from '~/bench/new-acts'
import type { RunStep } from '#shared/bench/run-step'
import { runPlan } from '#shared/bench/run-plan'
import { type RunPlan, runState, type RunState } from '#shared/bench/run-state'
import { type CupNow, cupNow, type RunTimer, runTimers } from '#shared/bench/run-timers'
import type { Look } from '#shared/picture/look'

const SOME_TIME_MS = 5_000

/** A run as it is followed at the bench. */
export interface Follow {
  acts: RunActs
  plan: RunPlan
  look: Look
  state: ComputedRef<RunState>
  /** The time at the bench, ms. */
  now: Readonly<Ref<number>>
  parts: ComputedRef<Part[]>
  /** The part that is looked at; undefined when every piece is through or set aside. */
  part: ComputedRef<Part | undefined>
  step: ComputedRef<RunStep | undefined>
  /** What there is to do once these pieces go on; undefined when that was the last. */
  after: ComputedRef<RunStep | undefined>
  ready: ComputedRef<Readiness>
  timers: ComputedRef<RunTimer[]>
  cup: ComputedRef<CupNow | undefined>
  isFinished: ComputedRef<boolean>
  /** Looks at another part of the batch. */
  show: (part: Part) => void
  /** What is asked before leaving this step; null when every piece is ready. */
  asked: () => LeavingEarly | null
  /** These pieces go on, or all of the part. False when that could not be kept. */
  goOn: (pieces?: readonly number[]) => Promise<boolean>
  /** Does an act, then looks at what there is to do. */
  doAndLook: (act: RunAct) => Promise<void>
  /** Takes one act back, whoever did it. */
  takeBack: (act: RunEvent) => Promise<void>
}

/** Follows a run: where it stands, what there is to do now, and the acts that do it. Called in the set-up of its page, in a browser. */
export function useFollow(here: RunHere): Follow {
  const { run } = here
  const look: Look = { body: run.body, materials: run.materials }
  const plan: RunPlan = runPlan(run)
  const acts = useRunActs(here)
  const { now, read } = useBenchClock()
  /** The clock in large steps, for what is worth working out anew only now and then. */
  const someTime = computed(() => now.value - now.value % SOME_TIME_MS)

  const state = computed(() => runState(acts.events.value))
  const toDo = () => workNow(plan, state.value, now.value)
  const anchorOf = (part: Part | undefined) => ({ piece: part?.pieces[0], aheadId: part?.isAhead ? part.step?.id : undefined })
  /**
   * A piece of the part that is looked at, or what is done ahead for all: the part goes where it goes, so that nothing jumps
   * when others act.
   */
  const anchor = ref(anchorOf(toDo()))
  const ahead = computed(() => anchor.value.aheadId === undefined ? undefined : onceFor(plan, state.value, anchor.value.aheadId))
  const standing = computed(() => partsOf(plan, state.value))
  const part = computed(() => {
    if (ahead.value) return ahead.value
    const held = standing.value.find(each => each.step !== undefined && each.pieces.includes(anchor.value.piece ?? 0))
    return held ?? toDo()
  })
  /** What could be done now besides what is looked at, so that one comes back to it. */
  const parts = computed(() => {
    const open = ahead.value ?? workNow(plan, state.value, someTime.value)
    return open?.isAhead ? [...standing.value, open] : standing.value
  })
  const step = computed(() => part.value?.step)
  const ready = computed(() => part.value ? readiness(part.value, state.value, now.value) : { ready: [], open: [] })

  function lookAround() {
    read()
    anchor.value = anchorOf(toDo())
  }

  /** What comes after: the same question, asked of the run as it stands once they have gone on. */
  const after = computed(() => {
    if (!part.value) return undefined
    const going = goingOn(plan, state.value, part.value, part.value.pieces, someTime.value)
    const then = runState([...acts.events.value, ...newActs(going, acts.events.value, someTime.value)])
    return workNow(plan, then, someTime.value)?.step
  })

  return {
    acts, plan, look, state, now, parts, part, step, ready, after,
    timers: computed(() => runTimers(plan, state.value)),
    cup: computed(() => cupNow(plan, state.value)),
    isFinished: computed(() => state.value.finishedAt !== null),
    show(other) {
      anchor.value = anchorOf(other)
    },
    asked: () => part.value ? leavingEarly(part.value, ready.value, state.value, now.value) : null,
    async goOn(pieces) {
      if (!part.value) return false
      const isKept = await acts.do(...goingOn(plan, state.value, part.value, pieces ?? part.value.pieces, now.value))
      if (isKept) lookAround()
      return isKept
    },
    async doAndLook(act) {
      if (await acts.do(act)) lookAround()
    },
    async takeBack({ id }) {
      if (await acts.do({ v: 1, kind: 'taken-back', eventId: id })) lookAround()
    },
  }
}
