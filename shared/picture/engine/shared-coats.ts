import type { KeyedCoat } from '../view-kit'

/** How many of the first texts of two lists are the same. */
export function sharedStart(a: readonly string[], b: readonly string[]): number {
  let count = 0
  while (count < a.length && count < b.length && a[count] === b[count]) count++
  return count
}

/** What lies between the coats at the bottom and at the top that two stacks share, of both. */
export function changedCoats(before: readonly KeyedCoat[], now: readonly KeyedCoat[]): KeyedCoat[] {
  const [a, b] = [before, now].map(coats => coats.map(coat => coat.key)) as [string[], string[]]
  const low = sharedStart(a, b)
  const high = sharedStart(a.slice(low).reverse(), b.slice(low).reverse())
  return [...before.slice(low, a.length - high), ...now.slice(low, b.length - high)]
}
