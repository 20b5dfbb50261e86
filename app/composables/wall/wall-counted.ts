/** What hangs on the wall now. */
export interface WallCount {
  shown: number
  hasMore: boolean
  isNear: boolean
  /** Looks whose colours are still to be worked out. */
  waiting: number
}

/** The wall in one line: its scale, its order, how many, and what may still come in between. */
export function wallCounted({ shown, hasMore, isNear, waiting }: WallCount): string {
  const finishes = `${shown === 1 ? '1 finish' : `${shown} finishes`}${hasMore ? ' and more' : ''}`
  const order = isNear ? 'Nearest first, by the zone that comes nearest' : 'Newest work first'
  const still = waiting === 0 ? '' : ` The colours of ${waiting === 1 ? 'one more' : `${waiting} more`} are being worked out.`
  return `Every blank at one scale. ${order}, ${finishes}.${still}`
}
