import { describe, expect, it } from 'vitest'
import { coat, id, mask, paint } from '../scheme/bodies'
import { fittedCells, relaxedPitch, scaledFishOf, SCALED_FISH, scalePitch } from '~/composables/mask/scale-pitch'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import { besideThread } from '#shared/picture/deposit/mesh-map'
import type { Mesh } from '#shared/scheme/mask'
import type { Materials } from '#shared/scheme/materials'
import { newSchemeBody } from '#shared/scheme/new-scheme'
import type { SchemeBody } from '#shared/scheme/body'
import { driftUnder, meshFills, passesThroughNet, wetOfPass } from '#shared/scheme/outline/mesh-fill'

const materials: Materials = { paints: [paint(1)], blank: { id: id('blank', 1), shape: builtInBlank('minnow-90') } }

function bodyOf(passes: readonly number[], mesh: Partial<Mesh> = {}): SchemeBody {
  const net = mask(1)
  return {
    ...newSchemeBody(id('blank', 1)),
    masks: [{ ...net, form: { ...net.form, ...mesh } as Mesh }],
    stack: [{ act: 'fit', maskId: net.id }, ...passes.map((each, i) => ({ act: 'coat' as const, coat: coat(i + 1, { passes: each }) })), { act: 'lift', maskId: net.id }],
  }
}

it('counts wet paint as it lands: dry film over solids, with its reducer', () => {
  // 4 µm dry at 25 % solids are 16 µm wet, and 20 with 25 parts of reducer to 100.
  expect(wetOfPass(coat(1), materials)).toBeCloseTo(20, 9)
  expect(passesThroughNet({ thread: 0.2 }, 20)).toBe(5)
  expect(passesThroughNet({ thread: 0.03 }, 20)).toBe(1)
})

it('what drifts under a thread is what the picture lays there', () => {
  for (const [thread, lift] of [[0.2, 0.15], [0.3, 0.6], [0.1, 1.2]] as const) {
    expect(driftUnder({ thread, lift })).toBeCloseTo(besideThread(0, thread, Math.hypot(0.03, 0.24 * lift)), 4)
  }
})

describe('a net is a one-shot mask', () => {
  it('takes as many passes as keep its cells open without a word', () => {
    expect(meshFills(bodyOf([5]), materials)).toEqual([])
  })
  it('warns of one pass more, and says how many would do', () => {
    const [fill] = meshFills(bodyOf([6]), materials)
    expect(fill).toMatchObject({ coatId: id('coat', 1), maskId: id('mask', 1), most: 5 })
    expect(fill!.says).toMatch(/6 passes through “Mask 1” in one go: about 120 µm of wet paint against threads of 200 µm/)
  })
  it('lets the same passes go as two coats with a rest between', () => {
    expect(meshFills(bodyOf([3, 3]), materials)).toEqual([])
  })
  it('warns once when what drifts under a net held off the flank adds up to a pass', () => {
    const fills = meshFills(bodyOf([3, 3, 3], { lift: 0.6, thread: 0.3 }), materials)
    expect(fills.map(fill => fill.coatId)).toEqual([id('coat', 2)])
    expect(fills[0]!.says).toMatch(/31 % of each/)
  })
  it('says nothing of a coat that is laid after the net is lifted', () => {
    const body = bodyOf([9])
    const [fit, laid, lift] = body.stack
    expect(meshFills({ ...body, stack: [fit!, lift!, laid!] }, materials)).toEqual([])
  })
})

describe('the pitch a fish’s scales ask for', () => {
  // Worked out from lateral-line counts: 100 mm of lure, 70 % of it scaled.
  it.each([['yellow perch', 1.0, 1.4], ['bluegill', 1.59, 1.79], ['golden shiner', 1.3, 1.6], ['roach', 1.46, 1.79]] as const)('%s: %d to %d mm', (fish, least, most) => {
    const { scales } = SCALED_FISH.find(one => one.fish === fish)!
    expect(scalePitch(100, scales[1]).true).toBeCloseTo(least, 1)
    expect(scalePitch(100, scales[0]).true).toBeCloseTo(most, 1)
  })
  it('is kept relaxed: pulled along the body it stands as proposed', () => {
    for (const stretch of [0.5, 1, 1.4]) expect(fittedCells({ pitch: relaxedPitch(1.6, stretch), stretch }).along).toBeCloseTo(1.6, 12)
  })
  it('is proposed for the fish a scheme is named for', () => {
    expect(SCALED_FISH[scaledFishOf('Young Bluegill, June')]!.fish).toBe('bluegill')
    expect(SCALED_FISH[scaledFishOf('perch')]!.fish).toBe('yellow perch')
    expect(scaledFishOf('gudgeon')).toBe(0)
  })
})
