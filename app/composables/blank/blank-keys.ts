/** Key of the list of blanks in the page's data. */
export const BLANKS_KEY = 'blanks'

/** Key of one blank in the page's data. */
export function blankKey(blankId: string): string {
  return `blank ${blankId}`
}
