import { builtInBlank } from '#shared/blank/built-in-blanks'
import { gillEdge } from '#shared/blank/zones'
import type { Mark, Place } from '#shared/scheme/mark'

/** Widths are written for a body of 100 mm and follow its length. */
export function atLength(blank: string, mm: number): number {
  return mm * builtInBlank(blank).length / 100
}

/** Places along the back edge of a blank's gill cover, shifted along the body. */
function alongGill(blank: string, shift = 0): Place[] {
  const { gill } = builtInBlank(blank)
  return Array.from({ length: 13 }, (_, i): Place => {
    const v = gill.top + i / 12 * (gill.bottom - gill.top)
    return [gillEdge(gill, v) + shift, v]
  })
}

/** Shade along the edge of the gill cover, and a fainter second line on the cover. */
export function gillShade(blank: string): Mark {
  return { kind: 'strokes', with: 'airbrush', strokes: [
    { points: alongGill(blank), width: [atLength(blank, 0.6), atLength(blank, 1)], amount: [1, 0.4] },
    { points: alongGill(blank, -0.05).slice(2, 10), width: [atLength(blank, 0.6), atLength(blank, 0.6)], amount: [0.5, 0.4] },
  ] }
}

/** A line just behind the gill cover. */
export function gillLine(blank: string, width: number, { amount = 1, shift = 0 } = {}): Mark {
  return { kind: 'strokes', with: 'airbrush', strokes: [{ points: alongGill(blank, shift), width: [atLength(blank, width), atLength(blank, width * 0.7)], amount: [amount, amount * 0.5] }] }
}

/** A pectoral fin in dagger strokes from one root behind the gill cover. */
export function pectoral(blank: string, v = 0.62): Mark {
  return { kind: 'fan', root: [builtInBlank(blank).gill.along + 0.03, v], count: 9, length: [11, 13], angle: [6, 54], width: [0.45, 0.7], amount: [0.7, 0.34] }
}

/** Its rays, thin. */
export function pectoralRays(blank: string, v = 0.62): Mark {
  return { kind: 'fan', root: [builtInBlank(blank).gill.along + 0.03, v], count: 7, length: [10, 12], angle: [8, 52], width: [0.13, 0.13], amount: [0.8, 0.25] }
}

/** A straight dagger stroke on a blank from one place to another. */
export function dagger(blank: string, from: Place, to: Place, width: number, amount = 1.1) {
  return { points: [from, to], width: [atLength(blank, width), atLength(blank, 0.25)] as [number, number], amount: [amount, 0.5] as [number, number] }
}

/** Short ticks along the lateral line. */
export function lateralLine(from: number, to: number, count: number): Mark {
  return { kind: 'strokes', with: 'brush', strokes: Array.from({ length: count }, (_, i) => {
    const u = from + (to - from) * i / (count - 1)
    const v = 0.5 + 0.045 * Math.sin(4.6 * (u - 0.25))
    return { points: [[u, v], [u + 0.0042, v]] as Place[], width: [0.13, 0.13], amount: [1, 1] }
  }) }
}
