import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { canonicalJson, sameValue } from '#shared/scheme/canonical'

/** The example of RFC 8785, section 3.2.2, and its canonical form from 3.2.3. */
const EXAMPLE = '{"numbers":[333333333.33333329,1E30,4.50,2e-3,0.000000000000000000000000001],"string":"\\u20ac$\\u000F\\u000aA\'\\u0042\\u0022\\u005c\\\\\\"\\/","literals":[null,true,false]}'
const CANONICAL = '{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}'

describe('canonical JSON', () => {
  it('writes the example of RFC 8785 as the standard does', () => {
    expect(canonicalJson(JSON.parse(EXAMPLE))).toBe(CANONICAL)
  })

  it('says the same as JSON and is the same for any order of fields', () => {
    const shuffled = (value: unknown): unknown => Array.isArray(value)
      ? value.map(shuffled)
      : typeof value === 'object' && value !== null ? Object.fromEntries(Object.entries(value).reverse().map(([key, each]) => [key, shuffled(each)])) : value
    fc.assert(fc.property(fc.jsonValue(), (value) => {
      const clean: unknown = JSON.parse(JSON.stringify(value))
      expect(JSON.parse(canonicalJson(clean))).toEqual(clean)
      expect(canonicalJson(shuffled(clean))).toBe(canonicalJson(clean))
    }))
  })

  it('leaves out what is absent and knows one zero', () => {
    expect(canonicalJson({ b: undefined, a: -0 })).toBe('{"a":0}')
    expect(sameValue({ a: 1, b: undefined }, { a: 1 })).toBe(true)
    expect(sameValue([1, 2], [2, 1])).toBe(false)
  })

  it.each([Number.NaN, Infinity, () => 1, Symbol('x')])('refuses what JSON cannot say', (value) => {
    expect(() => canonicalJson({ value })).toThrow(RangeError)
  })
})
