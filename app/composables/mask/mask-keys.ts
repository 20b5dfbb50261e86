/** Key of the workshop's masks in the page's data. */
export const MASKS_KEY = 'masks'
