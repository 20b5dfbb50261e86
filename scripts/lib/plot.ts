import { line, type LineStyle, LINES, patch, type Svg, words } from './svg'

/** One curve; its name stands at its end. */
export interface Curve {
  name: string
  points: readonly (readonly [x: number, y: number])[]
  style?: LineStyle
}

/** A scale of a plot: its ends and its marks. */
export interface Scale { from: number, to: number, marks: readonly number[], words: string }

const WIDTH = 720, HEIGHT = 380
const EDGE = { left: 56, right: 150, top: 34, bottom: 46 }

/** Curves over an axis, each named where it ends; the names keep apart. */
export function plotCurves(title: string, x: Scale, y: Scale, curves: readonly Curve[]): Svg {
  const right = WIDTH - EDGE.right, bottom = HEIGHT - EDGE.bottom
  const at = ([px, py]: readonly [number, number]): [number, number] => [
    EDGE.left + (px - x.from) / (x.to - x.from) * (right - EDGE.left),
    bottom - (Math.min(y.to, Math.max(y.from, py)) - y.from) / (y.to - y.from) * (bottom - EDGE.top),
  ]
  return {
    width: WIDTH, height: HEIGHT, title,
    parts: [
      ...y.marks.flatMap((mark) => {
        const [, level] = at([x.from, mark])
        return [line([[EDGE.left, level], [right, level]], 'grid'), words(EDGE.left - 8, level + 4, String(mark), 'end')]
      }),
      line([[EDGE.left, bottom], [right, bottom]], 'axis'),
      ...x.marks.map(mark => words(at([mark, y.from])[0], bottom + 18, String(mark), 'middle')),
      words((EDGE.left + right) / 2, HEIGHT - 8, x.words, 'middle'),
      words(EDGE.left - 44, 13, y.words),
      ...curves.map(({ points, style }, i) => line(points.map(at), style ?? LINES[i % LINES.length]!)),
      ...namesOf(curves.map(({ name, points }) => ({ name, level: at(points.at(-1)!)[1] }))).map(({ name, level }) => words(right + 8, level + 4, name, 'start', 'name')),
    ],
  }
}

const APART = 16

function namesOf(names: { name: string, level: number }[]): { name: string, level: number }[] {
  const sorted = [...names].sort((a, b) => a.level - b.level)
  let last = -Infinity
  const spread = sorted.map(({ name, level }) => {
    last = Math.max(level, last + APART)
    return { name, level: last }
  })
  const over = Math.max(0, last - (HEIGHT - EDGE.bottom))
  return spread.map(({ name, level }) => ({ name, level: level - over }))
}

/** One row of patches and its name. */
export interface PatchRow { name: string, fills: readonly string[] }

const NAMES = 170, ROW = 40, GAP = 6, HEAD = 26

/** A word over a row of patches, at a share of its length. */
export interface Head { text: string, at: number }

/** Heads over the middles of as many patches. */
export function headsOver(texts: readonly string[]): Head[] {
  return texts.map((text, i) => ({ text, at: (i + 0.5) / texts.length }))
}

/** Heads along a ribbon that runs from one value to another. */
export function headsAlong(from: number, to: number, marks: readonly number[]): Head[] {
  return marks.map(mark => ({ text: String(mark), at: (mark - from) / (to - from) }))
}

/** A row of more patches than this is a ribbon: no gaps, and a hair of overlap, or the page would shine through between them. */
const RIBBON_FROM = 20

/** Rows of patches under heads. */
export function plotPatches(title: string, heads: readonly Head[], rows: readonly PatchRow[], foot: string): Svg {
  const across = WIDTH - NAMES
  const height = HEAD + rows.length * (ROW + GAP) + 26
  return {
    width: WIDTH, height, title,
    parts: [
      ...heads.map(({ text, at }) => words(NAMES + at * across, 16, text, at <= 0 ? 'start' : at >= 1 ? 'end' : 'middle')),
      ...rows.flatMap(({ name, fills }, row) => {
        const top = HEAD + row * (ROW + GAP), width = across / fills.length
        const wide = (i: number) => fills.length < RIBBON_FROM ? width - 2 : Math.min(width + 1.5, across - i * width)
        return [words(0, top + ROW / 2 + 4, name, 'start', 'name'), ...fills.map((fill, i) => patch(NAMES + i * width, top, wide(i), ROW, fill))]
      }),
      words(NAMES + across / 2, height - 6, foot, 'middle'),
    ],
  }
}
