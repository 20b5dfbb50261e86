import jsqr from 'jsqr'
import { expect, it } from 'vitest'
import { codeSquare } from '~/composables/shelf/code-square'

/** A square of unit squares as a camera sees it: so many points each, dark on light. */
function seen({ side, path }: { side: number, path: string }, points: number): { data: Uint8ClampedArray, width: number } {
  const width = side * points
  const data = new Uint8ClampedArray(width * width * 4).fill(255)
  for (const [, x, y] of path.matchAll(/M(\d+) (\d+)h1v1h-1z/g)) {
    for (let row = 0; row < points; row++) {
      for (let column = 0; column < points; column++) {
        const at = 4 * ((Number(y) * points + row) * width + Number(x) * points + column)
        data.fill(0, at, at + 3)
      }
    }
  }
  return { data, width }
}

it.each(['T-1A2B3C4D', '4006381333931', 'Lot K-204 / é'])('reads the code %s that the shelf prints for a bottle', async (code) => {
  const { data, width } = seen(await codeSquare(code), 4)
  expect(jsqr(data, width, width)?.data).toBe(code)
})
