import { describe, expect, it } from 'vitest'
import type { ActBox } from '~/bench/device/act-box'
import { newActs } from '~/bench/new-acts'
import { moveOldActs } from '~/bench/old-acts'
import type { RunEvent } from '#shared/bench/run-event'
import { event } from './finish'

const done = (n: number) => event(n, { v: 1, kind: 'step-done', stepId: `step:${n}` })

/** A browser's storage. */
class Drawer implements Storage {
  private readonly kept = new Map<string, string>()
  get length() { return this.kept.size }
  clear() { this.kept.clear() }
  getItem(key: string) { return this.kept.get(key) ?? null }
  key(n: number) { return [...this.kept.keys()][n] ?? null }
  removeItem(key: string) { this.kept.delete(key) }
  setItem(key: string, value: string) { this.kept.set(key, value) }
}

function box(fails = false) {
  const kept: [runId: string, event: RunEvent][] = []
  const made: Pick<ActBox, 'keep' | 'ofRun'> = {
    async keep(runId, events) {
      if (fails) throw new DOMException('full', 'QuotaExceededError')
      kept.push(...events.map((one): [string, RunEvent] => [runId, one]))
    },
    ofRun: async runId => kept.filter(([run]) => run === runId).map(([, one]) => ({ id: one.id, runId, event: one, stand: 'waiting', reason: '', personId: 'one', workshopId: 'w' })),
  }
  return { kept, box: made as ActBox }
}

function storage() {
  const drawer = new Drawer()
  const put = (person: string, place: number, one: RunEvent) => drawer.setItem(`countershade:act:${person}:run:${one.id}`, JSON.stringify({ place, event: one }))
  put('one', 2, done(2))
  put('one', 1, done(1))
  put('other', 1, done(3))
  drawer.setItem('countershade:act:one:run:broken', '{')
  return drawer
}

describe('acts an earlier form of the application kept', () => {
  it('are moved in the order they were done, those of somebody else and what cannot be read stay', async () => {
    const [old, { kept, box: into }] = [storage(), box()]
    await moveOldActs(old, 'one', into)
    expect(kept).toEqual([['run', done(1)], ['run', done(2)]])
    expect(old.length).toBe(2)
  })

  it('lie in the box once when they are moved twice', async () => {
    const { kept, box: into } = box()
    await moveOldActs(storage(), 'one', into)
    await moveOldActs(storage(), 'one', into)
    expect(kept).toHaveLength(2)
  })

  it('stay where they are when the box is full', async () => {
    const old = storage()
    await expect(moveOldActs(old, 'one', box(true).box)).rejects.toThrow()
    expect(old.length).toBe(4)
  })
})

describe('new acts', () => {
  it('come after everything their tablet knew, each with an id of its own', () => {
    const acts = newActs([{ v: 1, kind: 'run-finished' }, { v: 1, kind: 'run-finished' }], [{ ...done(1), place: 7 }, done(2)], Date.UTC(2026, 0, 2))
    expect(acts.map(act => act.place)).toEqual([8, 9])
    expect(acts[0]!.doneAt).toBe('2026-01-02T00:00:00.000Z')
    expect(acts[0]!.id).not.toBe(acts[1]!.id)
  })
})
