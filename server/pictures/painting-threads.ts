import { boundedThreads } from '#server/threads/bounded-threads'
import type { PaintedPicture, PictureJob } from './paint-picture'

const threads = boundedThreads<PictureJob, PaintedPicture>('paint-picture', { threads: 2, waiting: 200 }, () => import('./paint-picture'))

/** Paints a picture on a thread of its own. */
export const paintOnThread = (job: PictureJob) => threads.run(job)

/** Lets go of the threads, at the end of the process. */
export const closePaintingThreads = () => threads.close()
