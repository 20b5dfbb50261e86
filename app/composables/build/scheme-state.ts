import type { IconName } from '~/components/ui/icons'
import type { SchemeRowView } from '#shared/scheme/scheme-view'

/** Where a scheme stands, in a few words, with the drawing that goes before them. */
export interface SchemeState { words: string, icon?: IconName }

/** What else is known of a scheme: whether its card is shared, and the number of its newest run on the bench. */
export interface SchemeDoings { isCardShared: boolean, run?: number }

/** What stands under a blank on the wall; null for those who see only looks. */
export function schemeState(row: SchemeRowView, { isCardShared, run }: SchemeDoings): SchemeState | null {
  if (row.sees === 'look') return null
  if (run !== undefined) return { words: `run ${run} on the bench`, icon: 'run' }
  if (row.headNumber === 0) return { words: 'draft, never published', icon: 'note' }
  const revision = `revision ${row.headNumber}`
  if (row.draftIsAhead) return { words: `draft on ${revision}${isCardShared ? ', card shared' : ''}`, icon: 'note' }
  return isCardShared ? { words: `${revision}, card shared`, icon: 'card' } : { words: revision }
}
