import type { Action } from '#shared/people/may'
import { may } from '#shared/people/may'
import type { Role } from '#shared/people/roles'

/** One place of the product: its word, its way, and what a role must be allowed to do there for it to be shown. */
export interface Place {
  readonly word: string
  readonly to: string
  readonly needs: Action
}

/** The places, in the order work passes through them. */
export const PLACES: readonly Place[] = [
  { word: 'Schemes', to: '/schemes', needs: 'scheme:look' },
  { word: 'Blanks', to: '/blanks', needs: 'blank:read' },
  { word: 'Shelf', to: '/shelf', needs: 'shelf:read' },
  { word: 'Runs', to: '/runs', needs: 'run:read' },
  { word: 'Cards', to: '/cards', needs: 'card:read' },
  { word: 'Workshop', to: '/workshop', needs: 'workshop:read' },
]

/** The places a role may enter; none for somebody without a workshop. */
export function placesFor(role: Role | null | undefined): readonly Place[] {
  return PLACES.filter(place => may(role, place.needs))
}

/** Whether a path lies in a place: the place itself or anything under it. */
export function isIn(place: Place, path: string): boolean {
  return path === place.to || path.startsWith(`${place.to}/`)
}
