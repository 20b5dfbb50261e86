import { describe, expect, it } from 'vitest'
import { DEMO_PAINTS, demoPaint, type DemoPaintName } from '#server/seed/paints'
import { opticsOfKnown } from '#shared/shelf/optics-of-known'
import { PaintDraft } from '#shared/shelf/paint'
import { paintSwatches } from '#shared/shelf/paint-swatches'
import { paintTrust } from '#shared/shelf/paint-trust'
import { sureWords } from '#shared/shelf/paint-words'

const swatchesOf = (name: DemoPaintName) => paintSwatches(opticsOfKnown(demoPaint(name).known))

describe('the swatches of a paint', () => {
  it.each(Object.keys(DEMO_PAINTS) as DemoPaintName[])('can be made of the demo paint %s, which a person could have typed', (name) => {
    expect(PaintDraft.parse(demoPaint(name)).name).toBe(name)
    expect(swatchesOf(name).masstone).toMatch(/^#[0-9a-f]{6}$/)
  })

  it('show a see-through paint nearly black over black and coloured over white', () => {
    const candy = swatchesOf('Candy red')
    expect(lightness(candy.overBlack)).toBeLessThan(0.2)
    expect(lightness(candy.overWhite)).toBeGreaterThan(0.35)
  })

  it('show an opaque paint nearly the same over both once it hides', () => {
    const optics = opticsOfKnown({ how: 'masstone-hide', masstone: [50, 20, 20], passesToHide: 1 })
    const { overBlack, overWhite } = paintSwatches(optics)
    expect(Math.abs(lightness(overBlack) - lightness(overWhite))).toBeLessThan(0.03)
  })

  it('show a pearl brighter at its face than at its flop', () => {
    const silver = swatchesOf('Silver pearl')
    expect(lightness(silver.face!)).toBeGreaterThan(lightness(silver.flop!) + 0.15)
  })

  it('say how sure they are: a hiding red more than a pearl that was worked out from its flake', () => {
    const red = swatchesOf('Signal red'), pearl = swatchesOf('Silver pearl')
    expect(red.sure!.overWhite.most).toBeGreaterThan(red.sure!.overWhite.typical)
    expect(pearl.sure!.overBlack.typical).toBeGreaterThan(red.sure!.overWhite.typical)
    expect(sureWords(red)).toMatch(/^Typically within [\d.]+, mostly within \d+\.$/)
    expect(sureWords({})).toBe('')
  })

  it('say which colours a screen cannot show', () => {
    expect(paintSwatches(opticsOfKnown({ how: 'dye-over-white', overWhite: [60, 85, 95], passes: 2, haze: 0.01 })).unshown).toBe(true)
    expect(swatchesOf('Silver pearl').unshown).toBeUndefined()
  })

  it('put the masstone where it was typed', () => {
    const [L, a, b] = swatchesOf('Signal red').lab
    expect(Math.hypot(L - 42, a - 58, b - 36)).toBeLessThan(1)
  })
})

describe('trust in a paint', () => {
  it('is highest over two grounds and falls when the swatches contradict each other', () => {
    const known = { how: 'two-swatches', overBlack: [30, 10, 10], overWhite: [60, 20, 20], passes: 1 } as const
    expect(paintTrust({ ...known, overBlack: [...known.overBlack], overWhite: [...known.overWhite] }, { clipped: false }).level).toBe(3)
    expect(paintTrust({ ...known, overBlack: [...known.overBlack], overWhite: [...known.overWhite] }, { clipped: true }).level).toBe(2)
  })
})

function lightness(hex: string): number {
  return (parseInt(hex.slice(1, 3), 16) + parseInt(hex.slice(3, 5), 16) + parseInt(hex.slice(5, 7), 16)) / 765
}
