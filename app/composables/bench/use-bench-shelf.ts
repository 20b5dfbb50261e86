import { computed, type ComputedRef } from 'vue'
import { useApi } from '~/composables/api/api'
import { z } from 'zod'
import { useMay } from '~/composables/people/use-may'
import { bottleAtHand, BottleFound } from '#shared/shelf/bottle'

/** A colleague who may paint. */
export interface Colleague { id: string, name: string }

const People = z.array(z.object({ id: z.uuid(), name: z.string() }))

/** What lies on the shelf and who is in the workshop, to say at the start of a run where the paint comes from and who paints. */
export interface BenchShelf {
  /** Bottles in use, by the paint in them; the one at hand first. */
  bottles: ComputedRef<ReadonlyMap<string, readonly BottleFound[]>>
  colleagues: ComputedRef<readonly Colleague[]>
  /** The bottle with this code on it; undefined when there is none. */
  byCode: (code: string) => BottleFound | undefined
}

/** Reads shelf and people; whoever may not read one of them chooses nothing of it. */
export async function useBenchShelf(): Promise<BenchShelf> {
  const request = useApi()
  const may = useMay()
  const [bottles, people] = await Promise.all([
    useAsyncData('bottles in use', async () => may('shelf:read') ? z.array(BottleFound).parse(await request('/api/bottles')) : [], { deep: false }),
    useAsyncData('colleagues', async () => may('people:read') ? People.parse(await request('/api/people')) : [], { deep: false }),
  ])
  const all = computed(() => bottles.data.value ?? [])
  return {
    bottles: computed(() => {
      const inUse = all.value.filter(bottle => bottle.state !== 'retired')
      return new Map(inUse.map(({ paintId }) => {
        const own = inUse.filter(bottle => bottle.paintId === paintId)
        const first = bottleAtHand(own)
        return [paintId, first ? [first, ...own.filter(each => each !== first)] : own]
      }))
    }),
    colleagues: computed(() => people.data.value ?? []),
    byCode: code => all.value.find(bottle => bottle.code.toLowerCase() === code.trim().toLowerCase()),
  }
}
