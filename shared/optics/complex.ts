/** A complex number. */
export interface Complex { re: number, im: number }

/** a × b. */
export function multiply(a: Complex, b: Complex): Complex {
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re }
}

/** a / b. */
export function divide(a: Complex, b: Complex): Complex {
  const size = b.re * b.re + b.im * b.im
  return { re: (a.re * b.re + a.im * b.im) / size, im: (a.im * b.re - a.re * b.im) / size }
}

/** The root with the positive real part. */
export function squareRoot({ re, im }: Complex): Complex {
  const size = Math.sqrt(Math.hypot(re, im))
  const half = Math.atan2(im, re) / 2
  return { re: size * Math.cos(half), im: size * Math.sin(half) }
}

/** The square of a number's size. */
export function power({ re, im }: Complex): number {
  return re * re + im * im
}
