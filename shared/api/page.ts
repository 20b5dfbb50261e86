import { z } from 'zod'

export const PAGE_LIMIT = 50
export const PAGE_LIMIT_MAX = 200

/** Asks for one page of a list: `after` is what the page before called `next`. */
export const PageQuery = z.object({
  after: z.string().max(400).optional(),
  limit: z.coerce.number().int().min(1).max(PAGE_LIMIT_MAX).default(PAGE_LIMIT),
})
export type PageQuery = z.output<typeof PageQuery>

/** One page of a list, and where the following one starts; null on the last. */
export interface Page<T> {
  items: T[]
  next: string | null
}
