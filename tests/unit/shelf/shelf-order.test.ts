import { describe, expect, it } from 'vitest'
import type { PaintListItem } from '#shared/shelf/paint-view'
import { ANYTHING, findPaints, isNarrowed, sortPaints } from '#shared/shelf/sort-shelf'

const paint = (name: string, more: Partial<PaintListItem> = {}): PaintListItem => ({
  id: name, opticsId: name, name, kind: 'opaque', base: 'water', known: { how: 'masstone-hide', masstone: [50, 0, 0], passesToHide: 4 },
  reducerPer100: 25, filmPerPass: 4, volumeSolids: 25, density: 1.05, restMinutes: 5, hazards: [], volumeLeft: 30,
  swatches: { masstone: '#777777', overBlack: '#777777', overWhite: '#777777', words: 'mid grey', lab: [50, 0, 0] },
  trust: { level: 2, words: '' }, retired: false, version: 1, changedAt: '2026-01-01T00:00:00Z', schemes: 0, bottles: 1, ...more,
})
const coloured = (name: string, lab: [number, number, number], words: string) =>
  paint(name, { swatches: { masstone: '#777777', overBlack: '#777777', overWhite: '#777777', words, lab } })

const SHELF = [
  paint('Umber', { kind: 'semi-opaque', volumeLeft: 71, schemes: 4 }),
  paint('Candy red', { kind: 'candy', known: { how: 'dye-over-white', overWhite: [42, 62, 36], passes: 2, haze: 0 }, volumeLeft: 6, schemes: 9 }),
  paint('Sanding sealer', { kind: 'sealer', base: 'solvent', known: { how: 'clear', yellowing: 0 }, volumeLeft: 400 }),
  paint('Old tan', { retired: true }),
]
const names = (paints: readonly PaintListItem[]) => paints.map(one => one.name)

describe('looking through the shelf', () => {
  it('finds everything in use when nothing is asked, and keeps retired paints out', () => {
    expect(names(findPaints(SHELF, ANYTHING))).toEqual(['Umber', 'Candy red', 'Sanding sealer'])
    expect(isNarrowed(ANYTHING)).toBe(false)
  })

  it('finds every word in the name, the kind, the carrier, the way of knowing or the colour', () => {
    const found = (words: string) => names(findPaints(SHELF, { ...ANYTHING, words }))
    expect(found('candy')).toEqual(['Candy red'])
    expect(found('SOLVENT')).toEqual(['Sanding sealer'])
    expect(found('white only red')).toEqual(['Candy red'])
    expect(found('grey umber')).toEqual(['Umber'])
    expect(found('candy umber')).toEqual([])
  })

  it('narrows by kind, by carrier, by how the colour is known, and to what is retired', () => {
    expect(names(findPaints(SHELF, { ...ANYTHING, kind: 'semi-opaque' }))).toEqual(['Umber'])
    expect(names(findPaints(SHELF, { ...ANYTHING, base: 'solvent' }))).toEqual(['Sanding sealer'])
    expect(names(findPaints(SHELF, { ...ANYTHING, how: 'dye-over-white' }))).toEqual(['Candy red'])
    expect(names(findPaints(SHELF, { ...ANYTHING, retired: true }))).toEqual(['Old tan'])
  })
})

describe('the order of the shelf', () => {
  it('is by name, by what is left with the least first, or by use with the most first', () => {
    expect(names(sortPaints(SHELF, 'name'))).toEqual(['Candy red', 'Old tan', 'Sanding sealer', 'Umber'])
    expect(names(sortPaints(SHELF, 'left'))[0]).toBe('Candy red')
    expect(names(sortPaints(SHELF, 'schemes')).slice(0, 2)).toEqual(['Candy red', 'Umber'])
  })

  it('goes round the hues from red over yellow to blue, with greys at the end from light to dark', () => {
    const shelf = [
      coloured('black', [8, 0, 0], 'black'), coloured('blue', [40, 5, -45], 'blue'), coloured('yellow', [85, 0, 80], 'yellow'),
      coloured('white', [95, 0, 2], 'white'), coloured('red', [42, 58, 36], 'red'),
    ]
    expect(names(sortPaints(shelf, 'colour'))).toEqual(['red', 'yellow', 'blue', 'white', 'black'])
  })

  it('leaves the shelf it was given as it was', () => {
    const before = names(SHELF)
    sortPaints(SHELF, 'left')
    expect(names(SHELF)).toEqual(before)
  })
})
