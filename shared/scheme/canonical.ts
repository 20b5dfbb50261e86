/**
 * The one way to write a value as JSON: keys in the order of their UTF-16 code units, no spaces, numbers as ECMAScript
 * writes them (−0 as 0), absent fields left out. Two bodies that mean the same have the same text.
 *
 * @throws {RangeError} for what JSON cannot say: NaN, infinities, functions
 * @source RFC 8785, JSON Canonicalization Scheme
 */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value === 'boolean' || typeof value === 'string') return JSON.stringify(value)
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) throw new RangeError(`canonicalJson: ${value} is not a number JSON can say`)
    return JSON.stringify(value)
  }
  if (Array.isArray(value)) return `[${value.map(each => canonicalJson(each === undefined ? null : each)).join(',')}]`
  if (typeof value === 'object') {
    const fields = Object.entries(value).filter(([, each]) => each !== undefined)
    fields.sort(([a], [b]) => a < b ? -1 : a > b ? 1 : 0)
    return `{${fields.map(([key, each]) => `${JSON.stringify(key)}:${canonicalJson(each)}`).join(',')}}`
  }
  throw new RangeError(`canonicalJson: a ${typeof value} is not something JSON can say`)
}

/** Whether two values say the same, whatever the order of their fields. */
export function sameValue(a: unknown, b: unknown): boolean {
  return a === b || canonicalJson(a) === canonicalJson(b)
}
