import type { H3Event } from 'h3'

/** Lets `work` go on while the answer is already given, so that how long it takes tells nothing; what fails is logged. */
export function afterAnswer(event: H3Event, work: Promise<void>): void {
  event.waitUntil(work.catch(error => console.error(`After ${event.method} ${event.path.split('?')[0]}:`, error)))
}
