import type { Ref } from 'vue'
import type { Key } from '~/composables/keys/key-list'
import { answer } from '~/composables/keys/use-keys'
import { turnedTo, UNTURNED, type TurnAngles } from '#shared/picture/turn/turn-angles'

/** Degrees for a drag over the whole width, and for one press of an arrow key or a button. */
const DRAG = 220
const STEP = { key: 5, page: 15 }

/** Ways to turn a blank by hand: drags and arrow keys push its near side; presses go by larger steps. */
export interface TurnHand {
  hold: (event: PointerEvent) => void
  drag: (event: PointerEvent) => void
  let: (event: PointerEvent) => void
  /** What each key does, for the list of keys and for `key`. */
  keys: readonly Key[]
  key: (event: KeyboardEvent) => void
  step: (turn: number, tip: number) => void
  home: () => void
}

/** Turns `angles` by pointer, keys and presses. */
export function useTurnHand(angles: Ref<TurnAngles>): TurnHand {
  let held: { pointer: number, x: number, y: number } | undefined

  function push(turn: number, tip: number): void {
    angles.value = turnedTo({ turn: angles.value.turn + turn, tip: angles.value.tip + tip })
  }

  function home(): void {
    angles.value = { ...UNTURNED }
  }

  const by = (turn: number, tip: number) => () => push(turn, tip)
  const keys: readonly Key[] = [
    { press: ['ArrowLeft'], words: 'Turn to the left', run: by(-STEP.key, 0) },
    { press: ['ArrowRight'], words: 'Turn to the right', run: by(STEP.key, 0) },
    { press: ['ArrowUp'], words: 'Roll the near side up', run: by(0, -STEP.key) },
    { press: ['ArrowDown'], words: 'Roll the near side down', run: by(0, STEP.key) },
    { press: ['PageUp'], words: 'Roll far up', run: by(0, -STEP.page) },
    { press: ['PageDown'], words: 'Roll far down', run: by(0, STEP.page) },
    { press: ['Home'], words: 'Back to the left flank', run: home },
  ]

  return {
    hold(event) {
      if (event.button !== 0 || held) return
      if (event.currentTarget instanceof Element) event.currentTarget.setPointerCapture(event.pointerId)
      held = { pointer: event.pointerId, x: event.clientX, y: event.clientY }
    },
    drag(event) {
      if (held?.pointer !== event.pointerId || !(event.currentTarget instanceof Element)) return
      const each = DRAG / Math.max(1, event.currentTarget.clientWidth)
      push((event.clientX - held.x) * each, (event.clientY - held.y) * each)
      held = { pointer: event.pointerId, x: event.clientX, y: event.clientY }
    },
    let(event) {
      if (held?.pointer === event.pointerId) held = undefined
    },
    keys,
    key: event => answer(keys, event, []),
    step: (turn, tip) => push(turn * STEP.page, tip * STEP.page),
    home,
  }
}
