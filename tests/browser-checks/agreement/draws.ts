/** Chance that is the same every time. */
export interface Draws {
  /** 0 up to below 1. */
  share: () => number
  between: (from: number, to: number) => number
  /** A whole number, both ends included. */
  whole: (from: number, to: number) => number
  one: <T>(of: readonly T[]) => T
}

/** Draws from a seed. @source P. L'Ecuyer, Math. Comp. 68 (1999) 249–260: a multiplicative generator modulo 2³¹ − 1 */
export function draws(seed: number): Draws {
  let state = seed
  const share = () => {
    state = Number(BigInt(state) * 1389796n % 2147483647n)
    return state / 2147483647
  }
  const whole = (from: number, to: number) => from + Math.floor(share() * (to - from + 1))
  return {
    share, whole,
    between: (from, to) => from + share() * (to - from),
    one: of => of[whole(0, of.length - 1)]!,
  }
}
