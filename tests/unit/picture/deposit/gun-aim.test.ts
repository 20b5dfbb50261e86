import { describe, expect, it } from 'vitest'
import { aimOf, caught } from '#shared/picture/deposit/gun-aim'

const RADIUS = 10
const around = (angle: number, footprint: number) => {
  const aim = aimOf({ aim: 'from', angle, footprint }, RADIUS)
  if (!aim) throw new Error('this gun is aimed')
  return (at: number) => {
    const [up, out] = [Math.cos(at * Math.PI / 180), Math.sin(at * Math.PI / 180)]
    return caught(aim, up, out, RADIUS * up, RADIUS * out)
  }
}

describe('aim of the gun', () => {
  it('both flanks are sprayed alike, and 90 is 270 on the other side', () => {
    const [at90, at270] = [around(90, 0.8), around(270, 0.8)]
    for (let at = 0; at < 180; at += 7) {
      expect(at90(at)).toBeCloseTo(at90(-at), 12)
      expect(at90(at)).toBeCloseTo(at270(at), 12)
    }
  })

  it.each([0, 15, 45, 90, 140, 180])('a pass from %i° is a whole pass at the best-hit place', (angle) => {
    const hit = around(angle, 0.7)
    const most = Math.max(...Array.from({ length: 721 }, (_, i) => hit(i / 2)))
    expect(most).toBeCloseTo(1, 3)
  })

  it('a coat from above dies out by itself at the widest line', () => {
    const hit = around(15, 0.75)
    expect(hit(20)).toBeGreaterThan(0.85)
    expect(hit(90)).toBeLessThan(0.1)
    expect(hit(140)).toBe(0)
  })

  it('a narrow spray draws a line where a wide one floods', () => {
    expect(around(90, 0.3)(50)).toBeLessThan(0.1)
    expect(around(90, 2)(50)).toBeGreaterThan(0.6)
  })

  it('a gun that goes all over has no aim', () => {
    expect(aimOf({ aim: 'all over' }, RADIUS)).toBeNull()
  })
})
