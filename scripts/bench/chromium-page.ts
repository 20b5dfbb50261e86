import { createApp, defineComponent, h, nextTick, shallowRef, watch } from 'vue'
import { usePicture } from '../../app/composables/picture/use-picture'
import type { Look } from '#shared/picture/look'
import type { Coat } from '#shared/scheme/coat'

/** Times of one edit, ms: the page's own work for it, its first picture on the canvas, and its whole one. */
export interface EditTimes { page: number, first: number, whole: number }

/** What the page measures for one finish. */
export interface PageFigures {
  finish: string
  edits: EditTimes[]
  /** A coat dragged along the body, a change each frame: tasks over 50 ms, the longest task, pictures that came meanwhile. */
  drag: { long: number, longest: number, pictures: number, changes: number }
}

const WIDTH = 640, HEIGHT = 320, DRAG_MS = 3000
/** Longest an edit is waited for. */
const PATIENCE_MS = 20_000

const frame = () => new Promise<void>(resolve => requestAnimationFrame(() => resolve()))
const pause = (ms: number) => new Promise<void>(resolve => setTimeout(resolve, ms))

/** Edits one coat of a look and leaves the others as they are, as an edit on the work surface does. */
function withCoat(look: Look, id: string, change: (coat: Coat) => Coat): Look {
  return { ...look, body: { ...look.body, stack: look.body.stack.map(item => item.act === 'coat' && item.coat.id === id ? { ...item, coat: change(item.coat) } : item) } }
}

async function measure({ finish, look: given }: { finish: string, look: Look }): Promise<PageFigures> {
  const look = shallowRef(given)
  const canvas = document.createElement('canvas')
  canvas.width = WIDTH
  canvas.height = HEIGHT
  document.body.append(canvas)
  const pen = canvas.getContext('2d')!
  let drawn = 0, drawCost = 0
  let heard: (stage: string) => void = () => undefined
  const app = createApp(defineComponent({
    setup() {
      const { picture, stage } = usePicture(look, { width: WIDTH, height: HEIGHT })
      // As the canvas of a picture on a page is drawn.
      watch(picture, (painted) => {
        if (!painted) return
        const since = performance.now()
        pen.globalCompositeOperation = 'copy'
        pen.drawImage(painted.bitmap, 0, 0, WIDTH, HEIGHT)
        drawCost += performance.now() - since
        drawn++
        heard(stage.value)
      })
      return () => h('i')
    },
  }))
  const refined = () => new Promise<void>((resolve, reject) => {
    const late = setTimeout(() => reject(new Error('no picture came')), PATIENCE_MS)
    heard = (stage) => {
      if (stage !== 'refined') return
      clearTimeout(late)
      resolve()
    }
  })
  const started = refined()
  app.mount(document.body.appendChild(document.createElement('div')))
  await started

  const edits: EditTimes[] = []
  const ids = look.value.body.stack.flatMap(item => item.act === 'coat' ? [item.coat.id] : [])
  // The first round is for getting ready: deposits of a place are worked out once, and programs are compiled as they warm up.
  for (let round = 0; round < 4; round++) {
    for (const [c, id] of ids.entries()) {
      let first = 0, whole = 0
      const since = performance.now()
      drawCost = 0
      const done = new Promise<void>((resolve, reject) => {
        const late = setTimeout(() => reject(new Error('no picture came')), PATIENCE_MS)
        heard = (stage) => {
          first ||= performance.now() - since
          if (stage !== 'coarse') whole ||= performance.now() - since
          if (stage !== 'refined') return
          clearTimeout(late)
          resolve()
        }
      })
      look.value = withCoat(look.value, id, coat => (round + c) % 2 ? { ...coat, passes: 0.8 + 0.1 * round } : { ...coat, where: { ...coat.where, reach: 0.4 * round } })
      await nextTick()
      const sent = performance.now() - since
      await done
      if (round > 0) edits.push({ page: sent + drawCost, first, whole })
    }
  }

  const tasks: number[] = []
  const observer = new PerformanceObserver(list => tasks.push(...list.getEntries().map(entry => entry.duration)))
  observer.observe({ type: 'longtask' })
  const before = drawn
  let changes = 0
  heard = () => undefined
  performance.mark('drag')
  for (const since = performance.now(); performance.now() - since < DRAG_MS; await frame()) {
    const share = (performance.now() - since) / DRAG_MS
    look.value = withCoat(look.value, ids[Math.min(5, ids.length - 1)]!, coat => ({ ...coat, where: { ...coat.where, reach: 3 * share } }))
    changes++
  }
  await pause(200)
  observer.disconnect()
  app.unmount()
  return {
    finish, edits,
    drag: { long: tasks.length, longest: Math.max(0, ...tasks), pictures: drawn - before, changes },
  }
}

declare global {
  interface Window { measure: typeof measure }
}
window.measure = measure
