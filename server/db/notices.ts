import { setTimeout as delay } from 'node:timers/promises'
import { Client } from 'pg'

const RETRY_FIRST_MS = 250
const RETRY_LONGEST_MS = 10_000

/** What is heard on a channel of the database. */
export interface NoticePorts {
  onNotice: (payload: string) => void
  /** The line is open, for the first time or again: what was said meanwhile was not heard. */
  onOpen: () => void
}

/** A line that listens until it is closed. */
export interface NoticeLine { close: () => Promise<void> }

/**
 * Listens on a channel over a connection of its own, which takes on the role that owns no table. A line that breaks is opened
 * again, later and later, for as long as it is wanted.
 */
export function openNotices(url: string, channel: string, { onNotice, onOpen }: NoticePorts): NoticeLine {
  const ending = new AbortController()
  let current: Client | undefined

  /** Listens over one connection; returns when it ends. */
  async function listenOnce(): Promise<void> {
    const client = new Client({ connectionString: url, options: '-c role=countershade_app', keepAlive: true, connectionTimeoutMillis: 10_000 })
    current = client
    const ended = new Promise<void>((resolve) => {
      client.once('end', resolve)
      client.on('error', () => resolve())
    })
    client.on('notification', ({ payload }) => onNotice(payload ?? ''))
    try {
      await client.connect()
      await client.query(`listen ${client.escapeIdentifier(channel)}`)
      onOpen()
      await ended
    }
    finally {
      await client.end().catch(() => undefined)
    }
  }

  async function listen(): Promise<void> {
    let wait = RETRY_FIRST_MS
    while (!ending.signal.aborted) {
      const since = Date.now()
      await listenOnce().catch((error: unknown) => {
        if (!ending.signal.aborted) console.warn(`The line to the database did not open: ${String(error)}`)
      })
      wait = Date.now() - since > RETRY_LONGEST_MS ? RETRY_FIRST_MS : Math.min(RETRY_LONGEST_MS, wait * 2)
      await delay(wait, undefined, { signal: ending.signal, ref: false }).catch(() => undefined)
    }
  }

  const listening = listen()
  return {
    async close() {
      ending.abort()
      await current?.end().catch(() => undefined)
      await listening
    },
  }
}
