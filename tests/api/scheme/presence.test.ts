import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Ctx } from '#server/services/ctx'
import { openNotices } from '#server/db/notices'
import { changeRole, removePerson } from '#server/services/people/change-role'
import { endSession } from '#server/services/people/end-session'
import { beGone, beHere } from '#server/services/scheme/be-here'
import { changeScheme } from '#server/services/scheme/change-scheme'
import { DraftHub } from '#server/services/scheme/draft-hub'
import { DRAFT_CHANNEL, readDraftNews } from '#server/services/scheme/draft-news'
import { followDraft } from '#server/services/scheme/follow-draft'
import { getScheme } from '#server/services/scheme/get-scheme'
import { saveDraft } from '#server/services/scheme/save-draft'
import type { DraftLiveView } from '#shared/scheme/presence'
import { coatsOf } from '#shared/scheme/stack-order'
import { mergeBodies } from '#shared/scheme/merge-bodies'
import { testDatabaseUrl } from '../database'
import { testPerson, testWorkshop } from '../factories'
import { testScheme, withPasses } from './ground'

/** Longer than any of these takes: only news wakes who follows. */
const NEVER = { beatMs: 60_000, goneAfterMs: 60_000 }

/** Two processes on one database: each has a line of its own. */
let hubs: [DraftHub, DraftHub]
beforeAll(async () => {
  const url = await testDatabaseUrl()
  const hub = () => new DraftHub(ports => openNotices(url, DRAFT_CHANNEL, ports))
  hubs = [hub(), hub()]
})
afterAll(() => Promise.all(hubs.map(hub => hub.close())))

/** Somebody who has a draft open in a tab. */
class Reader {
  readonly tab = crypto.randomUUID()
  readonly heard: DraftLiveView[] = []
  readonly over: Promise<string>
  private readonly closing = new AbortController()
  private told: (() => void)[] = []

  constructor(private readonly ctx: Ctx, private readonly schemeId: string, hub: DraftHub, times = NEVER) {
    const tell = () => {
      for (const each of this.told.splice(0)) each()
    }
    this.over = followDraft(ctx, schemeId, this.tab, {
      hear: (view) => {
        this.heard.push(view)
        tell()
      },
      beat: tell,
      signal: this.closing.signal,
    }, hub, times)
  }

  get last() {
    return this.heard.at(-1)
  }

  get names() {
    return this.last?.others.map(({ person }) => person.name) ?? []
  }

  async until(isSo: () => boolean) {
    while (!isSo()) await new Promise<void>(resolve => this.told.push(resolve))
  }

  /** Has it open, with a coat in hand. */
  say(coatId: string | null = null) {
    return beHere(this.ctx, this.schemeId, { tab: this.tab, coatId })
  }

  async close() {
    this.closing.abort()
    return this.over
  }
}

async function opened() {
  const { ctx, workshopId } = await testWorkshop()
  const { scheme } = await testScheme(ctx)
  const { ctx: painter } = await testPerson({ workshopId, role: 'painter' })
  return { ctx, painter, workshopId, scheme, coatId: coatsOf(scheme.draft.stack)[0]!.id }
}

describe('two people in one draft, on two processes', () => {
  it('see each other with the coat in hand, and each other go at once', async () => {
    const { ctx, painter, scheme, coatId } = await opened()
    const [ann, ben] = [new Reader(ctx, scheme.id, hubs[0]), new Reader(painter, scheme.id, hubs[1])]
    await Promise.all([ann, ben].map(each => each.until(() => each.heard.length > 0)))
    // The lines may still be opening: they say it as often as a page would, until both were heard.
    const saying = setInterval(() => void Promise.all([ann.say(coatId), ben.say()]), 100)
    await Promise.all([ann.until(() => ann.names.length > 0), ben.until(() => ben.names.length > 0)])
    clearInterval(saying)
    expect(ann.names).toEqual(['Test painter'])
    expect(ben.last?.others).toEqual([{ tab: ann.tab, person: { id: ctx.personId, name: 'Test owner' }, coatId }])
    await ann.close()
    await ben.until(() => ben.names.length === 0)
    expect(await ben.close()).toBe('hung up')
  })

  it('hear of a save by its version', async () => {
    const { ctx, painter, scheme } = await opened()
    const ben = new Reader(painter, scheme.id, hubs[1])
    await ben.until(() => ben.last?.version === 1)
    await saveDraft(ctx, scheme.id, 1, withPasses(scheme.draft, 9))
    await ben.until(() => ben.last?.version === 2)
    await ben.close()
  })

  it('whoever says nothing for long is no longer shown', async () => {
    const { ctx, painter, scheme } = await opened()
    const ben = new Reader(painter, scheme.id, hubs[1], { beatMs: 30, goneAfterMs: 300 })
    await ben.until(() => ben.heard.length > 0)
    const tab = crypto.randomUUID()
    const saying = setInterval(() => void beHere(ctx, scheme.id, { tab, coatId: null }), 50)
    await ben.until(() => ben.names.length === 1)
    clearInterval(saying)
    await ben.until(() => ben.names.length === 0)
    await ben.close()
  })

  it.each<[string, (owner: Ctx, painter: Ctx) => Promise<unknown>]>([
    ['one signs out', (_, painter) => endSession(painter, painter.sessionId)],
    ['one is taken out of the workshop', (owner, painter) => removePerson(owner, painter.personId)],
    ['one\'s role no longer includes it', (owner, painter) => changeRole(owner, painter.personId, 'desk')],
  ])('it ends when %s', async (_, leave) => {
    const { ctx, painter, scheme } = await opened()
    const ben = new Reader(painter, scheme.id, hubs[0], { ...NEVER, beatMs: 30 })
    await ben.until(() => ben.heard.length > 0)
    await leave(ctx, painter)
    expect(await ben.over).toBe('no longer here')
  })
})

describe('walls', () => {
  it('nobody of another workshop is here, nor can say so, nor follow', async () => {
    const { ctx, scheme } = await opened()
    const { ctx: stranger } = await testWorkshop()
    const ann = new Reader(ctx, scheme.id, hubs[0])
    await ann.until(() => ann.heard.length > 0)
    await expect(beHere(stranger, scheme.id, { tab: crypto.randomUUID(), coatId: null })).rejects.toMatchObject({ data: { code: 'scheme/not-found' } })
    expect(await new Reader(stranger, scheme.id, hubs[0]).over).toBe('no longer here')
    await beGone(stranger, scheme.id, ann.tab)
    await saveDraft(ctx, scheme.id, 1, withPasses(scheme.draft, 9))
    await ann.until(() => ann.last?.version === 2)
    expect(ann.heard.flatMap(view => view.others)).toEqual([])
    await ann.close()
  })

  it('nobody sends another one away', async () => {
    const { ctx, painter, scheme } = await opened()
    const [ann, ben] = [new Reader(ctx, scheme.id, hubs[0]), new Reader(painter, scheme.id, hubs[0])]
    const saying = setInterval(() => void ann.say(), 100)
    await ben.until(() => ben.names.length === 1)
    clearInterval(saying)
    await beGone(painter, scheme.id, ann.tab)
    await saveDraft(ctx, scheme.id, 1, withPasses(scheme.draft, 9))
    await ben.until(() => ben.last?.version === 2)
    expect(ben.names).toEqual(['Test owner'])
    await Promise.all([ann.close(), ben.close()])
  })

  it('the front desk, which reads no recipes, is refused', async () => {
    const { workshopId, scheme } = await opened()
    const { ctx: desk } = await testPerson({ workshopId, role: 'desk' })
    await expect(beHere(desk, scheme.id, { tab: crypto.randomUUID(), coatId: null })).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
    await expect(new Reader(desk, scheme.id, hubs[0]).over).rejects.toMatchObject({ data: { code: 'auth/not-allowed' } })
  })

  it('what is told between processes names nobody and nothing of a recipe', async () => {
    expect(readDraftNews('{"is":"saved","body":1}')).toBeNull()
    expect(readDraftNews('not even this')).toBeNull()
  })
})

describe('two people who save one draft', () => {
  it('each on another coat both have their work in the end, and nothing is overwritten on the way', async () => {
    const { ctx, painter, scheme } = await opened()
    const [first, second] = coatsOf(scheme.draft.stack).map(coat => coat.id)
    const passes = (coatId: string | undefined, count: number) => ({
      ...scheme.draft,
      stack: scheme.draft.stack.map(item => item.act === 'coat' && item.coat.id === coatId ? { ...item, coat: { ...item.coat, passes: count } } : item),
    })
    await saveDraft(ctx, scheme.id, 1, passes(first, 7))
    await expect(saveDraft(painter, scheme.id, 1, passes(second, 9))).rejects.toMatchObject({ data: { code: 'scheme/changed-meanwhile', version: 2 } })
    const theirs = await getScheme(painter, scheme.id)
    const { body, clashes } = mergeBodies(scheme.draft, passes(second, 9), theirs.draft)
    expect(clashes).toEqual([])
    await saveDraft(painter, scheme.id, theirs.version, body)
    expect(coatsOf((await getScheme(ctx, scheme.id)).draft.stack).map(coat => coat.passes)).toEqual([7, 9])
  })

  it('a rename by one leaves the draft that the other works on as it was', async () => {
    const { ctx, painter, scheme } = await opened()
    await changeScheme(ctx, scheme.id, 1, { name: 'Another' })
    const theirs = await getScheme(painter, scheme.id)
    expect([theirs.version, theirs.draft]).toEqual([2, scheme.draft])
  })
})
