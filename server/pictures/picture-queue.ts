import { Problem } from '#shared/errors/problem'

/** How many pictures may be under way: in all, and for one workshop, so that a full wall keeps nobody else waiting long. */
export interface QueueLimits { all: number, each: number }

/** What waits longer than this is better asked for anew, seconds. */
const ASK_AGAIN_SECONDS = 5

/** Pictures under way. */
export interface PictureQueue<T> {
  /**
   * Waits for a picture: the one that is already under way for the same owner and hash, or a new one.
   * @throws Problem `picture/too-many-waiting` when there is no room
   */
  join(owner: string, hash: string, draw: () => Promise<T>): Promise<T>
}

/** A queue that draws each picture once for all who ask, and refuses at once what it could only draw late. */
export function pictureQueue<T>(limits: QueueLimits): PictureQueue<T> {
  const underWay = new Map<string, Promise<T>>()
  const ofOwner = new Map<string, number>()
  return {
    join(owner, hash, draw) {
      const key = `${owner}/${hash}`
      const running = underWay.get(key)
      if (running) return running
      const own = ofOwner.get(owner) ?? 0
      if (underWay.size >= limits.all || own >= limits.each) {
        return Promise.reject(new Problem({ code: 'picture/too-many-waiting', retryAfterSeconds: ASK_AGAIN_SECONDS }))
      }
      ofOwner.set(owner, own + 1)
      const drawing = draw().finally(() => {
        underWay.delete(key)
        const left = (ofOwner.get(owner) ?? 1) - 1
        if (left > 0) ofOwner.set(owner, left)
        else ofOwner.delete(owner)
      })
      underWay.set(key, drawing)
      return drawing
    },
  }
}
