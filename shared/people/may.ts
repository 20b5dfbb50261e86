import type { Role } from './roles'

/** Everybody in a workshop. */
const ALL: readonly Role[] = ['owner', 'painter', 'bench', 'desk']
/** Those who may read a recipe. */
const RECIPE: readonly Role[] = ['owner', 'painter', 'bench']
/** Those who may change one. */
const PAINT: readonly Role[] = ['owner', 'painter']
const OWNER: readonly Role[] = ['owner']
/** Those who show finished work. */
const SHOW: readonly Role[] = ['owner', 'painter', 'desk']

/** The one table of who may do what; the server refuses by it and the interface hides or explains by it. */
export const MAY = {
  'workshop:read': ALL,
  'workshop:change': OWNER,
  'workshop:remove-demo': OWNER,
  'people:read': ALL,
  'people:change': OWNER,
  'scheme:look': ALL, // its name, fish, blank and picture
  'scheme:read': RECIPE, // its coats, mixes and settings
  'scheme:change': PAINT,
  'shelf:read': RECIPE,
  'shelf:change': PAINT,
  'shelf:cost': PAINT,
  'blank:read': ALL,
  'blank:change': PAINT,
  'mask:read': RECIPE,
  'mask:change': PAINT,
  'run:read': RECIPE,
  'run:record': RECIPE,
  'photo:read': ALL,
  'photo:add': ALL,
  'photo:remove': SHOW,
  'card:read': SHOW,
  'card:change': SHOW,
} as const satisfies Record<string, readonly Role[]>

export type Action = keyof typeof MAY

/** Whether a role includes an action. */
export function may(role: Role | null | undefined, action: Action): boolean {
  return role != null && (MAY[action] as readonly Role[]).includes(role)
}
