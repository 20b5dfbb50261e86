import type { PictureAnswer, PictureAsk, PictureQuestion } from '#shared/picture/picture-messages'
import type { Materials } from '#shared/scheme/materials'

/** The page's one painting thread. */
export interface PaintingThread {
  ask: (question: PictureQuestion) => void
  /** Hears the answers for one picture, until the returned function is called. */
  hear: (picture: string, hear: (answer: PictureAnswer) => void) => () => void
}

/** Materials the thread knows at once: those of two looks side by side, and of some before. */
const KNOWN_MOST = 6

let current: PaintingThread | undefined

/** The painting thread of this page, started at the first use. Only in a browser. */
export function paintingThread(): PaintingThread {
  current ??= startThread()
  return current
}

function startThread(): PaintingThread {
  const worker = new Worker(new URL('../../workers/picture.worker.ts', import.meta.url), { type: 'module', name: 'pictures' })
  const known = new Map<Materials, number>()
  let count = 0
  const ears = new Map<string, (answer: PictureAnswer) => void>()
  worker.addEventListener('message', (event: MessageEvent<PictureAnswer>) => ears.get(event.data.picture)?.(event.data))
  // A thread that died, or never loaded, tells everyone who waits and is replaced at the next use.
  worker.addEventListener('error', (event) => {
    current = undefined
    worker.terminate()
    for (const [picture, hear] of ears) hear({ answer: 'failed', picture, request: Infinity, reason: event.message || 'the painting thread stopped' })
  })
  return {
    ask(question) {
      if (!('look' in question)) return tell(question)
      const { body, materials } = question.look
      tell({ ...question, look: { body, materials: numberOf(materials) } })
    },
    hear(picture, hear) {
      ears.set(picture, hear)
      return () => ears.delete(picture)
    },
  }
  function tell(ask: PictureAsk): void {
    try {
      worker.postMessage(ask)
    }
    catch {
      // A look that somebody made reactive cannot be handed over; what it holds can.
      worker.postMessage(JSON.parse(JSON.stringify(ask)))
    }
  }

  /** The number materials go by; told with all they hold when the thread does not know them. */
  function numberOf(materials: Materials): number {
    const number = known.get(materials) ?? ++count
    if (!known.has(materials)) tell({ ask: 'know', materials: number, given: materials })
    // Set anew, so that the first in the list is the one unused for longest.
    known.delete(materials)
    known.set(materials, number)
    const [oldest] = known
    if (oldest && known.size > KNOWN_MOST) {
      known.delete(oldest[0])
      tell({ ask: 'unlearn', materials: oldest[1] })
    }
    return number
  }
}
