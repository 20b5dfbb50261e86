import { expect, it } from 'vitest'
import approved from '../../unit/optics/golden-stacks.json'
import { goldenToday, type Golden } from '../../unit/optics/golden-stacks'
import { deltaE2000 } from '#shared/optics/delta-e'

// What was approved came from Node; a browser rounds its sines and powers in its own way, which nobody may see.
it('promises in this browser the colours that were approved', () => {
  const today: Record<string, Golden> = goldenToday()
  const before: Record<string, Golden> = approved.stacks as unknown as Record<string, Golden> // triples, which the file's type calls lists
  expect(Object.keys(before).length).toBeGreaterThan(10)
  for (const [name, { lab, face, flop }] of Object.entries(before)) {
    const now = today[name]!
    expect(deltaE2000(now.lab, lab), name).toBeLessThan(1e-3)
    if (face) expect(deltaE2000(now.face!, face), name).toBeLessThan(1e-3)
    if (flop) expect(deltaE2000(now.flop!, flop), name).toBeLessThan(1e-3)
  }
})
