import { computed, nextTick, ref } from 'vue'
import { describe, expect, it } from 'vitest'
import { useChosen } from '~/composables/wall/use-chosen'
import { wallCounted } from '~/composables/wall/wall-counted'
import { isLooking, narrowedBy, sameWish } from '~/composables/wall/wish-words'
import { WallWish } from '#shared/scheme/wall/wall-wish'

describe('choosing several', () => {
  const wall = () => {
    const shown = ref(['a', 'b', 'c', 'd', 'e'])
    return { shown, ...useChosen(computed(() => shown.value)) }
  }

  it('takes everything from the last one to this one when a range is asked for, in either direction', () => {
    const { turn, chosen } = wall()
    turn('d')
    turn('b', true)
    expect([...chosen.value].sort()).toEqual(['b', 'c', 'd'])
    turn('e', true)
    expect([...chosen.value].sort()).toEqual(['b', 'c', 'd', 'e'])
  })

  it('lets a whole range go when its end is let go', () => {
    const { turn, chosen } = wall()
    for (const id of ['a', 'b', 'c']) turn(id)
    turn('a', true)
    expect([...chosen.value]).toEqual([])
  })

  it('never keeps one that is no longer shown', async () => {
    const { turn, count, chosen, shown } = wall()
    turn('a')
    turn('e')
    shown.value = ['a', 'b']
    await nextTick()
    expect([count.value, [...chosen.value]]).toEqual([1, ['a']])
  })

  it('starts anew after leaving', () => {
    const { turn, begin, leave, count, isChoosing } = wall()
    begin()
    turn('a')
    leave()
    expect([isChoosing.value, count.value]).toEqual([false, 0])
    turn('c', true)
    expect(count.value).toBe(1)
  })
})

describe('a wish in words', () => {
  it('names each thing the wall is narrowed by', () => {
    const wish = WallWish.parse({ near: 'olive', fish: 'Pike', stands: 'away', personId: '00000000-0000-4000-8000-000000000001' })
    expect(narrowedBy(wish, () => 'Ida').map(({ words }) => words)).toEqual(['near olive', 'Pike', 'put away', 'saved by Ida'])
    expect(narrowedBy(wish, () => undefined).at(-1)?.words).toBe('saved by somebody who left')
  })

  it('is the same wish whether a field is left out or empty', () => {
    expect(sameWish(WallWish.parse({ near: '' }), WallWish.parse({}))).toBe(true)
    expect(sameWish(WallWish.parse({ fish: 'Pike' }), WallWish.parse({ fish: 'Perch' }))).toBe(false)
    expect([isLooking(WallWish.parse({ words: '  ' })), isLooking(WallWish.parse({ near: 'olive' }))]).toEqual([false, true])
  })
})

it('says the order, how many, and what may still come in between', () => {
  expect(wallCounted({ shown: 1, hasMore: false, isNear: false, waiting: 0 })).toBe('Every blank at one scale. Newest work first, 1 finish.')
  expect(wallCounted({ shown: 24, hasMore: true, isNear: true, waiting: 3 }))
    .toBe('Every blank at one scale. Nearest first, by the zone that comes nearest, 24 finishes and more. The colours of 3 more are being worked out.')
})
