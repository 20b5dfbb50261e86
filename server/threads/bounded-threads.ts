import { existsSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { Piscina } from 'piscina'

/** A pool of threads for one kind of heavy work. */
export interface Threads<Job, Result> {
  run(job: Job): Promise<Result>
  /** Lets go of the threads. */
  close(): Promise<void>
}

export interface ThreadLimits {
  /** At work at once: heavy work must never take the whole machine from those who are typing. */
  threads: number
  /** More waiting jobs than this are refused at once instead of late. */
  waiting: number
}

/** A thread that has had nothing to do for so long is let go, ms. */
const IDLE_MS = 60_000

/** Where the build lays a thread's own file, seen from the files it bundles. */
const FOLDERS = ['./workers/', '../workers/', '../../workers/', '../../../workers/']

/**
 * Threads that start from the file the build laid under `name`; where no build has laid one (scripts, tests)
 * the job is done here, by what `here` loads.
 */
export function boundedThreads<Job, Result>(
  name: string, limits: ThreadLimits, here: () => Promise<{ default: (job: Job) => Result | Promise<Result> }>,
): Threads<Job, Result> {
  let pool: Piscina<Job, Result> | undefined

  return {
    async run(job) {
      const filename = FOLDERS.map(folder => fileURLToPath(new URL(`${folder}${name}.mjs`, import.meta.url))).find(file => existsSync(file))
      if (!filename) return (await here()).default(job)
      pool ??= new Piscina<Job, Result>({ filename, minThreads: 0, maxThreads: limits.threads, maxQueue: limits.waiting, idleTimeout: IDLE_MS })
      return pool.run(job)
    },
    async close() {
      const open = pool
      pool = undefined
      await open?.destroy()
    },
  }
}
