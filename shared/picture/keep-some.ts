/** Gives back what is kept under a key, or makes it. */
export type KeepSome<T> = (key: string, make: () => T, serves?: (kept: T) => boolean) => T

/** Keeps the few values that were asked for last; one that no longer serves is made anew. */
export function keepSome<T>(most: number): KeepSome<T> {
  const kept = new Map<string, T>()
  return (key, make, serves = () => true) => {
    const found = kept.get(key)
    const value = found !== undefined && serves(found) ? found : make()
    kept.delete(key)
    kept.set(key, value)
    if (kept.size > most) kept.delete(kept.keys().next().value!) // there is one: size is above 0
    return value
  }
}
