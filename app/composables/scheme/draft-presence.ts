import { createNewsLink, type LiveLine } from '~/composables/live/news-link'
import { DraftLiveView, HERE_EVERY_MS, type OtherHere } from '#shared/scheme/presence'

/** Quiet time after another coat is taken in hand before it is told, ms. */
export const TELL_COAT_AFTER_MS = 300

/** What being present in a draft needs from the world. */
export interface PresencePorts {
  /** Opens the line on which others are heard of. */
  open: () => LiveLine
  /** Says that one is here, with the coat in hand. Whether it arrives is not waited for. */
  say: (coatId: string | null) => void
  coatId: () => string | null
  onOthers: (others: readonly OtherHere[]) => void
  /** The server has this version of the draft. */
  onVersion: (version: number) => void
  later: (ms: number, run: () => void) => () => void
}

/** Being seen in a draft, and seeing others. */
export interface DraftPresence {
  /** The page is seen, or the network is back. */
  start: () => void
  /** The page is out of sight, or left: one is gone for the others. */
  stop: () => void
  /** Another coat is in hand. */
  coatChanged: () => void
}

/** Present in a draft from `start` to `stop`. */
export function createDraftPresence(ports: PresencePorts): DraftPresence {
  let known = new Set<string>()
  let isLive = false
  let callOff: (() => void) | null = null

  const sayIn = (ms: number) => {
    callOff?.()
    callOff = ports.later(ms, say)
  }
  function say(): void {
    ports.say(ports.coatId())
    sayIn(HERE_EVERY_MS)
  }

  const link = createNewsLink<DraftLiveView>({
    open: ports.open,
    event: 'draft',
    form: DraftLiveView,
    onNews({ version, others }) {
      // Somebody new has not heard of this page yet.
      if (others.some(({ tab }) => !known.has(tab))) say()
      known = new Set(others.map(({ tab }) => tab))
      ports.onOthers(others)
      ports.onVersion(version)
    },
    onLive(is) {
      // Said once the line is open: whoever hears it can be heard in turn.
      if (is && !isLive) say()
      isLive = is
      if (is) return
      callOff?.()
      callOff = null
      known = new Set()
      ports.onOthers([])
    },
    later: ports.later,
  })

  return {
    start: link.start,
    stop: link.stop,
    coatChanged() {
      if (isLive) sayIn(TELL_COAT_AFTER_MS)
    },
  }
}
