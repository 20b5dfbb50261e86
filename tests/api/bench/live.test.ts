import { setTimeout as delay } from 'node:timers/promises'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Ctx } from '#server/services/ctx'
import { openNotices } from '#server/db/notices'
import { type FollowEnd, followRun } from '#server/services/bench/follow-run'
import { recordActs } from '#server/services/bench/record-acts'
import { RunHub } from '#server/services/bench/run-hub'
import { RUN_CHANNEL } from '#server/services/bench/run-news'
import { LISTENERS_OF_ONE_MAX } from '#server/services/live/notice-hub'
import { changeRole, removePerson } from '#server/services/people/change-role'
import { endSession } from '#server/services/people/end-session'
import { asOwner, testDatabaseUrl } from '../database'
import { testPerson, testWorkshop } from '../factories'
import { act, pass, testRun } from './ground'

const FINISH = { v: 1, kind: 'run-finished' } as const
/** Longer than any of these takes: only news wakes who listens. */
const NEVER_MS = 60_000

let hub: RunHub
beforeAll(async () => {
  const url = await testDatabaseUrl()
  hub = new RunHub(ports => openNotices(url, RUN_CHANNEL, ports))
})
afterAll(() => hub.close())

/** Somebody who follows; `until` waits for what they heard. */
class Follower {
  readonly heard: string[] = []
  beats = 0
  readonly over: Promise<FollowEnd>
  private readonly hangingUp = new AbortController()
  private told: (() => void)[] = []

  constructor(ctx: Ctx, runId: string, since = 0, beatMs = NEVER_MS) {
    this.over = followRun(ctx, runId, since, {
      hear: (view) => {
        this.heard.push(...view.events.map(event => event.id))
        this.tell()
      },
      beat: () => {
        this.beats++
        this.tell()
      },
      signal: this.hangingUp.signal,
    }, hub, beatMs)
  }

  private tell() {
    for (const tell of this.told.splice(0)) tell()
  }

  async until(isSo: () => boolean): Promise<void> {
    while (!isSo()) await new Promise<void>(resolve => this.told.push(resolve))
  }

  async hangUp(): Promise<FollowEnd> {
    this.hangingUp.abort()
    return this.over
  }
}

describe('following a run', () => {
  it('tells what was done before and what others do, each once and in its order', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    const { ctx: other } = await testPerson({ workshopId, role: 'bench' })
    const events = Array.from({ length: 12 }, () => pass(coatIds[0]!, [1]))
    await recordActs(other, run.id, events.slice(0, 2))
    const followers = [new Follower(ctx, run.id), new Follower(other, run.id)]
    await Promise.all(followers.map(follower => follower.until(() => follower.heard.length === 2)))
    for (const event of events.slice(2)) await recordActs(other, run.id, [event])
    for (const follower of followers) {
      await follower.until(() => follower.heard.length === 12)
      expect(follower.heard).toEqual(events.map(event => event.id))
      expect(await follower.hangUp()).toBe('hung up')
    }
    expect(hub.listeners).toBe(0)
  })

  it('goes on where one was, and ends when the run is finished', async () => {
    const { ctx } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    const [first, second] = [pass(coatIds[0]!, [1]), pass(coatIds[0]!, [2])]
    await recordActs(ctx, run.id, [first])
    const [{ seq }] = await asOwner<{ seq: string }>('select seq from run_events where id = $1', [first.id]) as [{ seq: string }]
    await recordActs(ctx, run.id, [second])
    const follower = new Follower(ctx, run.id, Number(seq))
    await follower.until(() => follower.heard.length > 0)
    const end = act(FINISH)
    await recordActs(ctx, run.id, [end])
    expect(await follower.over).toBe('finished')
    expect(follower.heard).toEqual([second.id, end.id])
  })

  it.each<[string, (owner: Ctx, bench: Ctx) => Promise<unknown>]>([
    ['one signs out', (_, bench) => endSession(bench, bench.sessionId)],
    ['one is taken out of the workshop', (owner, bench) => removePerson(owner, bench.personId)],
    ['one\'s role no longer includes it', (owner, bench) => changeRole(owner, bench.personId, 'desk')],
  ])('ends when %s, before another word', async (_, leave) => {
    const { ctx, workshopId } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    const follower = new Follower(bench, run.id)
    await follower.until(() => hub.listeners === 1)
    await delay(50)
    await leave(ctx, bench)
    await recordActs(ctx, run.id, [pass(coatIds[0]!, [1])])
    expect(await follower.over).toBe('no longer here')
    expect(follower.heard).toEqual([])
  })

  it('notices within a beat that one is no longer here, though nothing is done', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { run } = await testRun(ctx)
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    const follower = new Follower(bench, run.id, 0, 20)
    await follower.until(() => follower.beats > 1)
    await removePerson(ctx, bench.personId)
    expect(await follower.over).toBe('no longer here')
  })

  it('hears of the run it follows only, and nothing of another workshop', async () => {
    const { ctx } = await testWorkshop()
    const { ctx: elsewhere } = await testWorkshop()
    const [own, theirs] = [await testRun(ctx), await testRun(elsewhere)]
    const follower = new Follower(ctx, own.run.id)
    await recordActs(elsewhere, theirs.run.id, [pass(theirs.coatIds[0]!, [1])])
    const event = pass(own.coatIds[0]!, [1])
    await recordActs(ctx, own.run.id, [event])
    await follower.until(() => follower.heard.length > 0)
    expect(follower.heard).toEqual([event.id])
    await follower.hangUp()
    await expect(followRun(elsewhere, own.run.id, 0, { hear: () => expect.fail('heard'), beat: () => undefined, signal: AbortSignal.abort() }, hub)).resolves.toBe('hung up')
    expect(await new Follower(elsewhere, own.run.id).over).toBe('no longer here')
  })

  it('catches up when the line to the database broke', async () => {
    const { ctx } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    const follower = new Follower(ctx, run.id)
    await recordActs(ctx, run.id, [pass(coatIds[0]!, [1])])
    await follower.until(() => follower.heard.length === 1)
    await asOwner(`select pg_terminate_backend(pid) from pg_stat_activity where datname = current_database() and query ilike 'listen%'`)
    const event = pass(coatIds[0]!, [2])
    await recordActs(ctx, run.id, [event])
    await follower.until(() => follower.heard.length === 2)
    expect(follower.heard[1]).toBe(event.id)
    await follower.hangUp()
  })

  it('is for so many screens of one person at most, over one line for all of them', async () => {
    const { ctx } = await testWorkshop()
    const { run } = await testRun(ctx)
    const followers = Array.from({ length: LISTENERS_OF_ONE_MAX }, () => new Follower(ctx, run.id))
    await expect(new Follower(ctx, run.id).over).rejects.toMatchObject({ data: { code: 'run/too-many-listening' } })
    const lines = await asOwner(`select 1 from pg_stat_activity where datname = current_database() and query ilike 'listen%'`)
    expect(lines.length).toBeLessThanOrEqual(1)
    await Promise.all(followers.map(follower => follower.hangUp()))
  })
})
