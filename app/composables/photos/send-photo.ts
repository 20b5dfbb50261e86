import { Problem, ProblemData } from '#shared/errors/problem'
import { PhotoView } from '#shared/photos/photo-view'

/** What a photo is of: a scheme, and the run at the bench it was taken of, if so. */
export interface PhotoPlace {
  readonly schemeId: string
  readonly runId?: string
  /** The id a tablet gave it, when it was taken at the bench. */
  readonly photoId?: string
}

/** Sends one camera file as it is, telling how many bytes have gone; throws a Problem when refused, a TypeError when nobody answers. */
export function sendPhoto(place: PhotoPlace, file: Blob, onSent: (bytes: number) => void): Promise<PhotoView> {
  return new Promise((resolve, reject) => {
    // fetch cannot tell how much of a body has gone.
    const request = new XMLHttpRequest()
    const taken = new URLSearchParams()
    if (place.runId) taken.set('runId', place.runId)
    if (place.photoId) taken.set('photoId', place.photoId)
    request.open('POST', `/api/schemes/${place.schemeId}/photos?${taken}`)
    request.setRequestHeader('content-type', 'application/octet-stream')
    request.responseType = 'json'
    request.upload.onprogress = event => onSent(event.loaded)
    request.upload.onload = () => onSent(file.size)
    request.onload = () => {
      const photo = PhotoView.safeParse(request.response)
      if (request.status === 201 && photo.success) return resolve(photo.data)
      reject(refusalIn(request.response))
    }
    request.onerror = () => reject(new TypeError('No answer'))
    request.send(file)
  })
}

function refusalIn(answer: unknown): Problem {
  const problem = ProblemData.safeParse(answer)
  return new Problem(problem.success ? problem.data : { code: 'server/failed' })
}
