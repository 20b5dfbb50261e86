/** Something that goes on in the background worker until its work is done. */
export interface LongEvent extends Event { waitUntil: (work: Promise<unknown>) => void }

/** A page or a part of one asks for something. */
export interface AskEvent extends LongEvent {
  readonly request: Request
  respondWith: (answer: Response | Promise<Response>) => void
}

/** A page says something. */
export interface WordEvent extends LongEvent { readonly data: unknown }

/** As much of the worker's own world as is used here: the page's types know nothing of it. */
export interface WorkerScope {
  readonly __WB_MANIFEST: readonly { url: string, revision: string | null }[]
  readonly location: Location
  readonly clients: { claim: () => Promise<void> }
  skipWaiting: () => Promise<void>
  addEventListener: {
    (type: 'install' | 'activate', hear: (event: LongEvent) => void): void
    (type: 'fetch', hear: (event: AskEvent) => void): void
    (type: 'message', hear: (event: WordEvent) => void): void
  }
}
