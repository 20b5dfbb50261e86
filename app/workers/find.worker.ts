import { z } from 'zod'
import { findPlace } from './find-place'
import { findCoat, type FindCoatWish, type FoundCoat, type FoundCoats } from '#shared/optics/find-coat'
import { sureCoat } from '#shared/optics/find-spread'
import { promise } from '#shared/optics/stack'
import { hasGlow } from '#shared/optics/glow'
import { zoneBench } from '#shared/picture/zone-bench'
import { type FindAnswer, FindAsk, type FindReport } from '#shared/scheme/find/find-messages'

/** Looks for coats away from the page. The newest question wins; a stop is heard between two slices of work, and gets the nearest so far. */

/** Work between two breaths, ms: a stop is heard so soon. */
const SLICE_MS = 12
/** The nearest so far is told no more often than this, ms. */
const SO_FAR_MS = 1200

// The content policy lets nothing be compiled here; without this zod would try, and be told off in the console.
z.config({ jitless: true })

const bench = zoneBench()
let wanted = 0
let isStopped = false

function post(answer: FindAnswer): void {
  self.postMessage(answer)
}

self.addEventListener('message', (event: MessageEvent<unknown>) => {
  const ask = FindAsk.parse(event.data)
  isStopped = ask.ask === 'stop'
  if (ask.ask !== 'find') return
  wanted = ask.request
  void attempt(ask)
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
  const { hardlyReaches, numbers, ...place } = findPlace(question, bench)
  const known = new Map(look.materials.paints.map(paint => [paint.id, paint.optics]))
  const shelf = question.paints.flatMap(({ id, cup }) => {
    const optics = known.get(id)
    return optics ? [{ id, cup, optics }] : []
  })
  const wish: FindCoatWish = { ...place, target, shelf, second, passesMost, dropsMost, partsMost, answers, wholePasses: true }
  const ground = promise({ ground: place.ground, coats: [...place.below ?? [], ...place.above ?? []], finish: place.finish }).lab
  const overGlow = hasGlow(place.below ?? [])
  const sure = (coats: readonly FoundCoat[]) => coats.map(coat => sureCoat(wish, coat, numbers))
  const reportOf = ({ paints, mixes }: FoundCoats): FindReport => ({ paints: sure(paints), mixes: sure(mixes), ground, overGlow, hardlyReaches })

  const steps = findCoat(wish)
  let since = performance.now()
  let told = { at: since, found: -1 }
  for (let step = steps.next(); ; step = steps.next()) {
    if (step.done) return post({ answer: 'found', request, report: reportOf(step.value) })
    if (performance.now() - since < SLICE_MS) continue
    const { done, found, soFar } = step.value
    post({ answer: 'progress', request, done })
    await breath()
    if (wanted !== request) return
    if (isStopped || (performance.now() - told.at > SO_FAR_MS && found !== told.found)) {
      post({ answer: 'so far', request, report: reportOf(soFar()) })
      told = { at: performance.now(), found }
    }
    if (isStopped) return
    since = performance.now()
  }
}
