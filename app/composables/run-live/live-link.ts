import { createNewsLink, type LiveLine, type LiveLink, type NewsLinkPorts } from '~/composables/live/news-link'
import { RunEventsView } from '#shared/bench/run-view'

export type { LiveLine, LiveLink }

/** What the link needs from the world. */
export interface LiveLinkPorts extends Pick<NewsLinkPorts<RunEventsView>, 'onNews' | 'onLive' | 'later'> {
  /** Opens a line that tells what is done from after a place in the order of arrival. */
  open: (since: number) => LiveLine
  /** The highest place heard so far, wherever from. */
  since: () => number
}

/** A link to what is done in a run, which goes on where one is. */
export function createLiveLink({ open, since, ...ports }: LiveLinkPorts): LiveLink {
  return createNewsLink({ ...ports, event: 'acts', form: RunEventsView, open: () => open(since()) })
}
