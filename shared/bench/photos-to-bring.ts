/** A photo of a finish, as far as it matters here: of which run it was taken, if of one. */
interface PhotoOfFinish { id: string, run: { id: string, number: number } | null, alt: string }

/** A photo to hold a piece against, with what it shows. */
export interface PhotoToBring { id: string, words: string }

/**
 * Which photos a run needs at the bench, the most telling first: the sample's own, those of the finish, then those of earlier
 * runs, newest run first. What was taken of this very run shows how it is, not how it should be.
 */
export function photosToBring(photos: readonly PhotoOfFinish[], runId: string, samplePhotoId: string | null): PhotoToBring[] {
  const rank = (photo: PhotoOfFinish) => photo.id === samplePhotoId ? -1 : photo.run === null ? 0 : 1
  return photos
    .filter(photo => photo.run?.id !== runId || photo.id === samplePhotoId)
    .toSorted((a, b) => rank(a) - rank(b) || (b.run?.number ?? 0) - (a.run?.number ?? 0))
    .map(({ id, run, alt }) => {
      const of = id === samplePhotoId ? 'The sample' : run === null ? 'The finish' : `Run ${run.number}`
      return { id, words: alt === '' ? of : `${of}: ${alt}` }
    })
}
