import { chosenEngine } from './chosen-engine'
import { letDown } from '#shared/picture/let-down'
import type { Look } from '#shared/picture/look'
import { pictureBench } from '#shared/picture/picture-bench'
import type { PictureAnswer, PictureAsk, PictureQuestion } from '#shared/picture/picture-messages'
import { zoneBench } from '#shared/picture/zone-bench'
import { zoneColours, zoneSpreads } from '#shared/picture/zone-colours'
import type { SchemeBody } from '#shared/scheme/body'
import type { Materials } from '#shared/scheme/materials'

/** Paints the pictures of a page and works out its promised colours, away from the page. The latest request of a name wins. */

/** A whole picture that takes no longer than this needs no coarse one before it, ms: going back to coarse would flicker. */
const AT_ONCE_MS = 40

/** What is wanted; of zones whose colours were told already, how sure they are. */
type Work = Exclude<PictureQuestion, { ask: 'forget' }> & { isTold?: boolean }

const { engine, tryGraphics } = chosenEngine()
const bench = pictureBench('edits', engine)
const measured = zoneBench()
const known = new Map<number, Materials>()
/** One request per name. */
const wanted = new Map<string, Work>()
let isAtWork = false
/** How long the last whole picture took, ms. */
let lastWhole = Infinity

function post(answer: PictureAnswer, transfer: Transferable[] = []): void {
  self.postMessage(answer, { transfer })
}

self.addEventListener('message', ({ data: ask }: MessageEvent<PictureAsk>) => {
  switch (ask.ask) {
    case 'know': return void known.set(ask.materials, ask.given)
    case 'unlearn': return void known.delete(ask.materials)
    case 'forget': return void wanted.delete(ask.picture)
    default:
      wanted.delete(ask.picture)
      wanted.set(ask.picture, { ...ask, look: lookOf(ask.look) })
      void workAll()
  }
})

/** A look with the materials it is made with, as they were told. */
function lookOf({ body, materials }: { body: SchemeBody, materials: number }): Look {
  const given = known.get(materials)
  if (!given) throw new RangeError(`materials ${materials} were never told`)
  return { body, materials: given }
}

/** Lets messages that came meanwhile be heard. */
function breath(): Promise<void> {
  return new Promise(resolve => setTimeout(resolve))
}

/** What somebody points at first, then the picture that was asked for last, then what is said about it, then how sure that is. */
function next(): Work | undefined {
  const all = [...wanted.values()]
  return all.find(({ ask }) => ask === 'pick') ?? all.findLast(({ ask }) => ask === 'paint') ?? all.find(({ isTold }) => !isTold) ?? all.at(0)
}

/** What is said about a look, and can be between the stages of its picture. */
function aside(): Work | undefined {
  return [...wanted.values()].find(({ ask, isTold }) => ask !== 'paint' && !isTold)
}

async function workAll(): Promise<void> {
  if (isAtWork) return
  isAtWork = true
  for (let work = next(); work; work = next()) {
    await attempt(work)
    await breath()
    if (wanted.size === 0 && lastWhole < Infinity) tryGraphics()
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
    case 'zones':
      if (work.isTold) return tellSpreads(work)
      post({ answer: 'zones', picture, request, zones: zoneColours(look, work.wish, measured) })
      if (work.sure && !wanted.has(picture)) wanted.set(picture, { ...work, isTold: true })
      return
    case 'let-down': return post({ answer: 'let-down', picture, request, letDown: letDown(look, work.letDown, measured) })
  }
}

/** How sure the promises are takes longer than the promises: whoever comes meanwhile goes first, and the rest waits its turn. */
async function tellSpreads(work: Extract<Work, { ask: 'zones' }>): Promise<void> {
  const { picture, request, look, wish } = work
  const zones = zoneSpreads(look, wish, measured)
  for (let step = zones.next(); ; step = zones.next()) {
    if (step.done) return post({ answer: 'spreads', picture, request, spreads: step.value })
    wanted.set(picture, work)
    await breath()
    // A newer question took its place, the page forgot it, or something else waits.
    if (wanted.get(picture) !== work || wanted.size > 1) return
    wanted.delete(picture)
  }
}

/** Between the stages of a picture, whoever asks something else is answered and a newer request takes over. */
async function paint({ picture, request, look, options }: Extract<Work, { ask: 'paint' }>): Promise<void> {
  const since = performance.now()
  let asides = 0
  for (const { stage, picture: painted } of bench.stages(look, options, lastWhole < AT_ONCE_MS ? 'full' : 'coarse')) {
    if (stage === 'full') lastWhole = performance.now() - since - asides
    const { rgba, ...rest } = painted
    const bitmap = await createImageBitmap(new ImageData(rgba, painted.width, painted.height))
    post({ answer: 'painted', picture, request, stage, painted: { ...rest, bitmap }, engine: engine.name }, [bitmap])
    await breath()
    // The whole picture comes before what is said about it, unless the next edit is there already.
    const isEdited = wanted.has(picture)
    const talk = stage === 'coarse' && !isEdited ? undefined : aside()
    const before = performance.now()
    if (talk) await attempt(talk)
    asides += performance.now() - before
    if (isEdited || wanted.has(picture)) return
  }
}
