// @vitest-environment happy-dom
import { beforeAll, expect, it, vi } from 'vitest'
import { createApp, nextTick, ref, shallowRef } from 'vue'
import { drawnAt } from '~/composables/hand/flat-blank'
import { type Hand, provideHand } from '~/composables/hand/use-hand'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import type { Mark } from '#shared/scheme/mark'

const blank = prepareBlank(builtInBlank('minnow-90'))

/** Nuxt's shared state, which only Nuxt brings. */
beforeAll(() => {
  vi.stubGlobal('useState', (_: string, start: () => unknown) => ref(start()))
})

function atTheDesk() {
  const marks = shallowRef<Mark[]>([])
  let hand: Hand | undefined
  createApp({
    setup() {
      hand = provideHand({ blank: () => blank, marks: () => marks.value, change: next => marks.value = next })
      return () => null
    },
  }).mount(document.createElement('div'))
  if (!hand) throw new Error('no desk')
  const at = hand
  function drawLine() {
    for (let k = 0; k <= 30; k++) at.draws(drawnAt(blank, [0.3 + k / 100, 0.4 + 0.05 * Math.sin(k / 4)]), 0.5)
    at.ends()
  }
  return { marks, hand: at, drawLine }
}

it('a line of the hand becomes the chosen part, and can be moved, widened and taken out', () => {
  const { marks, hand, drawLine } = atTheDesk()
  drawLine()
  expect(hand.part.value?.kind).toBe('airbrush line')
  const [first] = hand.part.value!.points
  hand.moves(5, 0)
  expect(hand.part.value!.points[0]![0]).toBeGreaterThan(first![0] + 0.03)
  hand.widens([3, 1])
  expect(hand.part.value).toMatchObject({ kind: 'dagger stroke', width: [3, 1] })
  hand.point.value = 1
  hand.puts([0.5, 0.5])
  expect(hand.part.value!.points[1]).toEqual([0.5, 0.5])
  hand.takesOut()
  expect(marks.value).toEqual([])
})

it('all that was done is taken back step by step, to where one began', async () => {
  const { marks, hand, drawLine } = atTheDesk()
  const stood: Mark[][] = []
  for (const act of [drawLine, drawLine, () => hand.moves(2, 1), () => hand.lays('pupil'), () => hand.types([0.2, 0.3], [0.4, 0.3])]) {
    stood.push(marks.value)
    act()
    await nextTick()
  }
  for (const before of stood.reverse()) {
    hand.takesBack()
    await nextTick()
    expect(marks.value).toEqual(before)
  }
  expect(hand.canTakeBack.value).toBe(false)
})

it('what somebody else drew meanwhile is never taken back from here', async () => {
  const { marks, hand, drawLine } = atTheDesk()
  drawLine()
  await nextTick()
  expect(hand.canTakeBack.value).toBe(true)
  marks.value = [...marks.value, { kind: 'dots', dots: [[0.5, 0.5, 1]], soft: 0.1, grow: 0 }]
  await nextTick()
  expect(hand.canTakeBack.value).toBe(false)
})

it('a press without a way is refused in words and changes nothing', () => {
  const { marks, hand } = atTheDesk()
  hand.draws([40, 0], 0.5)
  hand.ends()
  expect(marks.value).toEqual([])
  expect(hand.said.value).toMatch(/went nowhere/)
})
