/** Area inside an outline, mm²; positive when it goes round counter-clockwise. */
export function signedArea(xs: ArrayLike<number>, ys: ArrayLike<number>): number {
  let sum = 0
  for (let i = 0; i < xs.length; i++) {
    const j = (i + 1) % xs.length
    sum += xs[i]! * ys[j]! - xs[j]! * ys[i]!
  }
  return sum / 2
}

/**
 * Cuts the inside of an outline into triangles, counter-clockwise, by taking off ears. An outline that crosses itself still ends, with
 * triangles that may overlap there.
 *
 * @returns three numbers of outline points a triangle
 */
export function triangulate(xs: ArrayLike<number>, ys: ArrayLike<number>): Uint32Array {
  const left = Array.from({ length: xs.length }, (_, i) => i)
  if (signedArea(xs, ys) < 0) left.reverse()
  const out: number[] = []
  const turn = (a: number, b: number, c: number) => (xs[b]! - xs[a]!) * (ys[c]! - ys[a]!) - (ys[b]! - ys[a]!) * (xs[c]! - xs[a]!)
  const isEar = (a: number, b: number, c: number) => turn(a, b, c) > 0 && left.every(p => p === a || p === b || p === c
    || turn(a, b, p) < 0 || turn(b, c, p) < 0 || turn(c, a, p) < 0)
  while (left.length > 2) {
    const count = left.length
    const at = left.findIndex((b, i) => isEar(left[(i + count - 1) % count]!, b, left[(i + 1) % count]!))
    const i = Math.max(0, at)
    // Without an ear the rest is flat or crosses itself: what has no inside gets no triangle.
    if (at >= 0) out.push(left[(i + count - 1) % count]!, left[i]!, left[(i + 1) % count]!)
    left.splice(i, 1)
  }
  return Uint32Array.from(out)
}
