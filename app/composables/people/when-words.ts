const MINUTE = 60_000
const DAY = 24 * 60 * MINUTE

/** How long ago something was, as one says it. `now` and `then` are times as ISO text or milliseconds. */
export function agoWords(then: string, now: number): string {
  const passed = Math.max(0, now - Date.parse(then))
  if (passed < 5 * MINUTE) return 'just now'
  if (passed < 60 * MINUTE) return `${Math.round(passed / MINUTE)} minutes ago`
  if (passed < 36 * 60 * MINUTE) return `${Math.round(passed / (60 * MINUTE))} hours ago`
  return `${Math.round(passed / DAY)} days ago`
}

/** A day as one writes it, the same on the server and in every browser. */
export function dayWords(time: string): string {
  return new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' }).format(new Date(time))
}
