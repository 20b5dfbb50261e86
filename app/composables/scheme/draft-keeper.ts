import type { SchemeBody } from '#shared/scheme/body'

/** Quiet time after the last change before a draft is sent, ms. */
export const SAVE_AFTER_MS = 600
/** Longest time an unsaved change stays in memory only, ms. */
export const KEEP_WITHIN_MS = 300
const RETRY_FIRST_MS = 2_000
const RETRY_LONGEST_MS = 30_000

/** How far the work on a draft has got. */
export type SaveState
  = | { is: 'saved', at: string }
    | { is: 'saving' }
    /** Kept here, to be sent when the connection is back. */
    | { is: 'on this device', because: string }
    | { is: 'cannot save', because: string }
    /** Somebody else saved meanwhile; nothing is sent until one version is chosen. */
    | { is: 'conflict' }

/** Why a save did not go through. */
export type SaveFailure
  = | { why: 'no connection', because: string }
    | { why: 'changed meanwhile' }
    | { why: 'refused', because: string }

/** What the keeper needs from the world. */
export interface KeeperPorts {
  /** Sends a body made from `version`; throws when it does not go through. */
  send: (body: SchemeBody, version: number) => Promise<{ version: number, savedAt: string }>
  /** Says why a send threw. */
  failure: (error: unknown) => SaveFailure
  /** Writes the unsaved body where it survives a sudden end. */
  keep: (body: SchemeBody, version: number) => void
  /** Drops what was kept. */
  forget: () => void
  /** Somebody else saved after `version`. */
  onConflict: () => void
  onState: (state: SaveState) => void
  /** Runs something later; the answer calls it off. */
  later: (ms: number, run: () => void) => () => void
}

/** Saves one draft by itself, and never over somebody else's work. */
export interface DraftKeeper {
  /** The body the painter has now. */
  change: (body: SchemeBody) => void
  /** Sends what is unsaved at once; settles when the server has it or has refused it. */
  flush: () => Promise<void>
  /** Writes what is unsaved to the device at once, for a page that is about to go. */
  keepNow: () => void
  /** Sends nothing until settled: unsaved work of an older version was found. */
  hold: (body: SchemeBody) => void
  /** Goes on from a version of the server, with a body still to be saved or none. */
  settle: (version: number, unsaved: SchemeBody | null, savedAt: string) => void
  version: () => number
  isUnsaved: () => boolean
  stop: () => void
}

/** A keeper that starts with nothing to save. */
export function createDraftKeeper(startVersion: number, ports: KeeperPorts): DraftKeeper {
  let version = startVersion
  let unsaved: SchemeBody | null = null
  let sending: Promise<void> | null = null
  let conflicted = false
  let offline = false
  let retryMs = RETRY_FIRST_MS
  let callOffSend: (() => void) | null = null
  let callOffKeep: (() => void) | null = null

  const callOff = () => {
    callOffSend?.()
    callOffSend = null
  }

  const keepNow = () => {
    callOffKeep?.()
    callOffKeep = null
    if (unsaved) ports.keep(unsaved, version)
  }

  // Without a connection every try would flicker: it says so until one goes through.
  const saySaving = () => {
    if (!offline) ports.onState({ is: 'saving' })
  }

  const sendIn = (ms: number) => {
    callOff()
    callOffSend = ports.later(ms, () => {
      callOffSend = null
      void flush()
    })
  }

  function failed(error: unknown, body: SchemeBody) {
    unsaved ??= body
    keepNow()
    const failure = ports.failure(error)
    switch (failure.why) {
      case 'changed meanwhile':
        conflicted = true
        callOff()
        ports.onState({ is: 'conflict' })
        ports.onConflict()
        return
      case 'no connection':
        offline = true
        ports.onState({ is: 'on this device', because: failure.because })
        sendIn(retryMs)
        retryMs = Math.min(retryMs * 2, RETRY_LONGEST_MS)
        return
      case 'refused':
        ports.onState({ is: 'cannot save', because: failure.because })
    }
  }

  async function sendOnce(body: SchemeBody): Promise<boolean> {
    try {
      const saved = await ports.send(body, version)
      version = saved.version
      retryMs = RETRY_FIRST_MS
      offline = false
      if (unsaved) keepNow()
      else {
        callOffKeep?.()
        callOffKeep = null
        ports.forget()
        ports.onState({ is: 'saved', at: saved.savedAt })
      }
      return true
    }
    catch (error) {
      failed(error, body)
      return false
    }
  }

  async function sendAll() {
    // What changes while a save is on its way is saved after it, from the version that save made.
    while (unsaved && !conflicted) {
      const body = unsaved
      unsaved = null
      saySaving()
      if (!await sendOnce(body)) return
    }
  }

  function flush(): Promise<void> {
    callOff()
    sending ??= sendAll().finally(() => {
      sending = null
    })
    return sending
  }

  return {
    change(body) {
      unsaved = body
      callOffKeep ??= ports.later(KEEP_WITHIN_MS, keepNow)
      if (conflicted) return
      saySaving()
      if (!sending) sendIn(SAVE_AFTER_MS)
    },
    flush,
    keepNow,
    hold(body) {
      unsaved = body
      conflicted = true
      callOff()
      ports.onState({ is: 'conflict' })
    },
    settle(newVersion, body, savedAt) {
      version = newVersion
      unsaved = body
      conflicted = false
      callOff()
      if (body) {
        keepNow()
        saySaving()
        sendIn(0)
        return
      }
      callOffKeep?.()
      callOffKeep = null
      ports.forget()
      ports.onState({ is: 'saved', at: savedAt })
    },
    version: () => version,
    isUnsaved: () => unsaved !== null || sending !== null,
    stop() {
      keepNow()
      callOff()
    },
  }
}
