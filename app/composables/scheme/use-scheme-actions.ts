import { schemeKey, SCHEMES_KEY } from './scheme-keys'
import type { z } from 'zod'
import { api } from '~/composables/api/api'
import type { Fork, SchemeChange, SchemeStart } from '#shared/scheme/scheme-input'
import type { RevisionView, SchemeView } from '#shared/scheme/scheme-view'

/** What can be done with schemes outside their draft; each throws when it is refused. */
export interface SchemeActions {
  create: (start: z.input<typeof SchemeStart>) => Promise<SchemeView>
  /** Renames, sets the fish, retires or brings back; `version` is the one that was read. */
  change: (scheme: Pick<SchemeView, 'id' | 'version'>, change: SchemeChange) => Promise<SchemeView>
  /** Starts a colourway from a revision or from the draft. */
  fork: (schemeId: string, fork: Fork) => Promise<SchemeView>
  readRevision: (schemeId: string, number: number) => Promise<RevisionView>
}

/** Starting, naming, retiring and forking schemes. */
export function useSchemeActions(): SchemeActions {
  const again = async (...keys: string[]) => refreshNuxtData([SCHEMES_KEY, ...keys])

  return {
    async create(start) {
      // The key lets a request that is sent again on a bad line start one scheme, not two.
      const scheme = await api('/api/schemes', { method: 'POST', body: start, headers: { 'idempotency-key': crypto.randomUUID() } })
      // Whoever started it goes on to it; the list is read again meanwhile.
      void again()
      return scheme
    },
    async change({ id, version }, change) {
      const scheme = await api('/api/schemes/:schemeId', { params: { schemeId: id }, method: 'PATCH', body: change, headers: { 'if-match': `"v${version}"` } })
      await again(schemeKey(id))
      return scheme
    },
    async fork(schemeId, fork) {
      const scheme = await api('/api/schemes/:schemeId/fork', { params: { schemeId }, method: 'POST', body: fork, headers: { 'idempotency-key': crypto.randomUUID() } })
      void again()
      return scheme
    },
    readRevision: (schemeId, number) => api('/api/schemes/:schemeId/revisions/:number', { params: { schemeId, number } }),
  }
}
