/** What a person chose for the desk: the system's own preference, or light, or dark. */
export type Theme = 'system' | 'light' | 'dark'

const A_YEAR_IN_SECONDS = 365 * 24 * 60 * 60

/** The desk's light: kept in a cookie so that the server lays the right greys before the first paint. */
export function useTheme() {
  const theme = useCookie<Theme>('theme', { default: () => 'system', maxAge: A_YEAR_IN_SECONDS, sameSite: 'lax', path: '/' })
  return { theme }
}
