import { describe, expect, it } from 'vitest'
import { demoPaint } from '#server/seed/paints'
import { CARD_BLACK } from '#shared/optics/known-film'
import { cardOf, drawdown } from '#shared/shelf/drawdown'
import { opticsOfKnown } from '#shared/shelf/optics-of-known'
import { colourTyped, readColour } from '#shared/shelf/read-colour'
import { hasMasstone, reflectanceCurves } from '#shared/shelf/reflectance-curves'
import { thinning } from '#shared/shelf/thinning'

describe('thinning', () => {
  it('says 25 parts to 100 as 20 per cent of the mix, which is not the same figure', () => {
    expect(thinning(25, 28)).toMatchObject({ partsPer100: 25, shareOfMix: 20, drops: { paint: 4, reducer: 1 } })
    expect(thinning(25, 28).solidsOfMix).toBeCloseTo(22.4, 10)
  })

  it('finds few drops: half and half is one to one, none is none', () => {
    expect(thinning(100, 25).drops).toEqual({ paint: 1, reducer: 1 })
    expect(thinning(0, 25)).toMatchObject({ shareOfMix: 0, drops: { paint: 1, reducer: 0 } })
    expect(thinning(40, 25).drops).toEqual({ paint: 5, reducer: 2 })
  })

  it('refuses figures that are none', () => {
    expect(() => thinning(-1, 25)).toThrow(RangeError)
    expect(() => thinning(25, 0)).toThrow(RangeError)
  })
})

describe('a colour as it is typed', () => {
  it.each([
    ['52 24 38', [52, 24, 38]], ['52, 24.5, −38', [52, 24.5, -38]], ['L 52 a 24 b 38', [52, 24, 38]], ['lab(52 24 38)', [52, 24, 38]], [' 52;24;38 ', [52, 24, 38]],
  ])('reads %s as CIELAB', (typed, lab) => {
    expect(readColour(typed)).toEqual(lab)
  })

  it('reads CSS colours: white is L 100, and red is known by its Lab under D65', () => {
    expect(readColour('white')![0]).toBeCloseTo(100, 1)
    const red = readColour('#ff0000')!
    for (const [i, value] of [53.24, 80.09, 67.2].entries()) expect(red[i]).toBeCloseTo(value, 1)
  })

  it('does not read what is no colour, or none that a surface can have', () => {
    for (const typed of ['', 'reddish', '52 24', '200 0 0', '50 400 0']) expect(readColour(typed)).toBeNull()
  })

  it('is read back as it was written', () => {
    expect(readColour(colourTyped([42.3, -7, 11.9]))).toEqual([42.3, -7, 11.9])
  })
})

describe('a drawdown', () => {
  it('gets darker over white and no lighter than its own colour over black, pass by pass, with a glaze', () => {
    const steps = drawdown(opticsOfKnown(demoPaint('Olive green').known))
    const overWhite = steps.map(step => step.overWhite.lab[0])
    expect(overWhite).toEqual(overWhite.toSorted((a, b) => b - a))
    expect(Math.max(...steps.map(step => step.overBlack.lab[0]))).toBeLessThan(15)
  })

  it('shows the colours it was told, on the card they were read on', () => {
    const known = { how: 'two-swatches' as const, overBlack: [24, 8, 8] as [number, number, number], overWhite: [60, 20, 22] as [number, number, number], passes: 2, blackGround: [18, 0, 0] as [number, number, number] }
    const card = cardOf(known)
    expect(card.black).toEqual([18, 0, 0])
    const step = drawdown(opticsOfKnown(known), card, [2])[0]!
    expect(Math.hypot(...step.overBlack.lab.map((value, i) => value - known.overBlack[i]!))).toBeLessThan(0.5)
    expect(Math.hypot(...step.overWhite.lab.map((value, i) => value - known.overWhite[i]!))).toBeLessThan(0.5)
  })

  it('is deeper after the clear than before it', () => {
    const optics = opticsOfKnown(demoPaint('Candy red').known)
    const [before] = drawdown(optics, cardOf(), [2], 'matt')
    const [after] = drawdown(optics, cardOf(), [2], 'gloss')
    expect(after!.overBlack.lab[0]).toBeLessThan(before!.overBlack.lab[0])
  })

  it('has a face and a flop only where there are flakes', () => {
    expect(drawdown(opticsOfKnown(demoPaint('Lilac flash').known), cardOf(), [2])[0]!.overBlack.face).toBeDefined()
    expect(drawdown(opticsOfKnown(demoPaint('Umber').known), cardOf(), [2])[0]!.overBlack.face).toBeUndefined()
  })
})

describe('reflectance curves', () => {
  it('show an opaque red sending back far more at the red end, thick or over either ground', () => {
    const curves = reflectanceCurves(opticsOfKnown(demoPaint('Signal red').known), cardOf(), 2)
    expect(curves.map(curve => curve.key)).toEqual(['masstone', 'over white', 'over black'])
    for (const { values } of curves) {
      expect(values).toHaveLength(36)
      expect(values[30]!).toBeGreaterThan(3 * values[10]!)
    }
  })

  it('give a dye no colour of its own when thick', () => {
    expect(hasMasstone(opticsOfKnown(demoPaint('Candy red').known))).toBe(false)
    expect(hasMasstone(opticsOfKnown(demoPaint('Umber').known))).toBe(true)
  })

  it('of nothing at all are those of the bare card', () => {
    const [white, black] = reflectanceCurves(opticsOfKnown({ how: 'clear', yellowing: 0 }), cardOf(), 2)
    expect(white!.values[18]!).toBeGreaterThan(0.7)
    expect(black!.values[18]!).toBeLessThan(0.03)
    expect(CARD_BLACK[0]).toBe(10)
  })
})
