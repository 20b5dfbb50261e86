import { readFileSync } from 'node:fs'
import { expect, it } from 'vitest'
import { builtModule } from '../../../scripts/simd.mjs'

const file = new URL('../../../shared/picture/simd/simd-module.ts', import.meta.url)

it('runs the vector engine that its source says', { timeout: 60_000 }, async () => {
  expect(await builtModule()).toBe(readFileSync(file, 'utf8'))
})
