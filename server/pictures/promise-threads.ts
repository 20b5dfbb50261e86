import { boundedThreads } from '#server/threads/bounded-threads'
import type { Look } from '#shared/picture/look'
import type { ZonePromise } from './zone-promises'

/** One thread: colours for finding by are never waited for, and pictures come first. */
const threads = boundedThreads<Look, ZonePromise[]>('zone-promises', { threads: 1, waiting: 50 }, () => import('./zone-promises'))

/** Works out the promised colours of a look on a thread of its own. */
export const promiseOnThread = (look: Look) => threads.run(look)

/** Lets go of the thread, at the end of the process. */
export const closePromiseThreads = () => threads.close()
