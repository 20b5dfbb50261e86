import { computed, type ComputedRef, type Ref, ref, shallowRef, watch } from 'vue'
import { api } from '~/composables/api/api'
import type { Build } from '~/composables/build/use-build'
import { explain } from '~/errors/explain'
import { whyNotLaid } from './why-not-laid'
import type { BuildUpSequence, BuildUpView } from '#shared/scheme/build-up'
import { cutOut, idsNeeded, layInto } from '#shared/scheme/build-up-lay'
import { countWords } from '#shared/scheme/coat-words'
import type { ZoneName } from '#shared/scheme/coat'
import { coatsOf } from '#shared/scheme/stack-order'
import type { SchemeView } from '#shared/scheme/scheme-view'

/** Where coats to be laid again are taken from. */
export type LayingSource = 'here' | 'build-up' | 'scheme'

/** Coats that are about to be laid again on the scheme that is open. */
export interface UseLaying {
  from: Ref<LayingSource>
  /** Coats chosen of this scheme or of the other. */
  chosen: Ref<readonly string[]>
  buildUpId: Ref<string | undefined>
  buildUp: ComputedRef<BuildUpView | null>
  otherId: Ref<string | undefined>
  other: Ref<SchemeView | null>
  row: Ref<number>
  onto: Ref<readonly ZoneName[] | null>
  /** Whether coats of a build-up stay linked to it. */
  follows: Ref<boolean>
  /** What would be laid; null while nothing is chosen. */
  sequence: ComputedRef<BuildUpSequence | null>
  blockedBy: ComputedRef<string | undefined>
  failed: Ref<string | null>
  /** Lays them; false when that was refused, and why was said. */
  lay: () => boolean
}

/** Picks coats of this scheme, of a build-up or of another scheme, and lays them here in one step that can be undone. */
export function useLaying(build: Build, buildUps: ComputedRef<readonly BuildUpView[]>): UseLaying {
  const from = ref<LayingSource>('here')
  const chosen = ref<readonly string[]>(build.coatId.value ? [build.coatId.value] : [])
  const buildUpId = ref<string>()
  const otherId = ref<string>()
  const other = shallowRef<SchemeView | null>(null)
  const row = ref(build.draft.body.value.stack.length)
  const onto = ref<readonly ZoneName[] | null>(null)
  const follows = ref(true)
  const failed = ref<string | null>(null)

  watch(from, () => {
    chosen.value = []
  })
  watch(otherId, async (id) => {
    other.value = null
    chosen.value = []
    failed.value = null
    if (!id) return
    try {
      const read = await api('/api/schemes/:schemeId', { params: { schemeId: id } })
      if (otherId.value === id) other.value = read
    }
    catch (error) {
      failed.value = explain(error)
    }
  })

  const buildUp = computed(() => buildUps.value.find(each => each.id === buildUpId.value && !each.retired) ?? null)
  const sequence = computed<BuildUpSequence | null>(() => {
    if (from.value === 'build-up') return buildUp.value?.sequence ?? null
    const body = from.value === 'here' ? build.draft.body.value : other.value?.draft
    return body && chosen.value.length > 0 ? cutOut(body, chosen.value) : null
  })
  const blockedBy = computed(() => {
    if (build.whyNot.value) return build.whyNot.value
    if (!sequence.value) return from.value === 'build-up' ? 'Choose a build-up first.' : 'Choose at least one coat first.'
    const missing = whyNotLaid(sequence.value, build.draft.materials.value, build.paints.value)
    return missing ?? (onto.value?.length === 0 ? 'Choose the zones first.' : undefined)
  })

  function lay(): boolean {
    if (!sequence.value || blockedBy.value) return false
    const link = from.value === 'build-up' && follows.value && buildUp.value
      ? { buildUpId: buildUp.value.id, edition: buildUp.value.edition, layingId: crypto.randomUUID() }
      : null
    const ids = Array.from({ length: idsNeeded(sequence.value) }, () => crypto.randomUUID())
    const outcome = layInto(build.draft.body.value, sequence.value, { row: Math.min(row.value, build.draft.body.value.stack.length), onto: onto.value, ids, link })
    if (!outcome.ok) {
      failed.value = outcome.because
      return false
    }
    const words = link && buildUp.value ? `Lay “${buildUp.value.name}”` : `Lay ${countWords(coatsOf(sequence.value.stack).length, 'coat')} again`
    if (!build.act({ do: 'replace-body', body: outcome.body, words })) return false
    const top = outcome.coatIds.at(-1)
    if (top) build.choose(top)
    return true
  }

  return { from, chosen, buildUpId, buildUp, otherId, other, row, onto, follows, sequence, blockedBy, failed, lay }
}
