import { reactive, ref, type Ref } from 'vue'
import type { Follow } from './use-follow'
import type { LeavingEarly } from '~/bench/going-on'
import { passesOn } from '#shared/bench/run-state'
import { countWords } from '#shared/scheme/coat-words'

/** A second press that comes faster than this was a bounce of the same knuckle, ms. */
const BOUNCE_MS = 500

/** What is pressed at the bench, and the questions that are open. */
export interface FollowActs {
  /** The question before a step is left early. */
  leaving: { open: boolean, asked: LeavingEarly | null, split: () => void, all: () => void, shut: () => void }
  /** The next piece pressed is to be set aside. */
  setting: Ref<boolean>
  differing: Ref<boolean>
  /** The piece to be set aside or taken up; null while nothing is asked. */
  asidePiece: Ref<number | null>
  /** The piece being inspected; null while none is. */
  seenPiece: Ref<number | null>
  /** Next was pressed just now. */
  isMoving: Ref<boolean>
  next: () => void
  press: (piece: number) => void
  /** One pass on each of these, or each of these passes inspection. */
  all: (pieces: number[]) => void
}

/** Turns presses into acts; `speak` says what a press without an act means. */
export function useFollowActs(follow: Follow, speak: (words: string) => void): FollowActs {
  const { acts, part, step, state, isFinished, ready } = follow
  const setting = ref(false)
  const differing = ref(false)
  const asidePiece = ref<number | null>(null)
  const seenPiece = ref<number | null>(null)
  const isMoving = ref(false)
  const leaving = reactive<FollowActs['leaving']>({
    open: false,
    asked: null,
    split: () => void go(ready.value.ready),
    all: () => void go(),
    shut() {
      leaving.open = false
    },
  })

  async function go(pieces?: readonly number[]) {
    leaving.open = false
    setting.value = false
    isMoving.value = true
    window.setTimeout(() => {
      isMoving.value = false
    }, BOUNCE_MS)
    if (await follow.goOn(pieces)) window.scrollTo({ top: 0 })
  }

  function next() {
    if (isMoving.value || isFinished.value) return
    if (!part.value) return void acts.do({ v: 1, kind: 'run-finished' })
    leaving.asked = follow.asked()
    if (leaving.asked) leaving.open = true
    else void go()
  }

  function press(piece: number) {
    if (setting.value || state.value.aside.has(piece)) {
      asidePiece.value = piece
      setting.value = false
      return
    }
    const now = step.value
    if (now?.kind === 'inspect') seenPiece.value = piece
    if (now?.kind !== 'lay') return
    const laid = passesOn(now.coat.id, piece, state.value)
    if (laid < now.coat.passes) void acts.do({ v: 1, kind: 'pass-laid', coatId: now.coat.id, pieces: [piece], passes: 1 })
    else speak(`Piece ${piece} has ${countWords(laid, 'pass', 'passes')}. One more is noted under Done differently.`)
  }

  function all(pieces: number[]) {
    const now = step.value
    if (now?.kind === 'lay') void acts.do({ v: 1, kind: 'pass-laid', coatId: now.coat.id, pieces, passes: 1 })
    if (now?.kind === 'inspect') void acts.do({ v: 1, kind: 'inspected', pieces, passed: true, note: '' })
  }

  return { leaving, setting, differing, asidePiece, seenPiece, isMoving, next, press, all }
}
