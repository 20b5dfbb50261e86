import { describe, expect, it } from 'vitest'
import { candidates } from '#shared/scheme/find/candidates'
import { mayShareCup } from '#shared/scheme/find/cup-of'
import { rowFor, whereOf } from '#shared/scheme/find/place'
import { proposedCoat } from '#shared/scheme/find/proposed-coat'
import { typedColour } from '#shared/scheme/find/typed-colour'
import { applyEdit } from '#shared/scheme/edits'
import { passStrength } from '#shared/scheme/pass-strength'
import { perch as look } from '../../../fixtures/demo-looks'

describe('a typed colour', () => {
  it.each([
    ['52 -8 24', [52, -8, 24]], ['52,3 -8,1 24', [52.3, -8.1, 24]], ['52,3; −8,1; 24,0', [52.3, -8.1, 24]], ['Lab 52.3 -8.1 24', [52.3, -8.1, 24]],
    ['52.3, -8.1, 24', [52.3, -8.1, 24]], ['#777777', [50, 0, 0]], ['white', [100, 0, 0]],
  ])('is read as a painter writes it: %s', (typed, lab) => {
    typedColour(typed)!.forEach((value, i) => expect(Math.abs(value - lab[i]!)).toBeLessThan(1.5))
  })
  it.each(['', 'evening water', '52 -8', '52,3 -8,1', '400 0 0', 'number 7', '1,2,3,4'])('is not made up where there is none: %s', (typed) => {
    expect(typedColour(typed)).toBeNull()
  })
})

const { body, materials } = look
const paint = (name: string) => materials.paints.find(each => each.name === name)!

describe('paints to look through', () => {
  it('are those that lay colour and are there; put-away and empty ones only when asked for', () => {
    const [first, second] = materials.paints.filter(each => each.kind !== 'clear' && each.kind !== 'sealer')
    const stock = [{ id: first!.id, retired: true, volumeLeft: 40 }, { id: second!.id, retired: false, volumeLeft: 0 }]
    const here = candidates(materials.paints, stock, false).map(each => each.id)
    expect(here).not.toContain(first!.id)
    expect(here).not.toContain(second!.id)
    expect(candidates(materials.paints, stock, true).map(each => each.id)).toEqual(expect.arrayContaining([first!.id, second!.id]))
    expect(candidates(materials.paints, [], true).some(({ id }) => materials.paints.find(each => each.id === id)!.kind === 'clear')).toBe(false)
  })
  it('share a cup only with their own base', () => {
    expect(mayShareCup([{ base: 'water' }, { base: 'water' }])).toBe(true)
    expect(mayShareCup([{ base: 'water' }, { base: 'solvent' }])).toBe(false)
    expect(mayShareCup([{ base: 'epoxy' }, { base: 'uv-resin' }])).toBe(false)
  })
})

describe('where a found coat goes', () => {
  it('is under the clear and clear of every mask, or right above the chosen coat', () => {
    const clearRow = body.stack.findIndex(item => item.act === 'coat' && item.coat.mix.parts.every(part => materials.paints.find(each => each.id === part.paintId)?.kind === 'clear'))
    const top = rowFor(body, materials, 'top', null)
    expect(body.stack.slice(0, top).every(item => item.act !== 'coat' || item.coat.mix.parts.some(part => materials.paints.find(each => each.id === part.paintId)?.kind !== 'clear'))).toBe(true)
    if (clearRow >= 0) expect(top).toBeLessThanOrEqual(clearRow)
    const fitted = (row: number) => body.stack.slice(0, row).reduce((sum, item) => sum + (item.act === 'fit' ? 1 : item.act === 'lift' ? -1 : 0), 0)
    expect(fitted(top)).toBe(0)
    const first = body.stack.findIndex(item => item.act === 'coat')
    const item = body.stack[first]!
    expect(item.act === 'coat' && rowFor(body, materials, 'above', item.coat.id)).toBe(first + 1)
    expect(rowFor(body, materials, 'above', 'no such coat')).toBe(top)
  })
  it('lies on the zones that were chosen, fins by themselves', () => {
    expect(whereOf(['upper-flank', 'back'])).toMatchObject({ body: true, zones: ['upper flank', 'back'], fins: [] })
    expect(whereOf(['fin:dorsal'])).toMatchObject({ body: false, zones: [], fins: [{ fin: 'dorsal', on: 'whole' }] })
  })
})

describe('a proposal laid as a coat', () => {
  const two = materials.paints.filter(each => each.optics.kind === 'film' && each.base === 'water').slice(0, 2)
  const parts = two.map((each, i) => ({ id: each.id, drops: i === 0 ? 3 : 2 }))
  it('keeps its proportions and is thinned as usual, so that a pass lays the film that was promised', () => {
    const coat = proposedCoat(crypto.randomUUID(), { parts, passes: 2 }, whereOf(['back']), materials.paints, () => 7, '  as the old one ')!
    expect(coat.mix.parts.map(part => part.drops)).toEqual([12, 8])
    expect(passStrength(coat, materials)).toBeCloseTo(1, 1)
    expect(coat).toMatchObject({ passes: 2, rest: 7, note: 'as the old one' })
    expect(applyEdit(body, { do: 'add-coat', coat, row: rowFor(body, materials, 'top', null) }).ok).toBe(true)
  })
  it('is none when a paint of it is gone', () => {
    expect(proposedCoat('x', { parts: [...parts, { id: 'gone', drops: 1 }], passes: 1 }, whereOf([]), materials.paints, () => 5)).toBeNull()
    expect(paint(two[0]!.name)).toBeDefined()
  })
})
