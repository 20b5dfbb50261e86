// Sixteen bands are four vectors of four. Pointers are bytes in the module's memory; nothing is allocated here.

/** Bytes of sixteen bands. */
export const ROW: usize = 64

/** The sum of the four lanes of a vector. */
// @ts-ignore: decorator
@inline
export function across(v: v128): f32 {
  const pairs = f32x4.add(v, i32x4.shuffle(v, v, 2, 3, 0, 1))
  return f32x4.extract_lane(pairs, 0) + f32x4.extract_lane(pairs, 1)
}

/** a·b + c of four bands. */
// @ts-ignore: decorator
@inline
export function plus(a: v128, b: v128, c: v128): v128 {
  return f32x4.add(f32x4.mul(a, b), c)
}

/** a·b + c·d of four bands. */
// @ts-ignore: decorator
@inline
export function both(a: v128, b: v128, c: v128, d: v128): v128 {
  return f32x4.add(f32x4.mul(a, b), f32x4.mul(c, d))
}
