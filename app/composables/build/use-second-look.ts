import { computed, type ComputedRef } from 'vue'
import type { Build } from './use-build'
import type { ZoneColour } from '#shared/picture/zone-colours'
import type { Finding, GroundUnder } from '#shared/scheme/second-look/finding'
import { openFindings, secondLook } from '#shared/scheme/second-look/second-look'

/** What an old hand would ask about this draft: all of it, and what nobody has answered yet. */
export function useSecondLook({ draft, paints, zones }: Pick<Build, 'draft' | 'paints' | 'zones'>): { findings: ComputedRef<Finding[]>, open: ComputedRef<Finding[]> } {
  const findings = computed(() => secondLook(draft.body.value, draft.materials.value, groundsUnder(zones.value ?? []), paints.value))
  return { findings, open: computed(() => openFindings(findings.value, draft.body.value)) }
}

/** What lies under each coat in the zone that gets most of it. */
function groundsUnder(zones: readonly ZoneColour[]): GroundUnder[] {
  const found = new Map<string, GroundUnder & { passes: number }>()
  for (const { wayUp } of zones) {
    wayUp.forEach(({ coatId, passes, change }, i) => {
      const under = wayUp[i - 1]
      if (coatId === null || !under) return
      const before = found.get(coatId)
      const most = Math.max(change, before?.change ?? 0)
      found.set(coatId, before && before.passes >= passes ? { ...before, change: most } : { coatId, below: under.lab, change: most, passes })
    })
  }
  return [...found.values()]
}
