import { watch } from 'vue'
import type { KeptDraft } from '~/composables/scheme/kept-draft'
import { workOnDraft } from '~/composables/scheme/work-on-draft'
import { openDraft } from '~/stores/scheme-draft'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import { Problem } from '#shared/errors/problem'
import { SchemeBody } from '#shared/scheme/body'
import type { RevisionView, SchemeView } from '#shared/scheme/scheme-view'
import { body, coat, id, paint } from './bodies'

const SCHEME = id('blank', 77)
const materials = (blankId: string) => ({ paints: [paint(1)], blank: { id: blankId, shape: builtInBlank('minnow-90') } })

/** The server's one scheme, and a line to it that can break. */
export class Server {
  version = 1
  draft: SchemeBody = body(1)
  online = true
  losesAnswers = false
  published: { note: string, draft: SchemeBody }[] = []

  view(): SchemeView {
    return {
      id: SCHEME, name: 'Perch', fish: '', version: this.version, draft: structuredClone(this.draft), materials: materials(this.draft.blankId), headNumber: 0,
      savedAt: `v${this.version}`, savedBy: null, retired: false, origin: null, revisions: [],
    }
  }

  private reach() {
    if (!this.online) throw new TypeError('Failed to fetch')
  }

  async save(draft: SchemeBody, version: number) {
    this.reach()
    if (version !== this.version) throw new Problem({ code: 'scheme/changed-meanwhile', version: this.version })
    this.version++
    this.draft = SchemeBody.parse(draft)
    if (this.losesAnswers) throw new TypeError('Failed to fetch')
    return { version: this.version, savedAt: `v${this.version}` }
  }

  async publish(note: string, version: number): Promise<RevisionView> {
    this.reach()
    if (version !== this.version) throw new Problem({ code: 'scheme/changed-meanwhile', version: this.version })
    this.published.push({ note, draft: this.draft })
    return { id: SCHEME, number: 1, note, coats: 1, publishedAt: '', publishedBy: null, schemeId: SCHEME, schemeName: '', body: this.draft, materials: materials(this.draft.blankId), engineVersion: '1' }
  }

  async read() {
    this.reach()
    return this.view()
  }
}

/** One painter with a page and a device. Time passes only when `wait` is called. */
export async function painter(server: Server, device: { kept: KeptDraft | null } = { kept: null }, mayChange = true) {
  const scheme = server.view()
  const draft = openDraft(scheme)
  let timers: (() => void)[] = []
  let clock = 0
  const work = workOnDraft(scheme, draft, {
    readScheme: () => server.read(),
    readRevision: async () => ({ ...await server.publish('', server.version), body: body(7) }),
    readMaterials: async blankId => materials(blankId),
    save: (unsaved, version) => server.save(unsaved, version),
    publish: (note, version) => server.publish(note, version),
    now: () => clock += 10_000,
  }, mayChange)
  const states: string[] = []
  watch(draft.saveState, state => states.push(state.is), { flush: 'sync' })
  await work.start({
    openShelf: async () => ({
      read: async () => structuredClone(device.kept),
      write: async (_, kept) => {
        device.kept = structuredClone(kept)
      },
    }),
    later: (_, run) => {
      timers.push(run)
      return () => {
        timers = timers.filter(each => each !== run)
      }
    },
  })
  return {
    ...work,
    device,
    states,
    lay: (n: number) => work.do({ do: 'add-coat', coat: coat(n), row: work.body.value.stack.length }),
    async wait() {
      for (const run of timers.splice(0)) run()
      for (let i = 0; i < 5; i++) await new Promise(resolve => setImmediate(resolve))
    },
  }
}
