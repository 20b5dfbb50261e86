import { describe, expect, it } from 'vitest'
import { createLiveLink, type LiveLine } from '~/composables/run-live/live-link'
import type { RunEventsView } from '#shared/bench/run-view'

const NEWS: RunEventsView = { events: [], headNumber: 1, finishedAt: null, now: '2026-11-12T09:00:00.000Z' }

/** A line that only says what it is told to say. */
class Line implements LiveLine {
  isOpen = true
  private readonly ears = new Map<string, (event: { data?: unknown }) => void>()
  constructor(readonly since: number) {}
  addEventListener(name: string, hear: (event: { data?: unknown }) => void) { this.ears.set(name, hear) }
  close() { this.isOpen = false }
  say(name: string, data?: unknown) { this.ears.get(name)?.({ data: data === undefined ? undefined : JSON.stringify(data) }) }
}

function world() {
  const seen = { lines: [] as Line[], news: 0, isLive: false, timers: [] as { ms: number, run: () => void }[], place: 0 }
  const link = createLiveLink({
    open: (since) => {
      seen.lines.push(new Line(since))
      return seen.lines.at(-1)!
    },
    since: () => seen.place,
    onNews: () => { seen.news++ },
    onLive: (is) => { seen.isLive = is },
    later: (ms, run) => {
      const timer = { ms, run }
      seen.timers.push(timer)
      return () => {
        seen.timers = seen.timers.filter(each => each !== timer)
      }
    },
  })
  return { seen, link, ring: () => seen.timers.splice(0).forEach(timer => timer.run()) }
}

describe('a line to what others do', () => {
  it('is live once something was heard, and no longer when it breaks', () => {
    const { seen, link } = world()
    link.start()
    expect(seen.isLive).toBe(false)
    seen.lines[0]!.say('acts', NEWS)
    expect([seen.isLive, seen.news]).toEqual([true, 1])
    seen.lines[0]!.say('error')
    expect([seen.isLive, seen.lines[0]!.isOpen]).toEqual([false, false])
  })

  it('is opened again from where one is, later and later, and soon again once it worked', () => {
    const { seen, link, ring } = world()
    link.start()
    const waits: number[] = []
    for (let n = 0; n < 7; n++) {
      seen.lines.at(-1)!.say('error')
      waits.push(seen.timers[0]!.ms)
      seen.place = 40 + n
      ring()
    }
    expect(waits).toEqual([1000, 2000, 4000, 8000, 16_000, 30_000, 30_000])
    expect(seen.lines.at(-1)!.since).toBe(46)
    seen.lines.at(-1)!.say('acts', NEWS)
    seen.lines.at(-1)!.say('error')
    expect(seen.timers[0]!.ms).toBe(1000)
  })

  it('stays closed when the run is over, and while nobody looks', () => {
    const { seen, link, ring } = world()
    link.start()
    seen.lines[0]!.say('error')
    link.stop()
    ring()
    expect(seen.lines).toHaveLength(1)
    link.start()
    link.start()
    expect(seen.lines).toHaveLength(2)
    seen.lines[1]!.say('over', { because: 'finished' })
    link.start()
    expect([seen.lines.length, seen.lines[1]!.isOpen, seen.isLive]).toEqual([2, false, false])
  })

  it('says nothing after it was let go of, and makes nothing of what it cannot read', () => {
    const { seen, link } = world()
    link.start()
    seen.lines[0]!.say('acts', { not: 'this' })
    link.stop()
    seen.lines[0]!.say('acts', NEWS)
    expect([seen.news, seen.isLive]).toEqual([0, false])
  })
})
