import { describe, expect, it } from 'vitest'
import { PICTOGRAMS } from '~/components/ui/pictograms'
import { CAUTION_DEFERS, cautionFor, HAZARDS } from '#shared/shelf/hazards'
import { PAINT_BASES } from '#shared/shelf/paint'

describe('the caution for what is in the cup', () => {
  it.each(PAINT_BASES)('has something to do first for %s, with a pictogram that can be drawn', (base) => {
    const caution = cautionFor([{ base, hazards: [] }])!
    expect(caution.headline.length).toBeGreaterThan(10)
    for (const pictogram of caution.pictograms) expect(PICTOGRAMS).toHaveProperty(pictogram)
  })

  it('lets the gravest carrier speak: an isocyanate before solvent, solvent before water', () => {
    const water = { base: 'water', hazards: [] } as const
    const solvent = { base: 'solvent', hazards: [] } as const
    const clear = { base: 'two-part-urethane', hazards: [] } as const
    expect(cautionFor([water, solvent, clear])!.headline).toContain('Isocyanate')
    expect(cautionFor([water, solvent])!.headline).toContain('Solvent')
    expect(cautionFor([water])!.headline).toContain('Spray mist')
  })

  it('gives each statement once, in order, word for word with its code', () => {
    const { statements, pictograms } = cautionFor([{ base: 'epoxy', hazards: ['H319', 'H317'] }, { base: 'epoxy', hazards: ['H317', 'H411'] }])!
    expect(statements).toEqual(['H317 May cause an allergic skin reaction', 'H319 Causes serious eye irritation', 'H411 Toxic to aquatic life with long lasting effects'])
    expect(pictograms).toEqual(['GHS07', 'GHS09'])
  })

  it('leaves out a code nobody knows, rather than making up its words', () => {
    expect(cautionFor([{ base: 'water', hazards: ['H999', 'H317'] }])!.statements).toEqual(['H317 May cause an allergic skin reaction'])
  })

  it('is silent over an empty cup', () => {
    expect(cautionFor([])).toBeNull()
  })
})

describe('hazard statements', () => {
  it('all have a pictogram that can be drawn', () => {
    expect(Object.values(HAZARDS).filter(({ pictogram }) => !(pictogram in PICTOGRAMS))).toEqual([])
  })

  it('never read as permission', () => {
    expect(CAUTION_DEFERS).toContain('not permission')
  })
})
