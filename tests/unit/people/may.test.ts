import { expect, it } from 'vitest'
import { MAY, may } from '#shared/people/may'
import { ROLES } from '#shared/people/roles'

it('includes nothing for somebody without a role', () => {
  for (const action of Object.keys(MAY) as (keyof typeof MAY)[]) expect(may(null, action)).toBe(false)
})

it('shows the front desk no recipe: neither coats nor paints nor masks nor runs', () => {
  for (const action of ['scheme:read', 'shelf:read', 'mask:read', 'run:read', 'shelf:cost'] as const) expect(may('desk', action)).toBe(false)
})

it('shows what paint costs only to those who keep the shelf', () => {
  expect(ROLES.filter(role => may(role, 'shelf:cost'))).toEqual(['owner', 'painter'])
})

it('leaves people and the workshop itself to owners', () => {
  for (const action of ['people:change', 'workshop:change', 'workshop:remove-demo'] as const)
    expect(ROLES.filter(role => may(role, action))).toEqual(['owner'])
})
