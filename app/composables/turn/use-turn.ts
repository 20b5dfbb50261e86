import { onScopeDispose, ref, toValue, watch, type MaybeRefOrGetter, type Ref } from 'vue'
import { turnThread, type TurnThread } from './turn-thread'
import type { TurnFrame, TurnScene } from './turn-scene'
import type { TurnAnswer, TurnAsk, TurnStage } from '#shared/picture/turn/turn-messages'

/** A go that takes longer than this is too slow to follow a hand; a hand that rests for so long is at rest. ms */
const SLOW_MS = 60, STILL_MS = 160

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
  /** Every go of the newest picture has been drawn: it is as fine as it gets. */
  settled: Ref<boolean>
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
  const settled = ref(false)
  const trouble = ref<TurnTrouble | null>(null)
  const ends = new AbortController()
  let scene: TurnScene | undefined
  let thread: TurnThread | undefined
  let goesMost = 1
  let latest = 0
  let go = 0
  let waiting = 0
  let painted: Promise<boolean> | undefined
  /** When the newest picture was begun, which one was drawn hastily, when a whole go was begun and how long the last one took; ms. */
  const pace = { begun: 0, hasty: -1, drawing: 0, took: 0 }

  const nextFrame = () => new Promise<void>((resolve) => {
    requestAnimationFrame(() => resolve())
  })

  /** Begins a new picture at the next frame of the page. */
  function begin(): void {
    go = 0
    settled.value = false
    pace.begun = performance.now()
    if (!waiting) waiting = requestAnimationFrame(drawOne)
  }

  function drawOne(now: number): void {
    waiting = 0
    const wanted = toValue(frame)
    if (!scene?.isReady() || !wanted || trouble.value) return
    waiting = requestAnimationFrame(drawOne)
    if (!scene.isDrawn()) return
    if (pace.drawing > 0) pace.took = now - pace.drawing
    pace.drawing = 0
    const isStill = now - pace.begun > STILL_MS
    const isHasty = !isStill && pace.took > SLOW_MS
    // A slow machine waits with what is fine until the hand rests.
    if (isHasty && (go > 0 || pace.hasty === pace.begun)) return
    scene.draw(wanted, go, isHasty)
    if (isHasty) pace.hasty = pace.begun
    else {
      pace.drawing = now
      go += 1
    }
    if (go < goesMost) return
    cancelAnimationFrame(waiting)
    waiting = 0
    pace.drawing = 0
    settled.value = true
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
    await scene.prepared
    if (ends.signal.aborted) return
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

  return { stage, busy, settled, trouble }
}
