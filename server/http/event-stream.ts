import type { H3Event } from 'h3'

/** What a slow reader may be behind before it is let go, in bytes; it comes back and catches up. */
const BEHIND_MAX = 1024 * 1024

/** An answer that goes on: server-sent events. */
export interface EventStream {
  send: (name: string, id: number, data: unknown) => void
  /** Says nothing, to keep the way open. */
  beat: () => void
  /** Aborted when the reader hung up, fell too far behind, or the server stops. */
  signal: AbortSignal
  end: () => void
}

const open = new Set<AbortController>()

/** Ends every open stream: the server stops, and nobody would wait for them. */
export function endEventStreams(): void {
  for (const ending of open) ending.abort()
}

/** Begins to answer with server-sent events; whoever begins it must end it. */
export function openEventStream(event: H3Event): EventStream {
  const { res } = event.node
  const ending = new AbortController()
  open.add(ending)
  res.once('close', () => {
    ending.abort()
    open.delete(ending)
  })
  res.writeHead(200, {
    'content-type': 'text/event-stream; charset=utf-8',
    'cache-control': 'no-store, no-transform',
    // For a proxy in front that would otherwise hold events back.
    'x-accel-buffering': 'no',
  })
  const write = (text: string) => {
    if (ending.signal.aborted) return
    res.write(text)
    if (res.writableLength > BEHIND_MAX) ending.abort()
  }
  write(': open\n\n')
  return {
    send: (name, id, data) => write(`id: ${id}\nevent: ${name}\ndata: ${JSON.stringify(data)}\n\n`),
    beat: () => write(': here\n\n'),
    signal: ending.signal,
    end() {
      open.delete(ending)
      res.end()
    },
  }
}

/** Where a reader that lost its stream was: the id of the last event it read; null when it says none. */
export function lastEventId(event: H3Event): number | null {
  const said = event.node.req.headers['last-event-id']
  return typeof said === 'string' && /^\d{1,15}$/.test(said) ? Number(said) : null
}
