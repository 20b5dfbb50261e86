/** Key of the runs of one kind in the page's data. */
export function runsKey(state: 'bench' | 'made'): string {
  return `runs ${state}`
}

/** Key of one run in the page's data. */
export function runKey(runId: string): string {
  return `run ${runId}`
}
