import fc from 'fast-check'

// The same draws every time: a law that breaks must break for everyone.
fc.configureGlobal({ seed: 1931 })

/** Draws evenly in the exponent: drawn evenly in the value, nearly every coat would hide and prove nothing. */
export const magnitude = (from: number, to: number) => fc.double({ min: from, max: to, noNaN: true }).map(e => 10 ** e)

/** Absorption or scattering per pass, with the ends that break formulas. */
export const coefficient = fc.oneof(fc.constant(0), magnitude(-6, 1.5))

/** Passes of a coat. */
export const passes = magnitude(-2, 1.5)

/** A reflectance. */
export const share = fc.double({ min: 0, max: 1, noNaN: true })

/** A Lab colour that a surface can have: between the colours of sRGB, by linear mixing. */
export const linearRgb = fc.tuple(share, share, share)

/** The same value in all 36 bands. */
export const flat = (value: number) => new Float64Array(36).fill(value)
