import { useLocalStorage } from '@vueuse/core'
import { computed, type ComputedRef } from 'vue'
import { useMay } from '~/composables/people/use-may'
import { useSession } from '~/composables/people/use-session'
import { useWorkshopEdits } from '~/composables/people/use-workshop-edits'
import { OwnPlanning, planWith, type PlanningValues } from '#shared/quantities/planning-values'

/** What one plans with: the usual values, over them the workshop's, over them one's own on this device. */
export interface UsePlanning {
  plan: ComputedRef<PlanningValues>
  /** Something here is one's own, not the workshop's. */
  isOwn: ComputedRef<boolean>
  /** Whether one may set the workshop's. */
  mayKeep: ComputedRef<boolean>
  change: (values: OwnPlanning) => void
  /** Back to the workshop's values. */
  forget: () => void
  /** Makes what stands here the workshop's values; throws when it is refused. */
  keepForWorkshop: () => Promise<void>
}

/** What of a stored text is planning values; nothing of what is none. */
function storedPlanning(text: string): OwnPlanning {
  try {
    return OwnPlanning.parse(JSON.parse(text))
  }
  catch {
    return {}
  }
}

/** Planning values of the person in this workshop: kept on the device, or by an owner for everybody. */
export function usePlanning(): UsePlanning {
  const { session } = useSession()
  const may = useMay()
  const { change: changeWorkshop } = useWorkshopEdits()
  const own = useLocalStorage<OwnPlanning>(
    `planning ${session.value?.workshop?.id} ${session.value?.person.id}`, {},
    { serializer: { read: storedPlanning, write: value => JSON.stringify(value) }, shallow: true, initOnMounted: true },
  )
  const workshops = computed(() => session.value?.workshop?.planning ?? {})
  const plan = computed(() => planWith(workshops.value, own.value))

  function forget() {
    own.value = {}
  }
  return {
    plan,
    isOwn: computed(() => Object.keys(own.value).length > 0),
    mayKeep: computed(() => may('workshop:change')),
    change(values) {
      own.value = { ...own.value, ...values, ...values.transfer && { transfer: { ...own.value.transfer, ...values.transfer } } }
    },
    forget,
    async keepForWorkshop() {
      await changeWorkshop({ planning: plan.value })
      forget()
    },
  }
}
