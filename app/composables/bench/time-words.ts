/** When something was done at the bench, by the tablet's own place: "14:05", with the day before it when it was another. */
export function timeWords(at: string): string {
  const then = new Date(at)
  const time = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' }).format(then)
  const isToday = then.toDateString() === new Date().toDateString()
  return isToday ? time : `${new Intl.DateTimeFormat('en-GB', { weekday: 'short', day: 'numeric', month: 'long' }).format(then)}, ${time}`
}
