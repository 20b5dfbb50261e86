import type { PictureEngine } from '#shared/picture/engine/picture-engine'
import { plainEngine } from '#shared/picture/engine/plain-engine'
import { pictureBench } from '#shared/picture/picture-bench'
import type { PictureWish } from '#shared/picture/picture-options'
import { demoWall } from '../../fixtures/demo-looks'
import type { Asked } from './random-stacks'

const SIZE = { width: 240, height: 120 }
/** How one finish is looked at beside the plain way: other sides, other lights, before the clear, without form. */
const WISHES: readonly PictureWish[] = [
  { ...SIZE, roll: 90, light: 'face' },
  { ...SIZE, roll: 180, light: 'flop' },
  { ...SIZE, clear: false },
  { ...SIZE, plain: true, light: { tilt: 25 } },
]

/** What the pictures of one finish ask an engine for: the whole picture, and the edges that are refined. */
export function* demoPictures(name: string): Generator<Asked> {
  const look = demoWall.get(name)!
  const isFirst = name === [...demoWall.keys()][0]
  for (const wish of isFirst ? [SIZE, ...WISHES] : [SIZE]) {
    const asked: Asked[] = []
    const plain = plainEngine()
    const listening: PictureEngine = {
      ...plain,
      light(kit, ask) {
        asked.push({ kit, ask })
        return plain.light(kit, ask)
      },
    }
    pictureBench('edits', listening).draw(look, wish)
    yield* asked
  }
}
