import type { PictureAnswer, PictureAsk } from '#shared/picture/picture-messages'

/** The page's one painting thread. */
export interface PaintingThread {
  ask: (ask: PictureAsk) => void
  /** Hears the answers for one picture, until the returned function is called. */
  hear: (picture: string, hear: (answer: PictureAnswer) => void) => () => void
}

let current: PaintingThread | undefined

/** The painting thread of this page, started at the first use. Only in a browser. */
export function paintingThread(): PaintingThread {
  current ??= startThread()
  return current
}

function startThread(): PaintingThread {
  const worker = new Worker(new URL('../../workers/picture.worker.ts', import.meta.url), { type: 'module', name: 'pictures' })
  const ears = new Map<string, (answer: PictureAnswer) => void>()
  worker.addEventListener('message', (event: MessageEvent<PictureAnswer>) => ears.get(event.data.picture)?.(event.data))
  // A thread that died, or never loaded, tells everyone who waits and is replaced at the next use.
  worker.addEventListener('error', (event) => {
    current = undefined
    worker.terminate()
    for (const [picture, hear] of ears) hear({ answer: 'failed', picture, request: Infinity, reason: event.message || 'the painting thread stopped' })
  })
  return {
    // Reactive objects cannot be handed over; what a request holds is plain data.
    ask: ask => worker.postMessage(JSON.parse(JSON.stringify(ask))),
    hear(picture, hear) {
      ears.set(picture, hear)
      return () => ears.delete(picture)
    },
  }
}
