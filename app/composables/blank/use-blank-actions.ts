import { api } from '~/composables/api/api'
import { BLANKS_KEY, blankKey } from './blank-keys'
import type { BlankChange, BlankDraft, BlankView } from '#shared/blank/blank-view'

/** What can be done with blanks; each throws when it is refused. */
export interface BlankActions {
  add: (draft: BlankDraft) => Promise<BlankView>
  /** Renames, retires or brings back; a blank changed meanwhile is refused. */
  change: (blank: BlankView, change: Partial<Pick<BlankChange, 'name' | 'retired'>>) => Promise<BlankView>
}

/** Adding and changing blanks. */
export function useBlankActions(): BlankActions {
  return {
    async add(draft) {
      // The key lets a request that is sent again on a bad line add one blank, not two.
      const blank = await api('/api/blanks', { method: 'POST', body: draft, headers: { 'idempotency-key': crypto.randomUUID() } })
      await refreshNuxtData([BLANKS_KEY])
      return blank
    },
    async change({ id, version, name, shape }, change) {
      const blank = await api('/api/blanks/:blankId', { params: { blankId: id }, method: 'PUT', body: { name, shape, ...change }, headers: { 'if-match': `"v${version}"` } })
      await refreshNuxtData([BLANKS_KEY, blankKey(id)])
      return blank
    },
  }
}
