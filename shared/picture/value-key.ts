import { canonicalJson } from '#shared/scheme/canonical'

/** Writes values as text, each only once as long as it is held: for values that do not change and come back with every picture. */
export function valueKeys(): (value: object) => string {
  const kept = new WeakMap<object, string>()
  return (value) => {
    const key = kept.get(value) ?? canonicalJson(value)
    kept.set(value, key)
    return key
  }
}
