import { describe, expect, it } from 'vitest'
import { aimAt, aimPlace, AIM_PLACES } from '~/composables/build/aim-words'
import { changeCount } from '~/composables/build/change-count'
import { MARK_STARTS, markNumbers, startMarks } from '~/composables/build/mark-forms'
import { pictureSize } from '#shared/picture/picture-size'
import { saveShown } from '~/composables/build/save-words'
import { schemeState } from '~/composables/build/scheme-state'
import { onArc, tiltAt, tiltWords } from '~/composables/build/tilt-arc'
import { zoneRing } from '~/composables/build/zone-ring'
import { BUILT_IN_BLANKS } from '#shared/blank/built-in-blanks'
import { fitView } from '#shared/blank/fit-view'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { diffBodies } from '#shared/scheme/diff'
import { Mark } from '#shared/scheme/mark'
import type { SchemeListItem } from '#shared/scheme/scheme-view'
import { body } from '../scheme/bodies'

const row = (more: Partial<SchemeListItem>): SchemeListItem => ({
  sees: 'recipe', id: 'x', name: 'Perch', fish: '', blank: { id: 'b', name: 'Minnow 90' }, coats: 3, masks: 0, headNumber: 2,
  publishedAt: null, draftIsAhead: false, savedAt: '2026-05-02T10:00:00Z', savedBy: null, retired: false, pictureTag: 't', ...more,
})

describe('a finish on the wall', () => {
  it('is painted so that every blank comes out at one scale', () => {
    for (const shape of BUILT_IN_BLANKS) {
      const { width, height } = pictureSize(shape, 4)
      const { scale } = fitView(prepareBlank(shape), { width, height })
      expect(scale / 4, shape.label).toBeCloseTo(1, 1.5)
    }
  })

  it('says where it stands, and nothing of its recipe to those who see only looks', () => {
    expect(schemeState(row({ headNumber: 0 }), { isCardShared: false })?.words).toBe('draft, never published')
    expect(schemeState(row({ draftIsAhead: true }), { isCardShared: false })?.words).toBe('draft on revision 2')
    expect(schemeState(row({}), { isCardShared: true, run: 31 })?.words).toBe('run 31 on the bench')
    expect(schemeState(row({}), { isCardShared: true })?.words).toBe('revision 2, card shared')
    expect(schemeState({ sees: 'look', id: 'x', name: 'Perch', fish: '', blank: { id: 'b', name: 'Minnow 90' }, publishedAt: '2026-05-02T10:00:00Z', pictureTag: 't' }, { isCardShared: true, run: 31 })).toBeNull()
  })
})

describe('the lamp on its arc', () => {
  it('stands where it is put', () => {
    for (const tilt of [15, 25, 45, 78, 110]) {
      const { x, y } = onArc(tilt)
      expect(tiltAt(x, y)).toBe(tilt)
    }
  })

  it('does not leave the arc', () => {
    expect(tiltAt(-500, 60)).toBe(15)
    expect(tiltAt(2000, 60)).toBe(110)
    expect(tiltWords(110)).toBe('110 degrees from gloss, flop')
  })
})

describe('the ring of a zone', () => {
  const blank = prepareBlank(BUILT_IN_BLANKS[0]!)
  it('lies on the flank from the side, and is gone where the zone is turned away', () => {
    const ring = zoneRing(blank, 'upper-flank', 'left flank', 0.4)
    expect(ring?.x).toBeGreaterThan(0.2)
    expect(ring?.y).toBeLessThan(0.6)
    expect(zoneRing(blank, 'belly', 'back', 0.4)).toBeNull()
    expect(zoneRing(blank, 'back', 'back', 0.4)).not.toBeNull()
  })
})

describe('marks laid by their numbers', () => {
  it('are marks a scheme takes, and stay so at both ends of every number', () => {
    for (const { key } of MARK_STARTS) {
      for (const mark of startMarks(key, 7)) {
        expect(Mark.safeParse(mark).success, key).toBe(true)
        for (const number of markNumbers(mark)) {
          for (const value of [number.min, number.max]) expect(Mark.safeParse(number.set(value)).success, `${key} ${number.key} ${value}`).toBe(true)
        }
      }
    }
  })
})

describe('words of the build', () => {
  it('hold an airbrush where they say', () => {
    for (const { value } of AIM_PLACES) expect(aimPlace(aimAt(value, { aim: 'all over' }))).toBe(value)
  })

  it('count a coat that was moved and changed once', () => {
    const later = body(2, 1)
    later.stack = later.stack.map(item => item.act === 'coat' ? { act: 'coat', coat: { ...item.coat, passes: 9 } } : item)
    expect(changeCount(diffBodies(body(1, 2), later))).toBe(2)
    expect(changeCount(diffBodies(body(1, 2), body(1, 2)))).toBe(0)
  })

  it('say that work is kept on the device while there is no network', () => {
    expect(saveShown({ is: 'on this device', because: 'No line.' }, at => at)).toEqual({ kind: 'kept', words: 'No network, kept on this device' })
    expect(saveShown({ is: 'saved', at: '14:02' }, at => at)).toEqual({ kind: 'saved', at: '14:02' })
  })
})
