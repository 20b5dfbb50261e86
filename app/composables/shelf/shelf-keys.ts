/** Key of the shelf in the page's data. */
export const SHELF_KEY = 'shelf'

/** Key of one paint in the page's data. */
export function paintKey(paintId: string): string {
  return `paint ${paintId}`
}
