import { describe, expect, it } from 'vitest'
import { createDraftPresence, TELL_COAT_AFTER_MS } from '~/composables/scheme/draft-presence'
import { hereLines } from '~/composables/scheme/presence-words'
import { HERE_EVERY_MS, type OtherHere } from '#shared/scheme/presence'
import { body, id } from './bodies'

const ANN = id('blank', 501)
const BEN = id('blank', 502)
const other = (personId: string, name: string, coatId: string | null = null, tab = personId): OtherHere => ({ tab, person: { id: personId, name }, coatId })

function world() {
  const seen = { said: [] as (string | null)[], others: [] as readonly OtherHere[], versions: [] as number[], ears: new Map<string, (event: { data?: unknown }) => void>(), lines: 0 }
  let now = 0
  let timers: { at: number, run: () => void }[] = []
  let coatId: string | null = null
  const presence = createDraftPresence({
    open: () => {
      seen.lines++
      seen.ears = new Map()
      return { addEventListener: (name, hear) => void seen.ears.set(name, hear), close: () => undefined }
    },
    say: coat => void seen.said.push(coat),
    coatId: () => coatId,
    onOthers: (others) => {
      seen.others = others
    },
    onVersion: version => void seen.versions.push(version),
    later: (ms, run) => {
      const timer = { at: now + ms, run }
      timers.push(timer)
      return () => {
        timers = timers.filter(each => each !== timer)
      }
    },
  })
  return {
    seen, presence,
    take(coat: string | null) {
      coatId = coat
      presence.coatChanged()
    },
    hear: (others: OtherHere[], version = 1) => seen.ears.get('draft')?.({ data: JSON.stringify({ version, others }) }),
    pass(ms: number) {
      const end = now + ms
      for (let due = timers.filter(timer => timer.at <= end); due.length > 0; due = timers.filter(timer => timer.at <= end)) {
        const [next] = due.sort((a, b) => a.at - b.at)
        now = next!.at
        timers = timers.filter(timer => timer !== next)
        next!.run()
      }
      now = end
    },
  }
}

describe('being present in a draft', () => {
  it('is said once the line is open, again and again, and at once to somebody new', () => {
    const { seen, presence, hear, pass } = world()
    presence.start()
    expect(seen.said).toEqual([])
    hear([])
    expect(seen.said).toHaveLength(1)
    pass(HERE_EVERY_MS * 3)
    expect(seen.said).toHaveLength(4)
    hear([other(ANN, 'Ann')])
    expect(seen.said).toHaveLength(5)
    hear([other(ANN, 'Ann', id('coat', 1))])
    expect(seen.said).toHaveLength(5)
    expect(seen.others).toEqual([other(ANN, 'Ann', id('coat', 1))])
  })

  it('tells the coat in hand soon after it is taken, once for many taken in passing', () => {
    const { seen, presence, hear, take, pass } = world()
    presence.start()
    hear([])
    for (const n of [1, 2, 3]) take(id('coat', n))
    pass(TELL_COAT_AFTER_MS)
    expect(seen.said).toEqual([null, id('coat', 3)])
  })

  it('ends when the page is out of sight: nothing is said and nobody is shown', () => {
    const { seen, presence, hear, pass } = world()
    presence.start()
    hear([other(ANN, 'Ann')], 4)
    presence.stop()
    const before = seen.said.length
    pass(HERE_EVERY_MS * 5)
    expect([seen.said.length, seen.others, seen.versions]).toEqual([before, [], [4]])
    presence.start()
    expect(seen.lines).toBe(2)
  })
})

describe('who is here, in words', () => {
  const draft = body(1, 2, 3)

  it('names the person and the coat as it is numbered on this page', () => {
    expect(hereLines([other(ANN, 'Ann', id('coat', 2)), other(BEN, 'Ben'), other(id('blank', 503), 'Cas', id('coat', 99))], draft, undefined).map(line => line.words))
      .toEqual(['Ann is here, on coat 2', 'Ben is here', 'Cas is here'])
  })

  it('is one line for one person in two tabs, and says so of oneself', () => {
    const both = [other(ANN, 'Ann', id('coat', 3), 'a'), other(ANN, 'Ann', id('coat', 1), 'b')]
    expect(hereLines(both, draft, BEN).map(line => line.words)).toEqual(['Ann is here, on coats 1 and 3'])
    expect(hereLines(both, draft, ANN).map(line => line.words)).toEqual(['You have it open elsewhere too, on coats 1 and 3'])
  })
})
