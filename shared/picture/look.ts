import type { SchemeBody } from '#shared/scheme/body'
import type { Materials } from '#shared/scheme/materials'

/** Everything that decides how a finish looks: what is done, and what it is done with. */
export interface Look {
  body: SchemeBody
  materials: Materials
}
