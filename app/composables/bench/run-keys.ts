/** Key of the runs of one kind in the page's data. */
export function runsKey(state: 'bench' | 'made'): string {
  return `runs ${state}`
}

/** Key of one run in the page's data, by what it is read for: what was followed is read anew to be looked back on. */
export function runKey(runId: string, readFor: 'follow' | 'report'): string {
  return `run ${runId} ${readFor}`
}
