import type { SchemeBody } from '#shared/scheme/body'

/** Quiet time after the last change before a draft is sent, ms. */
export const SAVE_AFTER_MS = 600
/** Longest time an unsaved change stays in memory only, ms. */
export const KEEP_WITHIN_MS = 250
const RETRY_FIRST_MS = 2_000
const RETRY_LONGEST_MS = 30_000
/** Said when a draft is neither on the server nor on the device. */
export const NO_ROOM = 'This device has no room to keep it either: leave this page open.'

/** How far the work on a draft has got. Each is said only once it is so. */
export type SaveState
  /** The server has said that it has it. */
  = | { is: 'saved', at: string }
    /** On its way: nobody has said yet that it is safe. */
    | { is: 'saving' }
    /** The device has said that it keeps it, to be sent when the connection is back. */
    | { is: 'on this device', because: string }
    | { is: 'cannot save', because: string }
    /** Somebody else saved meanwhile; nothing is sent until a person has chosen. */
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
  /** Says why a send, or reading what others saved, threw. */
  failure: (error: unknown) => SaveFailure
  /** Writes where it survives a sudden end: an unsaved body, or null when the server has everything. Throws when there is no room. */
  keep: (unsaved: SchemeBody | null, version: number) => Promise<void>
  /** Somebody saved after this version: reads theirs, then calls `settle` or `hold`. Throws when theirs cannot be read. */
  reconcile: () => Promise<void>
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
  keepNow: () => Promise<void>
  /** Sends nothing until settled: a person has to choose. */
  hold: (body: SchemeBody) => void
  /** Goes on from a version of the server, with a body still to be saved or none. */
  settle: (version: number, unsaved: SchemeBody | null, savedAt: string) => void
  /** Word came that somebody saved this version. */
  heard: (version: number) => void
  version: () => number
  isUnsaved: () => boolean
  stop: () => void
}

/** A keeper that starts with nothing to save. */
export function createDraftKeeper(startVersion: number, ports: KeeperPorts): DraftKeeper {
  let version = startVersion
  let newest = startVersion
  let unsaved: SchemeBody | null = null
  /** What is being sent: not safe before the answer. */
  let onItsWay: SchemeBody | null = null
  let sending: Promise<void> | null = null
  let stand: 'current' | 'behind' | 'held' = 'current'
  /** Why nothing can be sent now; null while it can. */
  let offline: string | null = null
  let retryMs = RETRY_FIRST_MS
  let callOffSend: (() => void) | null = null
  let callOffKeep: (() => void) | null = null

  const callOff = () => {
    callOffSend?.()
    callOffSend = null
  }

  async function keepNow(): Promise<void> {
    callOffKeep?.()
    callOffKeep = null
    const body = unsaved ?? onItsWay
    if (!body) return
    const isKept = await ports.keep(body, version).then(() => true, () => false)
    // Of a change that came meanwhile it is not known yet.
    if (offline === null || (unsaved ?? onItsWay) !== body || stand === 'held') return
    ports.onState(isKept ? { is: 'on this device', because: offline } : { is: 'cannot save', because: `${offline} ${NO_ROOM}` })
  }

  /** Everything is on the server: only the undo is kept. Where there is no room for it, nothing is lost but that. */
  function keepSaved(savedAt: string): void {
    callOffKeep?.()
    callOffKeep = null
    void ports.keep(null, version).catch(() => undefined)
    ports.onState({ is: 'saved', at: savedAt })
  }

  const sendIn = (ms: number) => {
    callOff()
    callOffSend = ports.later(ms, () => {
      callOffSend = null
      void flush()
    })
  }

  function lineIsBack(): void {
    offline = null
    retryMs = RETRY_FIRST_MS
  }

  function tryAgain(because: string): void {
    offline = because
    void keepNow()
    sendIn(retryMs)
    retryMs = Math.min(retryMs * 2, RETRY_LONGEST_MS)
  }

  /** False when there is nothing more to do now. */
  function failed(error: unknown): boolean {
    const failure = ports.failure(error)
    switch (failure.why) {
      case 'changed meanwhile':
        // Whether it is a conflict shows when theirs was read: until then it is still being saved.
        stand = 'behind'
        return true
      case 'no connection':
        tryAgain(failure.because)
        return false
      case 'refused':
        offline = null
        ports.onState({ is: 'cannot save', because: failure.because })
        void keepNow()
        return false
    }
  }

  async function catchUp(): Promise<boolean> {
    try {
      await ports.reconcile()
      lineIsBack()
      return true
    }
    catch (error) {
      failed(error)
      return false
    }
  }

  async function sendOnce(body: SchemeBody): Promise<boolean> {
    onItsWay = body
    unsaved = null
    // Without a connection every try would flicker: it says so until one goes through.
    if (offline === null) ports.onState({ is: 'saving' })
    try {
      const saved = await ports.send(body, version)
      onItsWay = null
      version = saved.version
      lineIsBack()
      if (newest > version) stand = 'behind'
      else if (!unsaved) keepSaved(saved.savedAt)
      if (unsaved) void keepNow()
      return true
    }
    catch (error) {
      onItsWay = null
      unsaved ??= body
      return failed(error)
    }
  }

  async function sendAll(): Promise<void> {
    // What changes while a save is on its way is saved after it, from the version that save made.
    for (;;) {
      if (stand === 'held') return
      if (stand === 'behind') {
        if (!await catchUp()) return
        continue
      }
      if (!unsaved || !await sendOnce(unsaved)) return
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
      callOffKeep ??= ports.later(KEEP_WITHIN_MS, () => void keepNow())
      if (stand === 'held') return
      ports.onState({ is: 'saving' })
      if (!sending && offline === null) sendIn(SAVE_AFTER_MS)
    },
    flush,
    keepNow,
    hold(body) {
      unsaved = body
      stand = 'held'
      callOff()
      ports.onState({ is: 'conflict' })
      void keepNow()
    },
    settle(newVersion, body, savedAt) {
      version = newVersion
      newest = Math.max(newest, newVersion)
      unsaved = body
      stand = newest > version ? 'behind' : 'current'
      callOff()
      if (!body && stand === 'current') {
        keepSaved(savedAt)
        return
      }
      ports.onState({ is: 'saving' })
      void keepNow()
      sendIn(0)
    },
    heard(heardVersion) {
      newest = Math.max(newest, heardVersion)
      // One's own save is heard of too, often before its answer.
      if (newest <= version || stand === 'held' || sending) return
      stand = 'behind'
      void flush()
    },
    version: () => version,
    isUnsaved: () => unsaved !== null || sending !== null,
    stop() {
      void keepNow()
      callOff()
    },
  }
}
