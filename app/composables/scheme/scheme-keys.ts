/** Key of the list of schemes in the page's data. */
export const SCHEMES_KEY = 'schemes'

/** Key of one scheme in the page's data. */
export function schemeKey(schemeId: string): string {
  return `scheme ${schemeId}`
}

/** Key of two versions side by side; the second of another scheme where one is named. */
export function compareKey(schemeId: string, from: string, to: string, other?: string): string {
  return `scheme ${schemeId} ${from} ${to}${other ? ` of ${other}` : ''}`
}
