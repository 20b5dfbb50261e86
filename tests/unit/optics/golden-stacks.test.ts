import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { beforeAll, expect, it } from 'vitest'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { ENGINE_VERSION } from '../../../shared/optics/engine-version'
import { type Golden, goldenToday } from './golden-stacks'

// Colours as they were last approved. Approve anew with: APPROVE_GOLDEN=1 npx vitest run --project unit tests/unit/optics/golden-stacks.test.ts.
const FILE = fileURLToPath(new URL('./golden-stacks.json', import.meta.url))
interface Approved { engineVersion: string, stacks: Record<string, Golden> }

/** A move that can be seen needs another engine version; a smaller one only a new approval. */
const SEEN = 0.1
const EXACT = 1e-3

const today = goldenToday()
const approved = existsSync(FILE) ? JSON.parse(readFileSync(FILE, 'utf8')) as Approved : undefined

const moved = ({ lab, face, flop }: Golden, before: Golden) => Math.max(
  deltaE2000(lab, before.lab), face && before.face ? deltaE2000(face, before.face) : 0, flop && before.flop ? deltaE2000(flop, before.flop) : 0,
)

beforeAll(() => {
  if (process.env.APPROVE_GOLDEN !== '1') return
  const sameVersion = approved?.engineVersion === ENGINE_VERSION
  const visibly = Object.entries(approved?.stacks ?? {}).filter(([name, before]) => today[name] && moved(today[name], before) > SEEN).map(([name]) => name)
  if (sameVersion && visibly.length > 0) throw new Error(`These moved by more than ${SEEN}: ${visibly.join(', ')}. Raise ENGINE_VERSION before they are approved.`)
  writeFileSync(FILE, `${JSON.stringify({ engineVersion: ENGINE_VERSION, stacks: today }, undefined, 2)}\n`)
})

it('were approved under the engine’s version', () => {
  expect((JSON.parse(readFileSync(FILE, 'utf8')) as Approved).engineVersion).toBe(ENGINE_VERSION)
})
it.each(Object.keys(today))('shows %s as it was approved', (name) => {
  const before = (JSON.parse(readFileSync(FILE, 'utf8')) as Approved).stacks[name]
  expect(before, 'not approved yet').toBeDefined()
  expect(moved(today[name]!, before!)).toBeLessThan(EXACT)
  expect(today[name]!.typical).toBeCloseTo(before!.typical, 2)
  expect(today[name]!.most).toBeCloseTo(before!.most, 2)
})
it('has approved no stack that is not looked at any more', () => {
  expect(Object.keys((JSON.parse(readFileSync(FILE, 'utf8')) as Approved).stacks)).toEqual(Object.keys(today))
})
