import { canonicalJson } from '#shared/scheme/canonical'
import { turnBench } from '#shared/picture/turn/turn-bench'
import { turnTransfer, type TurnAnswer, type TurnAsk, type TurnStage } from '#shared/picture/turn/turn-messages'

/** Lays looks on sheets for the turning view, away from the page: coarse first, then fine. A newer request takes over at the next breath. */

/** The coarse sheets are this much coarser in each direction. */
const COARSER = 3
/** Work goes on for so long before messages that came meanwhile are heard, ms. */
const BREATH_MS = 30

const bench = turnBench()
/** What the page already holds. */
const sent = { form: '', sheets: '', light: '', paint: '' }
let wanted: TurnAsk | undefined
let isAtWork = false

function post(answer: TurnAnswer): void {
  self.postMessage(answer, { transfer: turnTransfer(answer) })
}

self.addEventListener('message', ({ data: ask }: MessageEvent<TurnAsk>) => {
  wanted = ask
  void workAll()
})

function breath(): Promise<void> {
  return new Promise(resolve => setTimeout(resolve))
}

async function workAll(): Promise<void> {
  if (isAtWork) return
  isAtWork = true
  while (wanted) {
    const ask = wanted
    wanted = undefined
    try {
      if (await lay(ask)) post({ answer: 'done', request: ask.request })
    }
    catch (error) {
      post({ answer: 'failed', request: ask.request, reason: error instanceof Error ? error.message : String(error) })
    }
    await breath()
  }
  isAtWork = false
}

/** Sends all that a request asks for. @returns false when something newer is wanted */
async function lay(ask: TurnAsk): Promise<boolean> {
  const { look, request, scale } = ask
  const blankKey = bench.blankKey(look)
  if (sent.form !== blankKey) {
    post({ answer: 'form', request, form: bench.form(look) })
    Object.assign(sent, { form: blankKey, sheets: '', paint: '' })
  }
  const paintKey = canonicalJson([blankKey, scale, look.body, look.materials, ask.upTo, ask.clear, ask.seen])
  if (sent.paint === paintKey) {
    sendLight(ask, lastSigmas)
    return true
  }
  // Finer form sheets stay when only the paint has changed.
  const fineKey = `${blankKey} ${scale}`
  for (const stage of ['coarse', 'fine'] as const) {
    if (stage === 'coarse' ? sent.sheets === '' : sent.sheets !== fineKey) {
      post({ answer: 'sheets', request, ...bench.sheets(look, scaleOf(scale, stage)) })
      sent.sheets = stage === 'fine' ? fineKey : 'coarse'
      await breath()
      if (wanted) return false
    }
    if (!await layStage(ask, stage)) return false
  }
  sent.paint = paintKey
  return true
}

const scaleOf = (scale: number, stage: TurnStage) => stage === 'fine' ? scale : scale / COARSER
let lastSigmas: readonly number[] = []

/** Lays one stage. @returns false when something newer is wanted */
async function layStage(ask: TurnAsk, stage: TurnStage): Promise<boolean> {
  const steps = bench.paint(ask.look, ask, scaleOf(ask.scale, stage))
  sent.paint = ''
  for (let since = performance.now(), step = steps.next(); ; step = steps.next()) {
    if (step.done) {
      lastSigmas = step.value.sigmas
      sendLight(ask, lastSigmas)
      post({ answer: 'paint', request: ask.request, stage, paint: step.value })
      return true
    }
    if (performance.now() - since < BREATH_MS) continue
    await breath()
    if (wanted) return false
    since = performance.now()
  }
}

function sendLight({ request, light, seen }: TurnAsk, sigmas: readonly number[]): void {
  const key = canonicalJson([light, sigmas, seen.water !== undefined])
  if (sent.light === key) return
  sent.light = key
  post({ answer: 'light', request, light: bench.light(light, sigmas, seen) })
}
