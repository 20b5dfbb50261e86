import { createHash } from 'node:crypto'
import type { SchemeBody } from '#shared/scheme/body'
import type { Materials } from '#shared/scheme/materials'
import { canonicalJson } from '#shared/scheme/canonical'

/** SHA-256 of a finish and what it is made with, hex: alike exactly when nothing differs. */
export function bodyHash(body: SchemeBody, materials: Materials): string {
  return createHash('sha256').update(canonicalJson({ body, materials })).digest('hex')
}
