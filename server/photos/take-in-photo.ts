import { PhotoRefused, processPhoto, type PhotoRefusal, type ProcessedPhoto } from './process-photo'

/** What a thread says of a camera file: taken in, or why not. */
export type PhotoOutcome = { ok: true, photo: ProcessedPhoto } | { ok: false, refusal: PhotoRefusal }

/** Takes one camera file in; a refusal is an answer, since an error's own fields do not cross from a thread. */
export default async function takeIn(bytes: Uint8Array): Promise<PhotoOutcome> {
  try {
    return { ok: true, photo: await processPhoto(bytes) }
  }
  catch (error) {
    if (error instanceof PhotoRefused) return { ok: false, refusal: error.code }
    throw error
  }
}
