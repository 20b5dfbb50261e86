import { arcCurves } from './svg-arc'
import type { FlatPoint } from './flat'
import { SvgRefusal, SVG_LIMITS } from './svg-refusal'

/** A straight piece to a place, or a curve by two handles to a place. */
export type PathPiece = readonly [to: FlatPoint] | readonly [first: FlatPoint, second: FlatPoint, to: FlatPoint]

/** The last handle of a curve, which a shorthand mirrors. */
type Handle = { point: FlatPoint, of: 'C' | 'Q' } | null

/** One line of a path, in the drawing's own units. */
export interface PathLine { start: FlatPoint, pieces: PathPiece[] }

const ARGUMENTS: Readonly<Record<string, number>> = { M: 2, L: 2, H: 1, V: 1, C: 6, S: 4, Q: 4, T: 2, A: 7, Z: 0 }
const NUMBER = /[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?/iy
const FLAG = /[01]/y

/**
 * Reads the data of an SVG path (SVG 2, 9.3): every command, absolute and relative, flags of arcs written together too.
 * @throws {SvgRefusal} where it cannot be read; nothing is guessed
 */
export function readPathData(data: string): PathLine[] {
  if (data.length > SVG_LIMITS.pathData) throw new SvgRefusal('One of its paths is too long. Simplify it first.')
  const lines: PathLine[] = []
  let at = 0
  let [x, y] = [0, 0]
  let line: PathLine | null = null
  let handle: Handle = null
  let command = ''

  const skip = () => {
    while (at < data.length && /[\s,]/.test(data[at] ?? '')) at++
  }
  const broken = () => new SvgRefusal(`One of its paths cannot be read, at “${data.slice(Math.max(0, at - 8), at + 8)}”.`)
  const read = (pattern: RegExp): number => {
    skip()
    pattern.lastIndex = at
    const [found] = pattern.exec(data) ?? []
    const value = Number(found)
    if (found === undefined || !Number.isFinite(value)) throw broken()
    at += found.length
    return value
  }
  const piece = (next: PathPiece) => {
    if (!line) {
      line = { start: [x, y], pieces: [] }
      lines.push(line)
    }
    line.pieces.push(next)
    ;[x, y] = next.at(-1) ?? [x, y]
  }

  for (skip(); at < data.length; skip()) {
    const letter = data[at] ?? ''
    if (/[a-zA-Z]/.test(letter)) {
      if (ARGUMENTS[letter.toUpperCase()] === undefined || (command === '' && letter.toUpperCase() !== 'M')) throw broken()
      command = letter
      at++
    }
    else if (command === '' || command.toUpperCase() === 'Z') throw broken()
    const upper = command.toUpperCase()
    const [ox, oy] = command === upper ? [0, 0] : [x, y]
    const numbers = Array.from({ length: ARGUMENTS[upper] ?? 0 }, (_, i) => read(upper === 'A' && (i === 3 || i === 4) ? FLAG : NUMBER))
    const place = (i: number): FlatPoint => [ox + (numbers[i] ?? 0), oy + (numbers[i + 1] ?? 0)]
    const here: FlatPoint = [x, y]
    const last: Handle = handle
    const mirrored = (of: 'C' | 'Q'): FlatPoint => last?.of === of ? [2 * x - last.point[0], 2 * y - last.point[1]] : here
    let next: Handle = null
    switch (upper) {
      case 'M':
        ;[x, y] = place(0)
        line = { start: [x, y], pieces: [] }
        lines.push(line)
        command = command === 'M' ? 'L' : 'l'
        break
      case 'L':
        piece([place(0)])
        break
      case 'H':
        piece([[ox + (numbers[0] ?? 0), y]])
        break
      case 'V':
        piece([[x, oy + (numbers[0] ?? 0)]])
        break
      case 'C':
        next = { point: place(2), of: 'C' }
        piece([place(0), place(2), place(4)])
        break
      case 'S':
        next = { point: place(0), of: 'C' }
        piece([mirrored('C'), place(0), place(2)])
        break
      case 'Q':
      case 'T': {
        const bend = upper === 'Q' ? place(0) : mirrored('Q')
        next = { point: bend, of: 'Q' }
        piece(raised(here, bend, place(upper === 'Q' ? 2 : 0)))
        break
      }
      case 'A':
        for (const curve of arcCurves(here, numbers, place(5))) piece(curve)
        break
      case 'Z':
        if (line) [x, y] = line.start
        line = null
        break
    }
    handle = next
  }
  return lines.filter(({ pieces }) => pieces.length > 0)
}

/** A curve with one handle as one with two. */
function raised([x, y]: FlatPoint, [hx, hy]: FlatPoint, to: FlatPoint): PathPiece {
  return [[x + 2 / 3 * (hx - x), y + 2 / 3 * (hy - y)], [to[0] + 2 / 3 * (hx - to[0]), to[1] + 2 / 3 * (hy - to[1])], to]
}
