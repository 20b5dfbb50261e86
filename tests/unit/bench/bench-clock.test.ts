import { describe, expect, it } from 'vitest'
import { type BenchClock, benchTime, readClock, setByServer, settleDoubt, startClock } from '~/bench/bench-clock'

const MINUTE = 60_000
const START = { wall: 1_000_000, running: 5_000 }

/** A tablet: its two clocks, and whether somebody looks at it. */
function tablet(offset = 0) {
  let at = START
  let clock: BenchClock = startClock(offset, at)
  const read = (wasSeen: boolean) => {
    clock = readClock(clock, at, wasSeen)
  }
  return {
    get time() { return benchTime(clock, at.wall) },
    get doubt() { return clock.doubt },
    runs(ms: number, wasSeen = true) {
      at = { wall: at.wall + ms, running: at.running + ms }
      read(wasSeen)
    },
    /** Asleep the running clock stands still. */
    sleeps(ms: number, wasSeen = false) {
      at = { wall: at.wall + ms, running: at.running + 40 }
      read(wasSeen)
    },
    isSet(ms: number, wasSeen = true) {
      at = { wall: at.wall + ms, running: at.running + 200 }
      read(wasSeen)
    },
    hears(server: number, asked: number, answered: number) {
      clock = setByServer(clock, server, asked, answered)
    },
    says(what: 'slept' | 'set') {
      clock = settleDoubt(clock, what)
    },
    get wall() { return at.wall },
  }
}

describe('the time at the bench', () => {
  it('goes on with the tablet, frozen or not', () => {
    const one = tablet()
    one.runs(MINUTE)
    one.runs(30 * MINUTE, false)
    expect(one.time).toBe(START.wall + 31 * MINUTE)
    expect(one.doubt).toBeNull()
  })

  it('goes on while the tablet sleeps out of sight, for paint dries on', () => {
    const one = tablet()
    one.sleeps(30 * MINUTE)
    expect(one.time).toBe(START.wall + 30 * MINUTE)
    expect(one.doubt).toMatchObject({ countedAs: 'slept' })
  })

  it('takes no notice of a clock that is set back or ahead under its eyes', () => {
    const one = tablet()
    one.isSet(-60 * MINUTE)
    expect(Math.abs(one.time - START.wall)).toBeLessThan(250)
    one.runs(MINUTE)
    one.isSet(120 * MINUTE)
    expect(Math.abs(one.time - START.wall - MINUTE)).toBeLessThan(500)
  })

  it('lets a person say what happened, either way', () => {
    const lid = tablet()
    lid.sleeps(30 * MINUTE, true)
    expect(lid.time).toBeLessThan(START.wall + MINUTE)
    lid.says('slept')
    expect(Math.abs(lid.time - START.wall - 30 * MINUTE)).toBeLessThan(250)
    const set = tablet()
    set.isSet(60 * MINUTE, false)
    set.says('set')
    expect(Math.abs(set.time - START.wall)).toBeLessThan(250)
    expect(set.doubt).toBeNull()
  })

  it('is the server\'s as soon as it can be known, and does not twitch while it can be right', () => {
    const one = tablet()
    one.hears(one.wall + 61 * MINUTE, one.wall - 40, one.wall)
    expect(Math.abs(one.time - one.wall - 61 * MINUTE)).toBeLessThan(100)
    const before = one.time
    one.hears(one.wall + 61 * MINUTE + 90, one.wall - 200, one.wall)
    expect(one.time).toBe(before)
  })

  it('forgets its doubt once the server has told the time', () => {
    const one = tablet()
    one.isSet(60 * MINUTE, false)
    one.hears(START.wall, one.wall - 10, one.wall)
    expect(one.doubt).toBeNull()
    expect(Math.abs(one.time - START.wall)).toBeLessThan(100)
  })
})
