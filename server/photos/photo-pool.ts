import { boundedThreads } from '#server/threads/bounded-threads'
import { PhotoRefused, type ProcessedPhoto } from './process-photo'
import type { PhotoOutcome } from './take-in-photo'

/** A 40-megapixel photo takes 120 MB while it is decoded: few at once. */
const threads = boundedThreads<Uint8Array, PhotoOutcome>('take-in-photo', { threads: 2, waiting: 60 }, () => import('./take-in-photo'))

/** Takes a camera file in on a thread of its own. @throws {PhotoRefused} */
export async function takeInPhoto(bytes: Uint8Array): Promise<ProcessedPhoto> {
  const outcome = await threads.run(bytes)
  if (outcome.ok) return outcome.photo
  throw new PhotoRefused(outcome.refusal)
}

/** Lets go of the threads, at the end of the process. */
export const closePhotoThreads = () => threads.close()
