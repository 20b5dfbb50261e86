import { onScopeDispose, ref, toValue, watch, type MaybeRefOrGetter, type Ref } from 'vue'
import { turnThread, type TurnThread } from './turn-thread'
import type { TurnFrame, TurnScene } from './turn-scene'
import type { TurnAnswer, TurnAsk, TurnStage } from '#shared/picture/turn/turn-messages'

/** What is asked of the turning view; it counts its requests itself. */
export type TurnWish = Omit<TurnAsk, 'request'>

/** Why nothing can be turned now: no way to draw it, the graphics processor was taken away, or the thread failed. */
export type TurnTrouble = 'cannot' | 'lost' | 'failed'

/** A blank that is turned on a canvas. */
export interface UseTurn {
  /** How fine what is shown is; `none` until there is something to see. */
  stage: Ref<TurnStage | 'none'>
  /** Something newer than what is shown is being laid out. */
  busy: Ref<boolean>
  trouble: Ref<TurnTrouble | null>
}

/**
 * Draws a look on a canvas as it is turned: only when something has changed, then finer while nothing does. What it needs of three.js is
 * fetched when the canvas first appears. Only in a browser.
 */
export function useTurn(
  canvas: Ref<HTMLCanvasElement | null>, wish: MaybeRefOrGetter<TurnWish | null>, frame: MaybeRefOrGetter<TurnFrame | null>,
): UseTurn {
  const stage = ref<TurnStage | 'none'>('none')
  const busy = ref(true)
  const trouble = ref<TurnTrouble | null>(null)
  const ends = new AbortController()
  let scene: TurnScene | undefined
  let thread: TurnThread | undefined
  let goesMost = 1
  let latest = 0
  let go = 0
  let waiting = 0
  let painted: Promise<boolean> | undefined

  const nextFrame = () => new Promise<void>((resolve) => {
    requestAnimationFrame(() => resolve())
  })

  /** Begins a new picture at the next frame of the page. */
  function begin(): void {
    go = 0
    if (!waiting) waiting = requestAnimationFrame(drawOne)
  }

  function drawOne(): void {
    waiting = 0
    const wanted = toValue(frame)
    if (!scene?.isReady() || !wanted || trouble.value) return
    scene.draw(wanted, go)
    go += 1
    if (go < goesMost) waiting = requestAnimationFrame(drawOne)
  }

  async function hear(answer: TurnAnswer): Promise<void> {
    if (!scene) return
    switch (answer.answer) {
      case 'failed':
        trouble.value = 'failed'
        busy.value = false
        return
      case 'done':
        await painted
        if (answer.request === latest) busy.value = false
        return
      case 'form':
        scene.setForm(answer.form)
        stage.value = 'none'
        return
      case 'sheets':
        scene.setFormSheets(answer.body, answer.fins)
        break
      case 'light':
        scene.setLight(answer.light)
        break
      case 'paint':
        painted = scene.setPaint(answer.paint)
        if (!await painted) return
        trouble.value = trouble.value === 'failed' ? null : trouble.value
        stage.value = answer.stage
    }
    begin()
  }

  async function open(target: HTMLCanvasElement): Promise<void> {
    const drawing = await import('./turn-scene')
    if (ends.signal.aborted) return
    goesMost = drawing.GOES_MOST
    scene = drawing.turnScene(target, nextFrame)
    if (!scene) {
      trouble.value = 'cannot'
      return
    }
    const { signal } = ends
    target.addEventListener('webglcontextlost', () => {
      trouble.value = 'lost'
    }, { signal })
    target.addEventListener('webglcontextrestored', () => {
      trouble.value = null
      begin()
    }, { signal })
    thread = turnThread(answer => void hear(answer))
    ask()
  }

  function ask(): void {
    const wanted = toValue(wish)
    if (!thread || !wanted) return
    busy.value = true
    thread.ask({ ...wanted, request: ++latest })
  }

  watch(canvas, (target) => {
    if (target && !scene && !ends.signal.aborted) open(target).catch(() => trouble.value = 'cannot')
  }, { immediate: true })
  watch(() => toValue(wish), ask, { deep: true })
  watch(() => toValue(frame), begin, { deep: true })

  onScopeDispose(() => {
    ends.abort()
    cancelAnimationFrame(waiting)
    thread?.end()
    scene?.dispose()
    scene = undefined
  })

  return { stage, busy, trouble }
}
