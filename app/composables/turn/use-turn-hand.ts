import type { Ref } from 'vue'
import { turnedTo, UNTURNED, type TurnAngles } from '#shared/picture/turn/turn-angles'

/** Degrees for a drag over the whole width, and for one press of an arrow key or a button. */
const DRAG = 220
const STEP = { key: 5, page: 15 }

/** Ways to turn a blank by hand: drags and arrow keys push its near side; presses go by larger steps. */
export interface TurnHand {
  hold: (event: PointerEvent) => void
  drag: (event: PointerEvent) => void
  let: (event: PointerEvent) => void
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

  const KEYS: Readonly<Record<string, readonly [number, number]>> = {
    ArrowRight: [STEP.key, 0], ArrowLeft: [-STEP.key, 0], ArrowDown: [0, STEP.key], ArrowUp: [0, -STEP.key], PageDown: [STEP.page, 0], PageUp: [-STEP.page, 0],
  }

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
    key(event) {
      const by = KEYS[event.key]
      if (!by && event.key !== 'Home') return
      event.preventDefault()
      if (by) push(...by)
      else angles.value = { ...UNTURNED }
    },
    step: (turn, tip) => push(turn * STEP.page, tip * STEP.page),
    home() {
      angles.value = { ...UNTURNED }
    },
  }
}
