import { describe, expect, it } from 'vitest'
import { plainEngine } from '#shared/picture/engine/plain-engine'
import { simdEngine } from '#shared/picture/engine/simd-engine'
import { agreementOf } from '../../browser-checks/agreement/agreement-report'

/** What engines may differ by from double precision, CIEDE2000. */
const MOST = 0.5, MEAN = 0.1

describe('engines', () => {
  it('agree with double precision on random stacks and on every finish of the demo wall', { timeout: 900_000 }, () => {
    const reports = agreementOf([plainEngine(), simdEngine()!])
    expect(reports.map(({ engine }) => engine)).toEqual(['plain', 'simd'])
    for (const { stacks, finishes } of reports) {
      expect(stacks.samples).toBeGreaterThanOrEqual(1000)
      for (const { most, mean } of [stacks, ...Object.values(finishes)]) {
        expect(most).toBeLessThanOrEqual(MOST)
        expect(mean).toBeLessThanOrEqual(MEAN)
      }
    }
  })
})
