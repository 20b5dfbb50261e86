/*
 * Stands in for 'node:fs' where tests run in a page: published tables of the machine are read through the server of the page.
 */
function answerOf(path: string): XMLHttpRequest {
  const request = new XMLHttpRequest()
  request.open('GET', `/published?file=${encodeURIComponent(path)}`, false)
  request.send()
  return request
}

export function existsSync(path: string): boolean {
  return answerOf(path).status === 200
}

export function readFileSync(path: string): string {
  const { status, responseText } = answerOf(path)
  if (status !== 200) throw new Error(`${path} cannot be read: ${status}`)
  return responseText
}
