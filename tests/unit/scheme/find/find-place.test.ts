import { describe, expect, it } from 'vitest'
import { findPlace } from '../../../../app/workers/find-place'
import type { Lab } from '#shared/optics/colorimetry'
import { deltaE2000 } from '#shared/optics/delta-e'
import { findCoatNow } from '#shared/optics/find-coat'
import { zoneBench } from '#shared/picture/zone-bench'
import { zoneColours } from '#shared/picture/zone-colours'
import { applyEdit } from '#shared/scheme/edits'
import { candidates } from '#shared/scheme/find/candidates'
import { rowFor, whereOf } from '#shared/scheme/find/place'
import { proposedCoat } from '#shared/scheme/find/proposed-coat'
import { newCoat } from '#shared/scheme/new-coat'
import { coatsOf } from '#shared/scheme/stack-order'
import { perch } from '../../../fixtures/demo-looks'

const { body, materials } = perch
const ID = '00000000-0000-4000-8000-00000000f1d0'
const bench = zoneBench()

describe('a coat that was found', () => {
  it.each([
    ['belly', [72, 34, 40], 'top', false], ['belly', [72, 34, 40], 'top', true], ['upper-flank', [30, 8, 16], 'above', false], ['back', [18, -4, 6], 'top', true],
  ] as [string, Lab, 'top' | 'above', boolean][])('has on the blank the colour it was promised with: %s %s %s, after clear %s', (zone, target, place, clear) => {
    const row = rowFor(body, materials, place, coatsOf(body.stack)[3]!.id)
    const where = whereOf([zone])
    const coat = { ...newCoat(ID), where }
    const shelf = candidates(materials.paints, [], false).map(({ id, optics, cup }) => ({ id, optics, cup }))
    const { hardlyReaches, ...scene } = findPlace({ look: perch, coat, row, zone, clear }, bench)
    expect(hardlyReaches).toBe(false)
    const { mixes, paints } = findCoatNow({ ...scene, target, shelf: shelf.slice(0, 14), wholePasses: true, dropsMost: 4 })
    for (const found of [paints[0]!, mixes[0]!]) {
      const laid = proposedCoat(ID, found, where, materials.paints, () => 5)!
      const after = applyEdit(body, { do: 'add-coat', coat: laid, row })
      if (!after.ok) throw new Error(after.because)
      // Under the clear, the colour coats above are left off.
      const stack = clear && place === 'top' ? after.body.stack : after.body.stack.slice(0, row + 1)
      const shown = zoneColours({ body: { ...after.body, stack }, materials }, { upTo: 'all', clear, light: { tilt: 45 } }, bench).find(each => each.zone === zone)!
      // Reducer is added in whole drops, so a pass is not quite the usual one.
      expect(deltaE2000(shown.promised.lab, found.lab)).toBeLessThan(0.6)
    }
  })
})
