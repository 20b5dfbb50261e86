/** A file that is wrong everywhere says so at this many places. */
const TOLD_MOST = 20

/**
 * Paths of the fields that stand in `given` and not in what a schema made of it: what would be lost in silence.
 * It goes only as deep as the schema does, however deep the file is.
 */
export function unknownFields(given: unknown, read: unknown): string[] {
  const found: string[] = []
  look(given, read, '', found)
  return found
}

function look(given: unknown, read: unknown, path: string, found: string[]): void {
  if (found.length >= TOLD_MOST || typeof given !== 'object' || given === null || typeof read !== 'object' || read === null) return
  for (const key of Object.keys(given)) {
    const here = path === '' ? key : `${path}.${key}`
    if (Object.hasOwn(read, key)) look((given as Record<string, unknown>)[key], (read as Record<string, unknown>)[key], here, found)
    else if (found.length < TOLD_MOST) found.push(here)
  }
}
