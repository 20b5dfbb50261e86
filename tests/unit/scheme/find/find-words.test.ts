import { describe, expect, it } from 'vitest'
import { effectScope } from 'vue'
import { useFindCoat } from '../../../../app/composables/find/use-find-coat'
import type { FindThread } from '../../../../app/composables/find/find-thread'
import { screenFromXyz } from '#shared/optics/screen-colour'
import { lchFromLab, xyzFromLab } from '#shared/optics/colorimetry'
import { chipCard, turnedColour, turnWords } from '#shared/scheme/find/chip-card'
import type { FindAnswer, FindAsk, FindQuestion, FindReport } from '#shared/scheme/find/find-messages'
import { farWords, missWords, nearWords, secondLightWords } from '#shared/scheme/find/find-words'

describe('what is said of a proposal', () => {
  it.each([
    [[60, 10, 20], [50, 10, 20], 'lighter'], [[50, 30, 0], [50, 10, 0], 'cleaner'], [[40, 5, 8], [50, 20, 32], 'darker and duller'],
    [[50, 0, 30], [50, 20, 22.4], 'greener'], [[50, 30, 0.4], [50, 30, 0], ''],
  ] as const)('is how it misses: %j for %j is %s', (lab, wanted, words) => {
    expect(missWords([...lab], [...wanted])).toBe(words)
  })
  it('says how near before it says how it misses', () => {
    expect(nearWords({ lab: [52, 10, 20], deltaE: 2 }, [50, 10, 20])).toBe('seen side by side, a little lighter')
    expect(nearWords({ lab: [50, 10, 20], deltaE: 0.2 }, [50, 10, 20])).toBe('the same')
  })
  it('names the light in which a match is lost', () => {
    expect(secondLightWords({ deltaE: 0.5, second: { light: 'A', lab: [50, 0, 0], deltaE: 4.2 } })).toBe('Under a filament lamp it drifts: 4.2, plainly different.')
    expect(secondLightWords({ deltaE: 0.5, second: { light: 'F11', lab: [50, 0, 0], deltaE: 1.1 } })).toBe('It holds under a shop tube: 1.1.')
  })
  it('gives the ground as the reason where only opaque paint could lighten it', () => {
    expect(farWords({ lab: [30, 2, 4], deltaE: 28 }, [70, 2, 4], [25, 0, 2])).toMatch(/^The nearest is far: 28\.0, another colour\. It comes out darker\. The ground is darker/)
    expect(farWords({ lab: [50, 10, 5], deltaE: 20 }, [50, 60, 30], [90, 0, 2])).toMatch(/as clean/)
  })
})

describe('the chip card', () => {
  it('holds only colours an ordinary screen can show, six rows of twelve, each row at one lightness but for its grey', () => {
    const card = chipCard()
    expect(card.map(row => row.length)).toEqual([12, 12, 12, 12, 12, 12])
    expect(card.flat().filter(({ lab }) => screenFromXyz(xyzFromLab(lab)).outOfGamut)).toEqual([])
    for (const row of card) expect(new Set(row.slice(0, -1).map(({ lab }) => lab[0])).size).toBe(1)
    expect(new Set(card.flat().map(({ lab }) => lab.join())).size).toBe(72)
  })
  it('asks for a colour in words that fit it: an orange redder or yellower, a rose bluer or redder', () => {
    expect([turnWords([60, 40, 50]), turnWords([60, 40, -5]), turnWords([50, -30, 20])]).toEqual([
      { back: 'redder', on: 'yellower' }, { back: 'bluer', on: 'redder' }, { back: 'yellower', on: 'greener' },
    ])
  })
  it('turns a colour as it is asked to', () => {
    expect(lchFromLab(turnedColour([50, 0, 30], [2, 3, 5])).map(Math.round)).toEqual([52, 33, 95])
    expect(turnedColour([1, 0, 2], [-5, -9, 0])).toEqual([0, 0, 0])
  })
})

describe('a search away from the page', () => {
  const question = {} as FindQuestion
  const report = {} as FindReport
  function desk() {
    const asked: FindAsk[] = []
    let say: (answer: FindAnswer) => void = () => undefined
    let started = 0
    const search = effectScope().run(() => useFindCoat((hear): FindThread => {
      started++
      say = hear
      return { ask: ask => asked.push(ask), end: () => undefined }
    }))!
    return { search, asked, say: (answer: FindAnswer) => say(answer), started: () => started }
  }

  it('listens to the newest question only', () => {
    const { search, say } = desk()
    search.ask(question)
    search.ask(question)
    say({ answer: 'found', request: 1, report })
    expect(search.state.value).toBe('searching')
    say({ answer: 'progress', request: 2, done: 0.42 })
    expect(search.percent.value).toBe(42)
    say({ answer: 'found', request: 2, report })
    expect([search.state.value, search.report.value]).toEqual(['found', report])
  })
  it('is stopped at once, and does not hear what was on its way', () => {
    const { search, say, asked } = desk()
    search.ask(question)
    search.stop()
    say({ answer: 'found', request: 1, report })
    expect([search.state.value, search.report.value, asked.at(-1)]).toEqual(['stopped', null, { ask: 'stop' }])
  })
  it('keeps the nearest so far when it is stopped', () => {
    const { search, say } = desk()
    search.ask(question)
    say({ answer: 'so far', request: 1, report })
    expect([search.state.value, search.isSoFar.value, search.report.value]).toEqual(['searching', true, report])
    search.stop()
    const nearer = { ...report }
    say({ answer: 'so far', request: 1, report: nearer })
    expect([search.state.value, search.report.value]).toEqual(['stopped', nearer])
    search.ask(question)
    expect(search.isSoFar.value).toBe(false)
  })
  it('says what failed and starts anew when its thread has died', () => {
    const { search, say, started } = desk()
    search.ask(question)
    say({ answer: 'failed', request: Infinity, reason: 'out of memory' })
    expect(search.failed.value).toBe('The search could not be done: out of memory. The scheme is as it was.')
    search.ask(question)
    expect([search.state.value, search.failed.value, started()]).toEqual(['searching', null, 2])
  })
})
