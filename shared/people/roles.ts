import { z } from 'zod'

/** Who somebody is in one workshop. */
export const ROLES = ['owner', 'painter', 'bench', 'desk'] as const
export const Role = z.enum(ROLES)
export type Role = z.output<typeof Role>

/** The role as a person reads it. */
export const ROLE_WORDS: Readonly<Record<Role, string>> = {
  owner: 'Owner',
  painter: 'Painter',
  bench: 'Bench painter',
  desk: 'Front desk',
}

/** What the role is for, one sentence, where a role is chosen. */
export const ROLE_PURPOSE: Readonly<Record<Role, string>> = {
  owner: 'Runs the workshop: people, shelf and cost, and everything below.',
  painter: 'Invents finishes: builds schemes, keeps the shelf and the blanks, follows runs.',
  bench: 'Repeats finishes: follows published schemes at the bench and notes what was done.',
  desk: 'Faces the customer: photos and cards. Never sees a recipe.',
}
