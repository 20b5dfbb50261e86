/** How long the browser is given to take a file over, ms. */
const TAKEN_AFTER_MS = 30_000

/** Hands a file to the browser, which saves it where downloads go or asks. Only for the browser. */
export function saveAs(name: string, content: BlobPart, type: string): void {
  const url = URL.createObjectURL(new Blob([content], { type }))
  const link = document.createElement('a')
  link.href = url
  link.download = name
  link.click()
  window.setTimeout(() => URL.revokeObjectURL(url), TAKEN_AFTER_MS)
}
