import { describe, expect, it } from 'vitest'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { PART_BODY, PART_NONE } from '#shared/blank/view-sample-lists'
import { fitView, viewSamples } from '#shared/blank/view-samples'
import { labFromXyz } from '#shared/optics/colorimetry'
import { deltaE2000 } from '#shared/optics/delta-e'
import { flakeGeometry } from '#shared/optics/flake-angles'
import { groundFromLab } from '#shared/optics/known-film'
import { xyzFromLinearRgb } from '#shared/optics/screen-colour'
import { promise } from '#shared/optics/stack'
import { toPictureBands } from '#shared/optics/to-picture-bands'
import { coatTable } from '#shared/picture/coat-table'
import { depositKeep, depositMap } from '#shared/picture/deposit-map'
import { SEEN_DAYLIGHT } from '#shared/picture/engine/seen-daylight'
import type { Look } from '#shared/picture/look'
import { shownCoats } from '#shared/picture/shown-coats'
import { bodySheet, sheetPlace } from '#shared/picture/turn/body-sheet'
import { finLayout, finSheet, finSheetPlace } from '#shared/picture/turn/fin-sheet'
import { groupOf, rowWeights } from '#shared/picture/turn/flake-groups'
import { fromHalf, toHalf } from '#shared/picture/turn/half-float'
import { paintSheet, type PaintSheet } from '#shared/picture/turn/paint-sheet'
import { zonePlaces } from '#shared/picture/zone-places'
import { ember, perch, roach } from '../../../fixtures/demo-looks'

const LOOKS = [['perch, gold pearl under glazes', perch], ['roach, silver scales over black', roach], ['ember, fluorescents', ember]] as const
/** Texels to the mm: enough for every zone to have hundreds. */
const SCALE = 0.9
const all = { upTo: 'all', clear: true } as const

const kept = new Map<Look, ReturnType<typeof layOut>>()

/** A look laid on the sheet of its blank's body. */
function laidOut(look: Look): ReturnType<typeof layOut> {
  const found = kept.get(look) ?? layOut(look)
  kept.set(look, found)
  return found
}

function layOut(look: Look) {
  const blank = prepareBlank(look.materials.blank.shape)
  const samples = bodySheet(blank, SCALE)
  const keep = depositKeep(samples, blank)
  const laid = shownCoats(look, all).map(coat => ({ coat, map: depositMap(keep, coat.laid) }))
  const ground = groundFromLab(look.body.ground.colour, look.body.ground.finish)
  const coats = laid.map(({ coat, map }) => ({ codes: map.codes, table: coatTable(coat.paint, coat.passes * map.peak) }))
  const sheet = finished(paintSheet(samples.count, { coats, ground: toPictureBands(ground), sparkle: new Float32Array(samples.count), seen: SEEN_DAYLIGHT }))
  return { blank, samples, laid, ground, sheet }
}

function finished<T>(steps: Generator<undefined, T, undefined>): T {
  for (;;) {
    const { done, value } = steps.next()
    if (done) return value
  }
}

/** What a texel shows evenly lit, flakes at 45° from their gloss. */
function texelLab({ base, flakes }: PaintSheet, i: number) {
  const rgb = [0, 1, 2].map(c => fromHalf(base[4 * i + c]!)) as [number, number, number] // three by the list
  for (const { sigma, rows } of flakes) {
    const { gain, cosine } = flakeGeometry(45, sigma)
    rowWeights(cosine).forEach((weight, r) => rgb.forEach((_, c) => rgb[c]! += gain * weight * fromHalf(rows[r]![4 * i + c]!)))
  }
  return labFromXyz(xyzFromLinearRgb(rgb))
}

// A machine that does other work besides takes its time over a whole finish.
describe('colours on the sheets of a blank', { timeout: 60_000 }, () => {
  it.each(LOOKS)('are what is promised for the coats that lie there: %s', (_, look) => {
    const { blank, samples, laid, ground, sheet } = laidOut(look)
    const far: number[] = []
    for (const { samples: places } of zonePlaces(blank, samples)) {
      for (const i of [0.2, 0.5, 0.8].map(share => places[Math.floor(share * places.length)]!)) {
        const coats = laid.map(({ coat, map }) => ({ optics: coat.paint, passes: coat.passes * map.peak * (map.codes[i]! / 255) ** 2 }))
        far.push(deltaE2000(texelLab(sheet, i), promise({ ground, coats: coats.filter(({ passes }) => passes > 1e-4), finish: 'gloss' }).lab))
      }
    }
    expect(far.length).toBeGreaterThan(15)
    expect(Math.max(...far)).toBeLessThan(0.5)
  })

  it.each(LOOKS)('are those of the side view, place by place: %s', (_, look) => {
    const blank = prepareBlank(look.materials.blank.shape)
    const view = viewSamples(blank, fitView(blank, { width: 300, height: 150 }))
    const sheet = bodySheet(blank, SCALE)
    let [most, seen] = [0, 0]
    for (let i = 0; i < view.count; i += 37) {
      if (view.part[i] !== PART_BODY || view.coverage[i]! < 1) continue
      const [right, down] = sheetPlace(view.u[i]!, view.v[i]!, 1)
      const at = Math.floor(down * sheet.height) * sheet.width + Math.floor(right * sheet.width)
      most = Math.max(most, Math.abs(sheet.U[at]! - view.U[i]!), Math.abs(sheet.V[at]! - view.V[i]!))
      seen++
    }
    expect(seen).toBeGreaterThan(150)
    expect(most).toBeLessThan(0.75 / SCALE)
  })

  it('meet along the back without a seam, bars cut for one flank too', () => {
    const { samples, laid } = laidOut(perch)
    const { width, height } = samples
    // A net is fitted to each flank by hand; what it lets through need not meet.
    const withoutNet = laid.filter(({ coat }) => coat.laid.masks.every(mask => mask.form.kind !== 'mesh'))
    expect(withoutNet.some(({ coat }) => coat.laid.masks.length > 0 || coat.laid.coat.marks.length > 0)).toBe(true)
    const jumps = withoutNet.map(({ map: { codes } }) => {
      let [across, along] = [0, 0]
      for (let column = 2; column < width - 2; column++) {
        across += Math.abs(codes[column]! - codes[(height - 1) * width + column]!)
        along += Math.abs(codes[width + column]! - codes[column]!)
      }
      return (across - along) / width
    })
    expect(Math.max(...jumps)).toBeLessThan(4)
  })

  it('lie opposite on the right flank, mirrored: an outline of the left is found again', () => {
    const { samples, laid } = laidOut(perch)
    const { width, height } = samples
    const stencilled = laid.filter(({ coat }) => coat.laid.coat.marks.length > 0 || coat.laid.masks.some(mask => mask.form.kind !== 'mesh'))
    expect(stencilled.length).toBeGreaterThan(0)
    for (const { map: { codes } } of stencilled) {
      let [same, upsideDown] = [0, 0]
      for (let row = 0; row < height / 2; row++) {
        for (let column = 0; column < width; column++) {
          const left = codes[row * width + column]!
          same += Math.abs(left - codes[(height - 1 - row) * width + column]!)
          upsideDown += Math.abs(left - codes[(height / 2 + row) * width + column]!)
        }
      }
      expect(same).toBeLessThan(0.5 * upsideDown)
    }
  })

  it('are found on both faces of a fin at the same place', () => {
    const blank = prepareBlank(perch.materials.blank.shape)
    const layout = finLayout(blank)!
    const sheet = finSheet(blank, layout, 4)
    blank.fins.forEach((fin, index) => {
      const [x, y] = [(fin.left + fin.right) / 2, (fin.low + fin.high) / 2]
      for (const side of [1, -1] as const) {
        const [right, down] = finSheetPlace(layout, fin, index, x, y, side)
        const at = Math.floor(down * sheet.height) * sheet.width + Math.floor(right * sheet.width)
        expect(sheet.part[at]).not.toBe(PART_NONE)
        expect(sheet.side[at]).toBe(side)
        expect(sheet.U[at]! + fin.rootX).toBeCloseTo(x, 0)
        expect(sheet.V[at]! + fin.rootY).toBeCloseTo(y, 0)
      }
    })
  })

  it('travel between three rows as they do between the six of a coat', () => {
    for (const x of [0, 0.2, 0.5, 0.8, 1]) {
      const weights = rowWeights(1 - 0.3 * x)
      expect(weights.reduce((sum, weight) => sum + weight)).toBeCloseTo(1, 12)
    }
    expect(rowWeights(0.85)).toEqual([expect.closeTo(0, 9), expect.closeTo(1, 9), expect.closeTo(0, 9)])
    expect(groupOf([8, 12], 9)).toBe(0)
  })

  it('keep three figures as half floats', () => {
    for (const value of [0, 1, -0.25, 0.18, 3.7, 1e-3, 400]) expect(Math.abs(fromHalf(toHalf(value)) - value)).toBeLessThanOrEqual(5e-4 * Math.abs(value))
    expect(fromHalf(toHalf(1e9))).toBe(65504)
  })
})
