/** Works a report out and hands it to the server of this page; what went wrong is a report too. */
export async function sendReport(work: () => Promise<unknown>): Promise<void> {
  const report = await work().then(value => ({ value }), (error: unknown) => ({ error: error instanceof Error ? `${error.message}\n${error.stack}` : String(error) }))
  await fetch('/report', { method: 'POST', body: JSON.stringify(report) })
  document.title = 'done'
}
