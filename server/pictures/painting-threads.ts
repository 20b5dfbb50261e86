import { existsSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { Piscina } from 'piscina'
import type { PaintedPicture, PictureJob } from './paint-picture'

/** Painting must never take the whole machine from those who are typing. */
const THREADS_MAX = 2
/** More waiting pictures than this are refused at once instead of late. */
const WAITING_MAX = 200
/** A thread that has had nothing to paint for so long is let go, ms. */
const IDLE_MS = 60_000

/** Where the build lays the threads' own file, seen from the files it bundles. */
const PLACES = ['./workers/paint-picture.mjs', '../workers/paint-picture.mjs', '../../workers/paint-picture.mjs', '../../../workers/paint-picture.mjs']

let pool: Piscina<PictureJob, PaintedPicture> | undefined

function threadFile(): string | undefined {
  return PLACES.map(place => fileURLToPath(new URL(place, import.meta.url))).find(file => existsSync(file))
}

/** Paints a picture on a thread of its own; where no build has laid the threads' file (scripts, tests) it is painted here. */
export async function paintOnThread(job: PictureJob): Promise<PaintedPicture> {
  const filename = threadFile()
  if (!filename) {
    const { default: paintPicture } = await import('./paint-picture')
    return paintPicture(job)
  }
  pool ??= new Piscina<PictureJob, PaintedPicture>({ filename, minThreads: 0, maxThreads: THREADS_MAX, maxQueue: WAITING_MAX, idleTimeout: IDLE_MS })
  return pool.run(job)
}

/** Lets go of the threads, at the end of the process. */
export async function closePaintingThreads(): Promise<void> {
  const open = pool
  pool = undefined
  await open?.destroy()
}
