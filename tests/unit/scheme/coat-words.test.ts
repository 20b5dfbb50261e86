import { describe, expect, it } from 'vitest'
import type { Coat } from '#shared/scheme/coat'
import { coatLine, gunWords, listWords, marksWords, masksWords, mixWords, placeWords, restWords, toolWords, whereWords } from '#shared/scheme/coat-words'
import { body, coat, id, paint } from './bodies'

const where = (more: Partial<Coat['where']> = {}): Coat['where'] => ({ body: true, zones: [], reach: 0, edge: 'fades', fins: [], ...more })

describe('where a coat lies, in words', () => {
  it.each<[Coat['where'], string]>([
    [where(), 'the whole body'],
    [where({ zones: ['upper flank', 'back'], reach: 3, fade: 5 }), 'back and upper flank, 3 mm past the edge, fading over 5 mm'],
    [where({ zones: ['belly', 'head', 'tail'], reach: -1.5, edge: 'hard' }), 'belly of the head and tail, 1.5 mm short of the edge, hard edge'],
    [where({ along: { from: 0.25, to: 0.75, fadeFrom: 3, fadeTo: 3 } }), 'the whole body, from 25 to 75 % of the length'],
    [where({ body: false, fins: [{ fin: 'dorsal', root: 1, tip: 0.2, on: 'rays' }, { fin: 'tail', root: 1, tip: 1, on: 'whole' }] }), 'dorsal fin (rays), fading to the tip and tail fin'],
    [where({ body: false }), 'nowhere'],
  ])('%#', (place, words) => {
    expect(whereWords(place)).toBe(words)
  })
})

it('says the mix in drops, and what is missing', () => {
  const mix = { parts: [{ paintId: id('paint', 1), drops: 1 }, { paintId: id('paint', 9), drops: 12 }], reducer: 4 }
  expect(mixWords(mix, { paints: [paint(1, { name: 'Black' })] })).toBe('1 drop Black, 12 drops a paint that is gone, 4 drops reducer')
  expect(mixWords({ parts: [], reducer: 0 }, { paints: [] })).toBe('no paint yet')
})

it('says tool, aim and rest', () => {
  expect(toolWords({ kind: 'airbrush', nozzle: 0.3, pressure: 1.15, distance: 8 })).toBe('airbrush 0.3 mm, 1.15 bar, 8 cm')
  expect([10, 50, 90, 120, 170].map(angle => gunWords({ aim: 'from', angle, footprint: 1 }))).toEqual([
    'from above, 10°', 'from the shoulder, 50°', 'level with the flank, 90°', 'from below the flank, 120°', 'from below, 170°',
  ])
  expect([0, 5, 60, 95].map(rest => restWords({ rest, heatSet: null }))).toEqual(['no rest', 'rests 5 min', 'rests 1 h', 'rests 1 h 35 min'])
  expect(restWords({ rest: 5, heatSet: { seconds: 40, distance: 30 } })).toBe('rests 5 min, heat-set 40 s at 30 cm')
})

it('says through which mask a coat is laid, and between which coats the mask is on', () => {
  const b = body(1, '+1', 2, '+2', 3, '-1', '-2', 4)
  expect(masksWords(b, id('coat', 1))).toBe('')
  expect(masksWords(b, id('coat', 3))).toBe('through “Mask 1”, fitted before 2, lifted after 3; through “Mask 2”, fitted before 3, lifted after 3')
  expect(placeWords(b, id('coat', 3))).toBe('coat 3 of 4, under “Mask 1” and “Mask 2”')
})

it('tells paint that goes through a stencil from paint that stays off it', () => {
  const b = body('+1', 1, '-1')
  const taped = { ...b, masks: b.masks.map(mask => ({ ...mask, form: { kind: 'tape' as const, does: 'shields' as const, outlines: [[[0, 0], [1, 0], [1, 1]] as [number, number][]], soft: 0.05, wobble: 0 } })) }
  expect(masksWords(taped, id('coat', 1))).toBe('past “Mask 1”, fitted before 1, lifted after 1')
})

it('puts a coat into one line', () => {
  const b = body('+1', 1, '-1')
  expect(coatLine(b, coat(1, { passes: 1, where: where({ zones: ['back'] }) }))).toBe('1 pass on back, fading edge, through “Mask 1”, fitted before 1, lifted after 1')
  expect(marksWords([{ kind: 'dots', dots: [[0.5, 0.5, 1]], soft: 0.1, grow: 0 }, { kind: 'worm tracks', seed: 1, wavelength: 4, width: 1 }])).toBe('1 dot and worm tracks')
})

it('lists as people do', () => {
  expect([[], ['a'], ['a', 'b'], ['a', 'b', 'c']].map(listWords)).toEqual(['', 'a', 'a and b', 'a, b and c'])
})
