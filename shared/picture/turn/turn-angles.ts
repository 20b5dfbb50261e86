import type { TurnReach } from './turn-form'

/** How far a blank is turned from its side view, degrees. */
export interface TurnAngles {
  /** About the upright: + brings the nose toward the viewer, ±180 shows the right side. */
  turn: number
  /** Toward the viewer: + shows the back, - the belly. */
  tip: number
}

/** The side view. */
export const UNTURNED: Readonly<TurnAngles> = { turn: 0, tip: 0 }
export const TURN_MOST = 180
export const TIP_MOST = 90

/** Angles brought into their ranges: a turn goes round and round, a tip stops at back and belly. */
export function turnedTo({ turn, tip }: TurnAngles): TurnAngles {
  const round = ((turn + TURN_MOST) % 360 + 360) % 360 - TURN_MOST
  // A half turn has two names; the one it was reached by stays.
  return { turn: round === -TURN_MOST && turn > 0 ? TURN_MOST : round, tip: Math.min(TIP_MOST, Math.max(-TIP_MOST, tip)) }
}

/** What the viewer sees, in words: "turned 40° to the tail". */
export function turnWords({ turn, tip }: TurnAngles): string {
  const [across, up] = [Math.round(turn), Math.round(tip)]
  if (across === 0 && Math.abs(up) === TIP_MOST) return up > 0 ? 'the back' : 'the belly'
  const tipped = up === 0 ? '' : `tipped ${Math.abs(up)}° to the ${up > 0 ? 'back' : 'belly'}`
  const seen = across === 0 ? 'left side' : Math.abs(across) === 180 ? 'right side' : `turned ${Math.abs(across)}° to the ${across > 0 ? 'nose' : 'tail'}`
  return tipped ? `${seen}, ${tipped}` : seen
}

/** Body directions in the view frame (X right, Y up, Z toward the viewer), row by row. */
export function turnMatrix({ turn, tip }: TurnAngles): readonly [number, number, number, number, number, number, number, number, number] {
  const [c, s, d, e] = [cosine(turn), cosine(turn - 90), cosine(tip), cosine(tip - 90)]
  return [c, 0, s, s * e, d, -c * e, -s * d, e, c * d]
}

/** Quarter turns are exact, so that the side views mirror each other. */
function cosine(degrees: number): number {
  return degrees % 90 === 0 ? [1, 0, -1, 0][((degrees / 90) % 4 + 4) % 4]! : Math.cos(degrees * Math.PI / 180)
}

/** Empty border on each side, share of the smaller side of the picture: as the side view has it. */
const BORDER = 0.06

/** Pixels for each mm at which a turned blank fills a picture and never leaves it: at no turn exactly the side view's. */
export function turnScale({ long, tall, wide, tips }: TurnReach, angles: TurnAngles, width: number, height: number): number {
  const border = 2 * BORDER * Math.min(width, height)
  const [xx, xy, xz, yx, yy, yz] = turnMatrix(angles)
  let [across, up] = [0, 0]
  for (let i = 0; i < tips.length; i += 3) {
    const x = tips[i]!, y = tips[i + 1]!, z = tips[i + 2]!
    across = Math.max(across, Math.abs(xx * x + xy * y + xz * z))
    up = Math.max(up, Math.abs(yx * x + yy * y + yz * z))
  }
  const most = Math.min((width - border) / (2 * long), (height - border) / (2 * Math.max(tall, wide)))
  return Math.max(1e-3, Math.min(most, (width - border) / (2 * across), (height - border) / (2 * up)))
}
