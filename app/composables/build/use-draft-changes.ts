import { computed, type ComputedRef, onMounted, shallowRef, watch } from 'vue'
import { changeCount } from './change-count'
import type { Build } from './use-build'
import { useSchemeActions } from '~/composables/scheme/use-scheme-actions'
import type { SchemeBody } from '#shared/scheme/body'
import { diffBodies } from '#shared/scheme/diff'

/** How many things the draft does otherwise than the newest revision; null until it is known, or when there is none. */
export function useDraftChanges(build: Build): ComputedRef<number | null> {
  const { readRevision } = useSchemeActions()
  const head = shallowRef<SchemeBody | null>(null)

  async function read() {
    const { id, headNumber } = build.scheme.value
    if (headNumber === 0) return
    try {
      const revision = await readRevision(id, headNumber)
      head.value = revision.body
    }
    catch {
      head.value = null // The count is a help only; without it the ring says draft.
    }
  }
  onMounted(() => void read())
  watch(() => build.scheme.value.headNumber, () => void read())
  return computed(() => head.value && changeCount(diffBodies(head.value, build.draft.body.value)))
}
