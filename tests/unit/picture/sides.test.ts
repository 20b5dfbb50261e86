import { describe, expect, it } from 'vitest'
import { depositKeep, depositMap } from '#shared/picture/deposit-map'
import { fitView, viewSamples } from '#shared/blank/view-samples'
import { pictureBench } from '#shared/picture/picture-bench'
import { PICTURE_SIDES, sideShown, type PictureSide } from '#shared/picture/picture-sides'
import { perch } from '../../fixtures/demo-looks'
import { coatOf, maskOf, shad } from './deposit/bench'

const SIZE = { width: 240, height: 120, surround: null } as const
const SIDES = Object.keys(PICTURE_SIDES) as PictureSide[]
const bench = pictureBench()
const pictures = Object.fromEntries(SIDES.map(side => [side, bench.draw(perch, { ...SIZE, ...PICTURE_SIDES[side] })])) as Record<PictureSide, ReturnType<typeof bench.draw>>

/** Share of a picture's pixels whose coverage is as in another, mirrored or not. */
function alikeOutline(a: Uint8ClampedArray, b: Uint8ClampedArray, isMirrored: boolean): number {
  let alike = 0
  for (let row = 0; row < SIZE.height; row++) {
    for (let column = 0; column < SIZE.width; column++) {
      const other = isMirrored ? SIZE.width - 1 - column : column
      if (Math.abs(a[4 * (row * SIZE.width + column) + 3]! - b[4 * (row * SIZE.width + other) + 3]!) < 24) alike++
    }
  }
  return alike / (SIZE.width * SIZE.height)
}

describe('the four sides', { timeout: 30_000 }, () => {
  it('the right flank stands upright: its outline is the left flank’s seen in a mirror', () => {
    const [left, right] = [pictures['left flank'].rgba, pictures['right flank'].rgba]
    expect(alikeOutline(left, right, true)).toBeGreaterThan(0.995)
    expect(alikeOutline(left, right, false)).toBeLessThan(0.95)
  })

  it('has its dark back above and its pale belly below on both flanks, and light from above', () => {
    for (const side of ['left flank', 'right flank'] as const) {
      const { rgba } = pictures[side]
      const column = SIZE.width / 2
      const seen = Array.from({ length: SIZE.height }, (_, row) => 4 * (row * SIZE.width + column)).filter(at => rgba[at + 3] === 255)
      const mean = (list: number[]) => list.reduce((sum, at) => sum + rgba[at + 2]!, 0) / list.length
      const fifth = Math.floor(seen.length / 5)
      expect(mean(seen.slice(-fifth))).toBeGreaterThan(1.4 * mean(seen.slice(0, fifth)))
    }
  })

  it('back and belly show what they are: the one dark, the other pale', () => {
    const middle = ({ rgba }: { rgba: Uint8ClampedArray }) => rgba[4 * (SIZE.height / 2 * SIZE.width + SIZE.width / 2) + 2]!
    expect(middle(pictures.belly)).toBeGreaterThan(1.5 * middle(pictures.back))
  })

  it('a stencil turned over for the right flank lies in register, within the quarter of a millimetre of a hand', () => {
    const stencil = maskOf({
      kind: 'stencil', does: 'opens', outlines: [[[0.4, 0.25], [0.6, 0.25], [0.6, 0.6], [0.4, 0.6]]], soft: 0.05, wobble: 0,
    })
    const middles = (['left flank', 'right flank'] as const).map((side) => {
      const samples = viewSamples(shad, fitView(shad, { width: 320, height: 160, ...PICTURE_SIDES[side] }))
      const keep = depositKeep(samples, shad)
      const { codes } = depositMap(keep, { coat: coatOf({ tool: { kind: 'brush' } }), masks: [stencil] })
      let [weight, along, round] = [0, 0, 0]
      for (const i of keep.onBody) {
        const open = codes[i]! > 128 ? samples.coverage[i]! : 0
        weight += open
        along += open * samples.U[i]!
        round += open * samples.V[i]!
      }
      expect(weight).toBeGreaterThan(100)
      return [along / weight, round / weight]
    })
    expect(Math.hypot(middles[0]![0]! - middles[1]![0]!, middles[0]![1]! - middles[1]![1]!)).toBeLessThan(0.4)
  })

  it('a turn is named after the side it holds up', () => {
    for (const side of SIDES) expect(sideShown(PICTURE_SIDES[side])).toBe(side)
    expect(sideShown({ roll: -90, nose: 'left' })).toBe('belly')
    expect(sideShown({ roll: 180, nose: 'left' })).toBeUndefined()
    expect(sideShown({ roll: 35, nose: 'left' })).toBeUndefined()
  })
})
