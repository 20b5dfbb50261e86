import { pictureBench } from '#shared/picture/picture-bench'
import { PICTURE_STAGES, PictureAsk, type PictureAnswer } from '#shared/picture/picture-messages'

/** Paints the pictures of a page away from the page. The latest request for each picture wins. */

type PaintAsk = Extract<PictureAsk, { ask: 'paint' }>

const bench = pictureBench()
/** One request per picture; the last one asked for is painted first. */
const wanted = new Map<string, PaintAsk>()
let isPainting = false

function post(answer: PictureAnswer, transfer: Transferable[] = []): void {
  self.postMessage(answer, { transfer })
}

self.addEventListener('message', (event: MessageEvent<unknown>) => {
  const ask = PictureAsk.parse(event.data)
  switch (ask.ask) {
    case 'paint':
      wanted.delete(ask.picture)
      wanted.set(ask.picture, ask)
      void paintAll()
      return
    case 'pick':
      post({ answer: 'picked', picture: ask.picture, request: ask.request, place: bench.pick(ask.look, ask.options, ask.x, ask.y) })
      return
    case 'forget':
      wanted.delete(ask.picture)
  }
})

/** Lets messages that came meanwhile be heard. */
function breath(): Promise<void> {
  return new Promise(resolve => setTimeout(resolve))
}

async function paintAll(): Promise<void> {
  if (isPainting) return
  isPainting = true
  for (let job = last(); job; job = last()) {
    wanted.delete(job.picture)
    await paint(job)
  }
  isPainting = false
}

function last(): PaintAsk | undefined {
  return [...wanted.values()].at(-1)
}

async function paint({ picture, request, look, options }: PaintAsk): Promise<void> {
  try {
    let done = 0
    for (const painted of bench.stages(look, options)) {
      post({ answer: 'painted', picture, request, stage: PICTURE_STAGES[done++] ?? 'refined', painted }, [painted.rgba.buffer])
      await breath()
      if (wanted.has(picture)) return
    }
  }
  catch (error) {
    post({ answer: 'failed', picture, request, reason: error instanceof Error ? error.message : String(error) })
  }
}
