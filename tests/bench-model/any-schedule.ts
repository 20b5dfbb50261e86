import type fc from 'fast-check'
import { expect } from 'vitest'
import { inPlace, type RunPlan, runState } from '#shared/bench/run-state'
import { isWait } from '#shared/bench/run-step'
import type { RunEvent } from '#shared/bench/run-event'
import { inOrderOnce, standingOf } from './in-order-once'
import type { Notebook } from './notebook'
import { anyAct, anySchedule, happen, type Happening, PIECES, UNREADABLE } from './schedule'
import { Tablet } from './tablet'

const isReadable = ({ act }: RunEvent) => act.kind !== 'deviation' || act.note !== UNREADABLE
const tick = () => new Promise<void>(resolve => setImmediate(resolve))

/** Any schedule of things that happen to so many tablets at one run. */
export function schedulesOf(plan: RunPlan, tablets: number, maxLength = 30): fc.Arbitrary<Happening[]> {
  const coatIds = plan.steps.flatMap(step => step.kind === 'lay' ? [step.coat.id] : [])
  return anySchedule(anyAct([...new Set(coatIds)], plan.steps.map(step => step.id), plan.steps.filter(isWait).map(step => step.id)), tablets, maxLength)
}

/**
 * Lets a schedule happen, brings the air back, and looks at what became of it: everything that was shown as kept is in the
 * notebook once, or lies aside with the reason; nothing is there that nobody did; and notebook and tablets stand where the
 * bookkeeper stands who wrote each act down once, in order. `settle` waits until nothing is on its way to the notebook.
 */
export async function expectKept(schedule: readonly Happening[], tablets: number, notebook: Notebook, settle = tick): Promise<void> {
  const all = Array.from({ length: tablets }, (_, n) => new Tablet(notebook, isReadable, { now: Date.UTC(2026, 10, 12) + n * 1_000_000 }))
  for (const it of schedule) await happen(all, it)
  for (const tablet of all) await comeBack(tablet, settle)
  for (const tablet of all) await hearAll(tablet, settle)

  const held = await notebook.since(0)
  const ids = held.map(event => event.id)
  expect(new Set(ids).size, 'each act is there once').toBe(ids.length)
  const done = all.flatMap(tablet => tablet.done)
  expect(ids.filter(id => !done.some(event => event.id === id)), 'nothing is there that nobody did').toEqual([])
  for (const tablet of all) {
    const aside = tablet.disk.filter(act => act.stand === 'refused')
    for (const id of tablet.shown) expect(ids.includes(id) !== aside.some(act => act.id === id), 'what was shown is there, or lies aside').toBe(true)
    expect(aside.filter(act => act.reason === '' || isOfTheRun(act.event)), 'what lies aside cannot be of the run, and says why').toEqual([])
    expect(tablet.disk.filter(act => act.stand === 'waiting'), 'nothing waits').toEqual([])
  }

  const standing = standingOf(runState(held), PIECES)
  const inOrder = tablets === 1 ? done.filter(event => ids.includes(event.id)) : [...held].sort(inPlace)
  expect(standing).toEqual(inOrderOnce(inOrder, PIECES))
  expectEachAfterWhatItKnew(all)
  for (const tablet of all) expect(standingOf(runState(tablet.known), PIECES), 'every tablet stands where the notebook stands').toEqual(standing)
}

/** Everything works again: what waits goes, and what was done is heard. */
async function comeBack(tablet: Tablet, settle: typeof tick): Promise<void> {
  await settle()
  tablet.air = 'there'
  tablet.isFull = false
  tablet.flush()
  await settle()
  tablet.wait()
  tablet.flush()
  for (let patience = 0; patience < 50 && tablet.disk.some(act => act.stand === 'waiting'); patience++) {
    await settle()
    tablet.wait()
  }
}

async function hearAll(tablet: Tablet, settle: typeof tick): Promise<void> {
  await tablet.hear()
  await settle()
}

/** On one tablet, what was done later comes later, whatever happened between. */
function expectEachAfterWhatItKnew(all: readonly Tablet[]): void {
  for (const { done, shown } of all) {
    const places = done.filter(event => shown.has(event.id) && isOfTheRun(event)).map(event => event.place ?? 0)
    expect(places, 'later acts of a tablet have higher places').toEqual(places.toSorted((a, b) => a - b))
  }
}

function isOfTheRun(event: RunEvent): boolean {
  return isReadable(event) && !(event.act.kind === 'piece-set-aside' && event.act.piece > PIECES)
}
