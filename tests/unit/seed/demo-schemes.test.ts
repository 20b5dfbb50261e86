import { randomUUID } from 'node:crypto'
import { expect, it } from 'vitest'
import { DEMO_PAINTS, type DemoPaintName } from '#server/seed/paints'
import { DEMO_SCHEMES } from '#server/seed/schemes/index'
import { bodyOf } from '#server/seed/write-scheme'
import { SchemeBody } from '#shared/scheme/body'

const shelf = new Map((Object.keys(DEMO_PAINTS) as DemoPaintName[]).map(name => [name, randomUUID() as string]))
const idsIn = ({ stack, masks }: SchemeBody) => [...stack.flatMap(item => item.act === 'coat' ? [item.coat.id] : []), ...masks.map(mask => mask.id)]

it.each(DEMO_SCHEMES.map(plan => [plan.name, plan] as const))('writes a finish that can be kept, each mask lifted after it was fitted: %s', (_, plan) => {
  const body = SchemeBody.parse(bodyOf(plan, randomUUID(), shelf))
  const handled = (act: 'fit' | 'lift') => body.stack.flatMap(item => item.act === act ? [item.maskId] : [])
  expect(handled('fit')).toEqual(body.masks.map(mask => mask.id))
  expect(handled('lift')).toEqual(handled('fit'))
})

it('gives the coats and masks of a finish written twice ids of their own', () => {
  for (const plan of DEMO_SCHEMES) {
    const ids = [1, 2].flatMap(() => idsIn(bodyOf(plan, randomUUID(), shelf)))
    expect(new Set(ids).size).toBe(ids.length)
  }
})
