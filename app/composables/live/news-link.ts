import type { z } from 'zod'

const RETRY_FIRST_MS = 1_000
const RETRY_LONGEST_MS = 30_000

/** A line on which a server tells things; `EventSource` is one. */
export interface LiveLine {
  addEventListener: (name: string, hear: (event: { data?: unknown }) => void) => void
  close: () => void
}

/** What the link needs from the world. */
export interface NewsLinkPorts<News> {
  /** Opens a line that tells what is new. */
  open: () => LiveLine
  /** The name under which it is told, and its form. */
  event: string
  form: z.ZodType<News>
  onNews: (news: News) => void
  /** Whether news comes by itself now; while it does not, one has to ask. */
  onLive: (isLive: boolean) => void
  /** Runs something later; the answer calls it off. */
  later: (ms: number, run: () => void) => () => void
}

/** Keeps a line open for as long as it is wanted, and says when there is none. */
export interface LiveLink {
  /** Opens the line now: the page is seen, or the network is back. */
  start: () => void
  /** Lets go of the line until it is started again: the page is out of sight, or left. */
  stop: () => void
}

/** A link to what others do. A line that breaks is opened again, later and later; one that is over stays closed. */
export function createNewsLink<News>(ports: NewsLinkPorts<News>): LiveLink {
  let line: LiveLine | null = null
  let callOff: (() => void) | null = null
  let retryMs = RETRY_FIRST_MS
  let isOver = false

  function letGo(): void {
    callOff?.()
    callOff = null
    line?.close()
    line = null
    ports.onLive(false)
  }

  function open(): void {
    callOff = null
    const opened = ports.open()
    line = opened
    const isCurrent = () => line === opened
    opened.addEventListener(ports.event, ({ data }) => {
      const news = readNews(ports.form, data)
      if (!isCurrent() || !news) return
      retryMs = RETRY_FIRST_MS
      ports.onLive(true)
      ports.onNews(news)
    })
    opened.addEventListener('over', () => {
      if (!isCurrent()) return
      isOver = true
      letGo()
    })
    opened.addEventListener('error', () => {
      if (!isCurrent()) return
      letGo()
      callOff = ports.later(retryMs, open)
      retryMs = Math.min(RETRY_LONGEST_MS, retryMs * 2)
    })
  }

  return {
    start() {
      if (isOver || line) return
      callOff?.()
      open()
    },
    stop: letGo,
  }
}

function readNews<News>(form: z.ZodType<News>, data: unknown): News | null {
  if (typeof data !== 'string') return null
  try {
    return form.safeParse(JSON.parse(data)).data ?? null
  }
  catch {
    return null
  }
}
