/** Side of a bin on the flat surface, mm. */
const BIN = 3

/** What touches each bin of the flat surface: items of bin b are `items[start[b]] … items[start[b + 1] - 1]`, in rising order. */
export interface Bins {
  left: number
  low: number
  columns: number
  rows: number
  start: Int32Array
  items: Int32Array
}

/** Sorts boxes into bins. `boxes` holds left, low, right, high of each item, mm, reach included. */
export function binned(boxes: ArrayLike<number>): Bins {
  const count = boxes.length / 4
  let [left, low, right, high] = [Infinity, Infinity, -Infinity, -Infinity]
  for (let i = 0; i < count; i++) {
    left = Math.min(left, boxes[4 * i] ?? 0)
    low = Math.min(low, boxes[4 * i + 1] ?? 0)
    right = Math.max(right, boxes[4 * i + 2] ?? 0)
    high = Math.max(high, boxes[4 * i + 3] ?? 0)
  }
  if (count === 0) return { left: 0, low: 0, columns: 0, rows: 0, start: new Int32Array(1), items: new Int32Array(0) }
  const columns = Math.floor((right - left) / BIN) + 1
  const rows = Math.floor((high - low) / BIN) + 1
  const eachBin = (i: number, visit: (bin: number) => void) => {
    const [c0, r0, c1, r1] = [0, 1, 2, 3].map(k => Math.floor(((boxes[4 * i + k] ?? 0) - (k % 2 === 0 ? left : low)) / BIN)) as [number, number, number, number] // four
    for (let row = r0; row <= r1; row++) for (let column = c0; column <= c1; column++) visit(row * columns + column)
  }
  const start = new Int32Array(columns * rows + 1)
  for (let i = 0; i < count; i++) {
    eachBin(i, (bin) => {
      start[bin + 1] = (start[bin + 1] ?? 0) + 1
    })
  }
  for (let bin = 0; bin < columns * rows; bin++) start[bin + 1] = (start[bin + 1] ?? 0) + (start[bin] ?? 0)
  const items = new Int32Array(start[columns * rows] ?? 0)
  const next = start.slice()
  for (let i = 0; i < count; i++) {
    eachBin(i, (bin) => {
      items[next[bin] ?? 0] = i
      next[bin] = (next[bin] ?? 0) + 1
    })
  }
  return { left, low, columns, rows, start, items }
}

/** The bin of a place, or -1 where nothing lies near. */
export function binAt(bins: Bins, U: number, V: number): number {
  const column = Math.floor((U - bins.left) / BIN)
  const row = Math.floor((V - bins.low) / BIN)
  return column >= 0 && row >= 0 && column < bins.columns && row < bins.rows ? row * bins.columns + column : -1
}

/** U of the middle of a bin. */
export const middleU = (bins: Bins, bin: number) => bins.left + (bin % bins.columns + 0.5) * BIN

/** V of the middle of a bin. */
export const middleV = (bins: Bins, bin: number) => bins.low + (Math.floor(bin / bins.columns) + 0.5) * BIN
