import sharp from 'sharp'
import type { SeenWish } from '../../shared/optics/seen-wish'
import { renderLook } from '../../shared/picture/render'
import { ember, perch } from '../../tests/fixtures/demo-looks'

type Look = typeof perch

const WIDTH = 480, HEIGHT = 200
const DEPTHS = [0, 2, 5, 10]

function inWater(depth: number, adapted: boolean): SeenWish {
  return depth === 0 ? { light: 'D65' } : { light: 'D65', water: { type: '3C', depth, distance: 1, adapted } }
}

/** Looks painted side by side, as a WebP file. */
async function sheet(columns: number, cells: readonly { look: Look, seen: SeenWish }[]): Promise<Buffer> {
  const painted = cells.map(({ look, seen }) => Buffer.from(renderLook(look, { width: WIDTH, height: HEIGHT, seen }).rgba.buffer))
  return sharp({ create: { width: columns * WIDTH, height: Math.ceil(cells.length / columns) * HEIGHT, channels: 3, background: { r: 119, g: 119, b: 119 } } })
    .composite(painted.map((input, i) => ({ input, raw: { width: WIDTH, height: HEIGHT, channels: 4 as const }, left: i % columns * WIDTH, top: Math.floor(i / columns) * HEIGHT })))
    .webp({ quality: 86 }).toBuffer()
}

/** The painted pictures of docs/optics.md by the name of their file in docs/pictures. */
export async function opticsPictures(): Promise<Record<string, Buffer>> {
  return {
    // Rows: as a camera set for daylight sees it, and an eye used to the water; columns: deeper.
    'optics-depths.webp': await sheet(2, DEPTHS.flatMap(depth => [{ look: ember, seen: inWater(depth, false) }, { look: ember, seen: inWater(depth, true) }])),
    'optics-bass.webp': await sheet(2, [perch, ember].flatMap(look => [{ look, seen: { light: 'D65' as const } }, { look, seen: { light: 'D65' as const, eye: 'bass' as const } }])),
  }
}
