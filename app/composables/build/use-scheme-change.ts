import { api } from '~/composables/api/api'
import type { Build } from './use-build'
import { useSchemeActions } from '~/composables/scheme/use-scheme-actions'
import type { SchemeChange } from '#shared/scheme/scheme-input'

/** Changes the scheme that is open. Its draft may have been saved since the page was read, so the newest version is asked for first. */
export function useSchemeChange(build: Pick<Build, 'scheme' | 'draft'>): (change: SchemeChange) => Promise<void> {
  const { change } = useSchemeActions()
  return async (wanted) => {
    await build.draft.saveNow()
    const { id, version } = await api('/api/schemes/:schemeId', { params: { schemeId: build.scheme.value.id } })
    await change({ id, version }, wanted)
  }
}
