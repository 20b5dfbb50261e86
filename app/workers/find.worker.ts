import { z } from 'zod'
import { findPlace } from './find-place'
import { findCoat } from '#shared/optics/find-coat'
import { promise } from '#shared/optics/stack'
import { hasGlow } from '#shared/optics/glow'
import { zoneBench } from '#shared/picture/zone-bench'
import { type FindAnswer, FindAsk } from '#shared/scheme/find/find-messages'

/** Looks for coats away from the page. The newest question wins; a stop is heard between two slices of work. */

/** Work between two breaths, ms: a stop is heard so soon. */
const SLICE_MS = 12

// The content policy lets nothing be compiled here; without this zod would try, and be told off in the console.
z.config({ jitless: true })

const bench = zoneBench()
let wanted = 0

function post(answer: FindAnswer): void {
  self.postMessage(answer)
}

self.addEventListener('message', (event: MessageEvent<unknown>) => {
  const ask = FindAsk.parse(event.data)
  wanted = ask.ask === 'find' ? ask.request : 0
  if (ask.ask === 'find') void attempt(ask)
})

/** Lets messages that came meanwhile be heard. */
function breath(): Promise<void> {
  return new Promise(resolve => setTimeout(resolve))
}

type Question = Extract<FindAsk, { ask: 'find' }>

async function attempt(question: Question): Promise<void> {
  try {
    // A burst of questions is answered once.
    await breath()
    if (wanted === question.request) await search(question)
  }
  catch (error) {
    if (wanted === question.request) post({ answer: 'failed', request: question.request, reason: error instanceof Error ? error.message : String(error) })
  }
}

async function search(question: Question): Promise<void> {
  const { request, look, target, second, passesMost, dropsMost, partsMost, answers } = question
  const { hardlyReaches, ...place } = findPlace(question, bench)
  const known = new Map(look.materials.paints.map(paint => [paint.id, paint.optics]))
  const shelf = question.paints.flatMap(({ id, cup }) => {
    const optics = known.get(id)
    return optics ? [{ id, cup, optics }] : []
  })
  const steps = findCoat({ ...place, target, shelf, second, passesMost, dropsMost, partsMost, answers, wholePasses: true })
  let since = performance.now()
  for (let step = steps.next(); ; step = steps.next()) {
    if (step.done) {
      const ground = promise({ ground: place.ground, coats: [...place.below ?? [], ...place.above ?? []], finish: place.finish }).lab
      post({ answer: 'found', request, report: { ...step.value, ground, overGlow: hasGlow(place.below ?? []), hardlyReaches } })
      return
    }
    if (performance.now() - since < SLICE_MS) continue
    post({ answer: 'progress', request, done: step.value.done })
    await breath()
    if (wanted !== request) return
    since = performance.now()
  }
}
