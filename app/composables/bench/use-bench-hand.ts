/** The hand that holds the tool; the other one taps. */
export type BenchHand = 'right' | 'left'

const A_YEAR_IN_SECONDS = 365 * 24 * 60 * 60

/** The hand next lies under on this tablet, kept in a cookie. */
export function useBenchHand() {
  const hand = useCookie<BenchHand>('bench-hand', { default: () => 'right', maxAge: A_YEAR_IN_SECONDS, sameSite: 'lax', path: '/' })
  return { hand }
}
