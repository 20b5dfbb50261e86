import type { SeenWish } from './seen-wish'

/** Daylight in air: what colours are promised by unless told otherwise. */
export const DAYLIGHT_IN_AIR: Readonly<SeenWish> = { light: 'D65' }

/** Names what something is seen by, for caches: alike in and only in what looks alike. */
export function seenKey({ light, water, eye }: SeenWish): string {
  return [
    typeof light === 'string' ? light : `${light.kelvin} K`,
    ...(water ? [`${water.type} ${water.depth} m ${water.distance} m ${water.adapted ? 'adapted' : 'as it is'}`] : []),
    ...(eye === 'bass' ? ['bass'] : []),
  ].join(', ')
}
