const float = new Float32Array(1)
const bits = new Uint32Array(float.buffer)

/** One number as a half-precision float: 11 bits of figure, up to 65504; smaller than 6e-5 counts as 0. @accuracy relative 4.9e-4 */
export function toHalf(value: number): number {
  float[0] = value
  const b = bits[0]!
  const sign = (b >>> 16) & 0x8000
  const exponent = ((b >>> 23) & 0xFF) - 112
  if (exponent <= 0) return sign
  if (exponent >= 31) return sign | 0x7BFF
  // Rounded to the nearest; a figure that overflows carries into the exponent, as it should.
  return Math.min(0x7BFF, (exponent << 10 | (b >>> 13 & 0x3FF)) + (b >>> 12 & 1)) | sign
}

/** A half-precision float as a number. */
export function fromHalf(half: number): number {
  const exponent = half >>> 10 & 31
  const size = exponent === 0 ? 0 : (1 + (half & 0x3FF) / 1024) * 2 ** (exponent - 15)
  return half & 0x8000 ? -size : size
}
