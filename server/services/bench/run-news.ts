/** The channel of the database on which processes tell each other that acts of a run arrived. */
export const RUN_CHANNEL = 'countershade_run'

/** What is told: which run, and the highest place in its order of arrival. Nothing of what was done, so that it may go to every process. */
export function runNews(runId: string, seq: number): string {
  return `${runId} ${seq}`
}

/** Reads what was told; null for what is not of this channel's form. */
export function readRunNews(payload: string | undefined): { runId: string, seq: number } | null {
  const found = /^([0-9a-f-]{36}) (\d{1,15})$/.exec(payload ?? '')
  return found ? { runId: found[1]!, seq: Number(found[2]) } : null
}
