import { expect, it } from 'vitest'
import { demoPaint } from '#server/seed/paints'
import { swatchesOf } from '#server/services/shelf/swatch-keep'
import { opticsOfKnown } from '#shared/shelf/optics-of-known'
import { paintSwatches } from '#shared/shelf/paint-swatches'

const umber = opticsOfKnown(demoPaint('Umber').known)
const red = opticsOfKnown(demoPaint('Signal red').known)

it('swatches are worked out once for the same optical data, and are those of that data', () => {
  const first = swatchesOf('umber', umber)
  expect(first).toEqual(paintSwatches(umber))
  expect(swatchesOf('umber', umber)).toBe(first)
  expect(swatchesOf('red', red)).toEqual(paintSwatches(red))
})

it('swatches longest unused are thrown away before the shelf of a whole town fills the memory', () => {
  const early = swatchesOf('early', umber)
  const used = swatchesOf('used', umber)
  // A clear without anything in it is the quickest to work out.
  const clear = opticsOfKnown({ how: 'clear', yellowing: 0 })
  for (let i = 0; i < 1998; i++) {
    swatchesOf(`filling ${i}`, clear)
    if (i === 1000) expect(swatchesOf('used', umber)).toBe(used)
  }
  swatchesOf('one more', clear)
  expect(swatchesOf('used', umber)).toBe(used)
  expect(swatchesOf('early', umber)).not.toBe(early)
})
