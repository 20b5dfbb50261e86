import { z } from 'zod'
import { letDown } from '#shared/picture/let-down'
import { pictureBench } from '#shared/picture/picture-bench'
import { PictureAsk, type PictureAnswer } from '#shared/picture/picture-messages'
import { zoneBench } from '#shared/picture/zone-bench'
import { zoneColours } from '#shared/picture/zone-colours'

/** Paints the pictures of a page and works out its promised colours, away from the page. The latest request of a name wins. */

/** A whole picture that takes no longer than this needs no coarse one before it, ms: going back to coarse would flicker. */
const AT_ONCE_MS = 120

type Work = Exclude<PictureAsk, { ask: 'forget' }>

// The content policy lets nothing be compiled here; without this zod would try, and be told off in the console.
z.config({ jitless: true })

const bench = pictureBench()
const measured = zoneBench()
/** One request per name. */
const wanted = new Map<string, Work>()
let isAtWork = false
/** How long the last whole picture took, ms. */
let lastWhole = Infinity

function post(answer: PictureAnswer, transfer: Transferable[] = []): void {
  self.postMessage(answer, { transfer })
}

self.addEventListener('message', (event: MessageEvent<unknown>) => {
  const ask = PictureAsk.parse(event.data)
  wanted.delete(ask.picture)
  if (ask.ask === 'forget') return
  wanted.set(ask.picture, ask)
  void workAll()
})

/** Lets messages that came meanwhile be heard. */
function breath(): Promise<void> {
  return new Promise(resolve => setTimeout(resolve))
}

/** Quick answers first, then the picture that was asked for last. */
function next(): Work | undefined {
  const all = [...wanted.values()]
  return all.find(({ ask }) => ask !== 'paint') ?? all.at(-1)
}

async function workAll(): Promise<void> {
  if (isAtWork) return
  isAtWork = true
  for (let work = next(); work; work = next()) {
    await attempt(work)
    await breath()
  }
  isAtWork = false
}

async function attempt(work: Work): Promise<void> {
  wanted.delete(work.picture)
  try {
    await answer(work)
  }
  catch (error) {
    post({ answer: 'failed', picture: work.picture, request: work.request, reason: error instanceof Error ? error.message : String(error) })
  }
}

async function answer(work: Work): Promise<void> {
  const { picture, request, look } = work
  switch (work.ask) {
    case 'paint': return paint(work)
    case 'pick': return post({ answer: 'picked', picture, request, place: bench.pick(look, work.options, work.x, work.y) })
    case 'zones': return post({ answer: 'zones', picture, request, zones: zoneColours(look, work.wish, measured) })
    case 'let-down':
      return post({ answer: 'let-down', picture, request, steps: letDown(look, work.coatId, work.zone, work.passesMost, work.clear, measured) })
  }
}

/** Between the stages of a picture, whoever asks something else is answered and a newer request takes over. */
async function paint({ picture, request, look, options }: Extract<Work, { ask: 'paint' }>): Promise<void> {
  const since = performance.now()
  for (const { stage, picture: painted } of bench.stages(look, options, lastWhole < AT_ONCE_MS ? 'full' : 'coarse')) {
    if (stage === 'full') lastWhole = performance.now() - since
    post({ answer: 'painted', picture, request, stage, painted }, [painted.rgba.buffer])
    await breath()
    if (wanted.has(picture)) return
    for (let quick = next(); quick && quick.ask !== 'paint'; quick = next()) await attempt(quick)
  }
}
