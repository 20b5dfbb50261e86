/** The two clocks of a tablet at one moment, ms: the one on its wall, which people and networks set, and one that only ever runs. */
export interface ClockReading { wall: number, running: number }

/** The wall clock went ahead and nobody could see why: the tablet slept, or its clock was set. */
export interface ClockDoubt { ms: number, countedAs: 'slept' | 'set' }

/** What is known of how wrong the wall clock is. */
export interface BenchClock {
  /** Added to the wall clock it gives the time at the bench, ms. */
  offset: number
  last: ClockReading
  doubt: ClockDoubt | null
}

/** Smaller differences are the two clocks' own drift, ms. */
const DRIFT_MS = 250

/** A clock as it starts; `offset` is what an earlier page learned. */
export function startClock(offset: number, reading: ClockReading): BenchClock {
  return { offset, last: reading, doubt: null }
}

/** The time at the bench, ms. */
export function benchTime(clock: BenchClock, wall: number): number {
  return wall + clock.offset
}

/**
 * Takes a new reading. A wall clock that went back was set: the time at the bench goes on as if it had not been. One that
 * went ahead leaves a doubt. Out of sight the tablet slept, and paint dries on in its sleep; under somebody's eyes the clock
 * was set, for a wait that is counted too long spoils nothing.
 */
export function readClock(clock: BenchClock, reading: ClockReading, wasSeen: boolean): BenchClock {
  const ahead = (reading.wall - clock.last.wall) - (reading.running - clock.last.running)
  if (Math.abs(ahead) < DRIFT_MS) return { ...clock, last: reading }
  if (ahead < 0) return { ...clock, last: reading, offset: clock.offset - ahead }
  const countedAs = wasSeen ? 'set' : 'slept'
  const ms = clock.doubt?.countedAs === countedAs ? clock.doubt.ms + ahead : ahead
  return { last: reading, offset: wasSeen ? clock.offset - ahead : clock.offset, doubt: { ms, countedAs } }
}

/**
 * Sets the clock by a server that said its time between two readings of the wall clock, ms. The time at the bench moves only
 * when it cannot be right, so that a timer never twitches; a doubt is over either way.
 */
export function setByServer(clock: BenchClock, server: number, asked: number, answered: number): BenchClock {
  const [least, most] = [server - answered, server - asked]
  const isRight = clock.offset >= least - DRIFT_MS && clock.offset <= most + DRIFT_MS
  return { ...clock, doubt: null, offset: isRight ? clock.offset : Math.round((least + most) / 2) }
}

/** A person says what happened. */
export function settleDoubt(clock: BenchClock, what: ClockDoubt['countedAs']): BenchClock {
  const { doubt, offset } = clock
  if (!doubt || doubt.countedAs === what) return { ...clock, doubt: null }
  return { ...clock, doubt: null, offset: what === 'slept' ? offset + doubt.ms : offset - doubt.ms }
}
