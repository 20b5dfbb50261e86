import { boxRound, type FlatPoint } from './flat'

/** How outlines are laid on a sheet: turned, scaled and turned over about their own middle, then moved. */
export interface Placing {
  /** Toward the tail, mm. */
  along: number
  /** Toward the back, mm. */
  up: number
  /** Against the clock, degrees. */
  turn: number
  /** 1 is as they came. */
  scale: number
  /** Turned over, nose to tail. */
  mirrored: boolean
}

/** As they came. */
export const AS_THEY_CAME: Placing = { along: 0, up: 0, turn: 0, scale: 1, mirrored: false }

/** The least and the most a drawing may be scaled by. */
export const SCALE_RANGE = { least: 0.05, most: 20 } as const

/**
 * Outlines as a placing lays them.
 * @throws {RangeError} when the scale is not above 0
 */
export function placed(outlines: readonly (readonly FlatPoint[])[], placing: Placing): FlatPoint[][] {
  if (!(placing.scale > 0)) throw new RangeError(`A scale is above 0, got ${placing.scale}.`)
  const box = boxRound(outlines)
  if (!box) return outlines.map(outline => [...outline])
  const [middleX, middleY] = [(box.left + box.right) / 2, (box.low + box.high) / 2]
  const angle = placing.turn * Math.PI / 180
  const [cos, sin] = [Math.cos(angle) * placing.scale, Math.sin(angle) * placing.scale]
  const over = placing.mirrored ? -1 : 1
  return outlines.map(outline => outline.map(([x, y]): FlatPoint => {
    const [dx, dy] = [over * (x - middleX), y - middleY]
    return [middleX + cos * dx - sin * dy + placing.along, middleY + sin * dx + cos * dy + placing.up]
  }))
}
