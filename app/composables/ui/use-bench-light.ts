/** The light at the bench: bright under a booth lamp, dim in a dark garage. */
export type BenchLight = 'bright' | 'dim'

const A_YEAR_IN_SECONDS = 365 * 24 * 60 * 60

/** The bench light of this tablet, kept in a cookie so that it is right before the first paint. */
export function useBenchLight() {
  const light = useCookie<BenchLight>('bench-light', { default: () => 'bright', maxAge: A_YEAR_IN_SECONDS, sameSite: 'lax', path: '/' })
  return { light }
}
