import { computed, ref, type ComputedRef, type Ref } from 'vue'
import type { SEEN_EYES, SeenLamp, SeenWish } from '#shared/optics/seen-wish'
import type { Water } from '#shared/optics/water'

/** What a blank is seen by: the light, and the water it swims in. */
export interface UseSeen {
  lamp: Ref<SeenLamp>
  water: Ref<Water>
  /** Metres down; at 0 it hangs in air. */
  depth: Ref<number>
  /** From how far it is seen under water, m. */
  distance: Ref<number>
  /** Seen by an eye used to the water; otherwise as a camera set for the light above sees it. */
  adapted: Ref<boolean>
  /** Whose eye: a person's, or what a bass's two cones take. */
  eye: Ref<typeof SEEN_EYES[number]>
  wish: ComputedRef<SeenWish>
}

/** Sets a light and a water to look by: daylight, in air, until something else is chosen. */
export function useSeen(): UseSeen {
  const lamp = ref<SeenLamp>('D65')
  const water = ref<Water>('tea-stained')
  const depth = ref(0), distance = ref(0.5)
  const adapted = ref(true)
  const eye = ref<typeof SEEN_EYES[number]>('person')
  return {
    lamp, water, depth, distance, adapted, eye,
    wish: computed(() => ({
      light: lamp.value,
      ...(depth.value > 0 ? { water: { type: water.value, depth: depth.value, distance: distance.value, adapted: adapted.value } } : {}),
      ...(eye.value === 'bass' ? { eye: eye.value } : {}),
    })),
  }
}
