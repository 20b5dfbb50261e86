import { boxRound, type FlatBox, type FlatPoint } from './flat'

/** Sheets a printer takes, mm. */
export const PAPERS = { a4: { word: 'A4', width: 210, height: 297 }, letter: { word: 'Letter', width: 215.9, height: 279.4 } } as const
export type Paper = keyof typeof PAPERS

/** What printers leave white, mm. */
const MARGIN = 10
/** Strip at the foot of a sheet for the ruler and the words, mm. */
export const FOOT = 24
/** How far sheets of one drawing overlap, so that they can be laid on each other, mm. */
export const OVERLAP = 12
/** Room round a drawing for its register marks, mm. */
const ROUND = 8

/** A part of one side's drawing on a sheet, mm: what it shows of the drawing (y down), and where on the sheet that stands. */
export interface PrintedPart {
  side: 'left' | 'right'
  shows: { x: number, y: number, width: number, height: number }
  x: number
  y: number
}

/** One sheet of paper, mm. */
export interface PrintedSheet {
  width: number
  height: number
  isUpright: boolean
  parts: PrintedPart[]
  /** Which of how many, where a drawing needs more than one; counted from 1. */
  tile: { row: number, column: number, rows: number, columns: number } | null
}

/** A stencil ready to be printed at true size. */
export interface PrintLayout {
  /** What one side's drawing takes, mm, y down; the right side is turned over about x = 0. */
  left: { x: number, y: number, width: number, height: number }
  right: { x: number, y: number, width: number, height: number }
  sheets: PrintedSheet[]
  /** Places of the register marks of the left side, y down: round the drawing and where sheets overlap. */
  marks: FlatPoint[]
}

/**
 * Lays the drawing of a flank, and the same turned over for the other, on as few sheets as it takes at true size.
 *
 * @param lines everything of the left side's drawing, mm, y up
 * @throws {RangeError} when there is nothing to print
 */
export function printLayout(lines: readonly (readonly FlatPoint[])[], paper: Paper): PrintLayout {
  const box = boxRound(lines)
  if (!box) throw new RangeError('There is nothing to print.')
  const left = { x: box.left - ROUND, y: -box.high - ROUND, width: box.right - box.left + 2 * ROUND, height: box.high - box.low + 2 * ROUND }
  const right = { ...left, x: -left.x - left.width }
  const ways = [true, false].map(isUpright => sheetsOf(left, right, paper, isUpright))
  const [best = []] = ways.sort((a, b) => a.length - b.length)
  const tiled = best[0]?.tile ?? null
  return { left, right, sheets: best, marks: registerMarks(box, left, best.filter(sheet => tiled && sheet.parts[0]?.side === 'left')) }
}

type Frame = PrintLayout['left']

function sheetsOf(left: Frame, right: Frame, paper: Paper, isUpright: boolean): PrintedSheet[] {
  const { width: short, height: long } = PAPERS[paper]
  const [width, height] = isUpright ? [short, long] : [long, short]
  const [wide, high] = [width - 2 * MARGIN, height - 2 * MARGIN - FOOT]
  const sheet = (parts: PrintedPart[], tile: PrintedSheet['tile'] = null): PrintedSheet => ({ width, height, isUpright, parts, tile })
  if (left.width <= wide && 2 * left.height <= high) {
    return [sheet([{ side: 'left', shows: left, x: MARGIN, y: MARGIN }, { side: 'right', shows: right, x: MARGIN, y: MARGIN + left.height }])]
  }
  const columns = tilesFor(left.width, wide)
  const rows = tilesFor(left.height, high)
  return ([['left', left], ['right', right]] as const).flatMap(([side, frame]) =>
    Array.from({ length: rows * columns }, (_, i) => {
      const [row, column] = [Math.floor(i / columns), i % columns]
      const [x, y] = [frame.x + column * (wide - OVERLAP), frame.y + row * (high - OVERLAP)]
      const shows = { x, y, width: Math.min(wide, frame.x + frame.width - x), height: Math.min(high, frame.y + frame.height - y) }
      return sheet([{ side, shows, x: MARGIN, y: MARGIN }], rows * columns > 1 ? { row: row + 1, column: column + 1, rows, columns } : null)
    }))
}

function tilesFor(size: number, room: number): number {
  return size <= room ? 1 : Math.ceil((size - OVERLAP) / (room - OVERLAP))
}

/** Crosses at the corners of the drawing, and in the middle of every overlap, so that both sheets show the same ones. */
function registerMarks(box: FlatBox, frame: Frame, tiles: readonly PrintedSheet[]): FlatPoint[] {
  const inset = ROUND / 2
  const [low, high] = [-box.high - inset, -box.low + inset]
  const corners: FlatPoint[] = [[box.left - inset, low], [box.right + inset, low], [box.left - inset, high], [box.right + inset, high]]
  const starts = (of: 'x' | 'y') => [...new Set(tiles.flatMap(tile => tile.parts.map(part => part.shows[of])))].filter(at => at > frame[of])
  const across = starts('x').map(x => x + OVERLAP / 2)
  const down = starts('y').map(y => y + OVERLAP / 2)
  return [
    ...corners,
    ...across.flatMap((x): FlatPoint[] => [[x, low], [x, high]]),
    ...down.flatMap((y): FlatPoint[] => [[box.left - inset, y], [box.right + inset, y]]),
    ...across.flatMap(x => down.map((y): FlatPoint => [x, y])),
  ]
}
