import { onBeforeUnmount, onMounted, watch } from 'vue'
import { api } from '~/composables/api/api'
import { draftDevice } from './draft-device'
import { draftShelf } from './draft-shelf'
import { thisTab } from './draft-tab'
import type { DraftShelf } from './kept-draft'
import { schemeKey, SCHEMES_KEY } from './scheme-keys'
import { type DraftPorts, type SchemeDraft, workOnDraft } from './work-on-draft'
import { type OpenDraft, openDraft, useSchemeDraftStore } from '~/stores/scheme-draft'
import { useMay } from '~/composables/people/use-may'
import { useSession } from '~/composables/people/use-session'
import type { SchemeView } from '#shared/scheme/scheme-view'

export type { SchemeDraft } from './work-on-draft'

const ifMatch = (version: number) => ({ 'if-match': `"v${version}"` })

function portsOf(schemeId: string): DraftPorts {
  return {
    readScheme: () => api('/api/schemes/:schemeId', { params: { schemeId } }),
    readRevision: number => api('/api/schemes/:schemeId/revisions/:number', { params: { schemeId, number } }),
    readMaterials: blankId => api('/api/schemes/:schemeId/materials', { params: { schemeId }, query: { blankId } }),
    save: (body, version) => api('/api/schemes/:schemeId/draft', { params: { schemeId }, method: 'PUT', body: { body }, headers: ifMatch(version) }),
    async publish(note, version) {
      const revision = await api('/api/schemes/:schemeId/revisions', { params: { schemeId }, method: 'POST', body: { note }, headers: ifMatch(version) })
      await refreshNuxtData([schemeKey(schemeId), SCHEMES_KEY])
      return revision
    },
    now: () => Date.now(),
  }
}

/** A browser that answers no sooner keeps nothing for now, ms. */
const DEVICE_WITHIN_MS = 3_000

/** The slots of this tab and person. */
async function openShelf(personId: string): Promise<DraftShelf> {
  const late = new Promise<never>((_, reject) => {
    window.setTimeout(() => reject(new Error('The browser does not open its storage.')), DEVICE_WITHIN_MS)
  })
  const opening = async () => {
    // Opened before the first change: a page that goes away cannot wait for it any more.
    const [tab] = await Promise.all([thisTab(), draftDevice()])
    return draftShelf({ open: draftDevice, tab, personId, now: () => Date.now(), old: window.localStorage })
  }
  return Promise.race([opening(), late])
}

/** The draft that is already open when it holds work or is as the server has it; otherwise one opened anew. */
function draftFor(scheme: SchemeView, found: OpenDraft | undefined): OpenDraft {
  if (!found) return openDraft(scheme)
  const isCurrent = found.keeper ? found.keeper.isUnsaved() || found.keeper.version() === scheme.version : found.base === scheme.draft
  if (!isCurrent) return openDraft(scheme)
  found.materials.value = scheme.materials
  return found
}

/**
 * Opens a scheme's draft: the body as one has it now, with undo, saved by itself and kept on the device until it is.
 * Needs the scheme as `useScheme` read it; called in the set-up of the component that shows it.
 */
export function useSchemeDraft(scheme: SchemeView): SchemeDraft {
  const store = import.meta.client ? useSchemeDraftStore() : null
  const { session } = useSession()
  const draft = draftFor(scheme, store?.find(scheme.id))
  store?.put(scheme.id, draft)
  const work = workOnDraft(scheme, draft, portsOf(scheme.id), useMay()('scheme:change'))

  watch(() => work.body.value.blankId, (blankId) => {
    if (blankId === work.materials.value.blank.id) return
    // Without a connection it is drawn on the blank before, until the shelf can be read again.
    work.refreshMaterials().catch(() => undefined)
  })

  const keepNow = () => void draft.keeper?.keepNow()
  const saveNow = () => void work.saveNow()

  onMounted(() => {
    if (!draft.keeper) {
      void work.start({
        openShelf: () => openShelf(session.value?.person.id ?? 'nobody'),
        later: (ms, run) => {
          const timer = window.setTimeout(run, ms)
          return () => window.clearTimeout(timer)
        },
      })
    }
    window.addEventListener('pagehide', keepNow)
    window.addEventListener('online', saveNow)
  })
  onBeforeUnmount(() => {
    window.removeEventListener('pagehide', keepNow)
    window.removeEventListener('online', saveNow)
    saveNow()
  })

  return work
}
