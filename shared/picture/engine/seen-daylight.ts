import { DAYLIGHT_IN_AIR, seenLight, type SeenLight } from '#shared/optics/seen-light'

export type { SeenLight } from '#shared/optics/seen-light'

/** Daylight, seen in air. */
export const SEEN_DAYLIGHT: SeenLight = seenLight(DAYLIGHT_IN_AIR)
