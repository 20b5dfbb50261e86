import type { Gun } from '#shared/scheme/coat'

/** Places an airbrush is held at, by their words. */
export type AimPlace = 'all over' | 'above' | 'shoulder' | 'flank' | 'belly'

export const AIM_PLACES: readonly { value: AimPlace, label: string }[] = [
  { value: 'all over', label: 'all over' }, { value: 'above', label: 'above' }, { value: 'shoulder', label: 'shoulder' }, { value: 'flank', label: 'flank' }, { value: 'belly', label: 'belly' },
]
const USUAL: Readonly<Record<Exclude<AimPlace, 'all over'>, number>> = { above: 12, shoulder: 50, flank: 90, belly: 165 }
const USUAL_FOOTPRINT = 0.8

/** The place nearest to an aim. */
export function aimPlace(gun: Gun): AimPlace {
  if (gun.aim === 'all over') return 'all over'
  if (gun.angle < 31) return 'above'
  if (gun.angle < 70) return 'shoulder'
  return gun.angle <= 127 ? 'flank' : 'belly'
}

/** The gun held at a place, with the spray as wide as it was. */
export function aimAt(place: AimPlace, gun: Gun): Gun {
  if (place === 'all over') return { aim: 'all over' }
  return { aim: 'from', angle: USUAL[place], footprint: gun.aim === 'from' ? gun.footprint : USUAL_FOOTPRINT }
}

/** How wide the spray is, in words. */
export function footprintWords(footprint: number): string {
  if (footprint < 0.25) return 'a fine line'
  if (footprint <= 0.5) return 'a line'
  if (footprint < 0.7) return 'a soft line'
  if (footprint <= 1.1) return 'a fade'
  return footprint < 1.8 ? 'a wide fade' : 'flooding'
}
