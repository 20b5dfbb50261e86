import { ref } from 'vue'
import { api } from '~/composables/api/api'
import { useAttempt } from '~/composables/people/use-attempt'
import { useToast } from '~/composables/ui/use-toast'
import { PUT_AWAY_MAX, type PutAwayView, type StayReason } from '#shared/scheme/wall/wall-wish'

const WHY: Readonly<Record<StayReason, string>> = {
  gone: 'it is no longer in this workshop',
  bench: 'a run of it goes on at the bench',
  already: 'it was so already',
}

/** Putting the chosen away or bringing them back: what was done can be taken back, what stayed is named. */
export function usePutAway(after: () => Promise<void>) {
  const { busy, problem, attempt } = useAttempt()
  const { say } = useToast()
  /** One sentence for each that stayed as it was. */
  const stayed = ref<readonly string[]>([])

  async function putAway(ids: readonly string[], away: boolean): Promise<boolean> {
    const done: PutAwayView['done'] = []
    const left: PutAwayView['stayed'] = []
    const isDone = await attempt(async () => {
      try {
        for (let at = 0; at < ids.length; at += PUT_AWAY_MAX) {
          const answer = await api('/api/schemes/put-away', { method: 'POST', body: { ids: ids.slice(at, at + PUT_AWAY_MAX), away } })
          done.push(...answer.done)
          left.push(...answer.stayed)
        }
      }
      finally {
        await after()
      }
    })
    stayed.value = left.map(({ name, why }) => `${name ?? 'One of them'} stays: ${WHY[why]}.`)
    if (done.length > 0) {
      const what = done.length === 1 ? done[0]!.name : `${done.length} schemes`
      say(`${what} ${away ? 'put away' : 'back on the wall'}`, { undo: { word: away ? 'Bring back' : 'Put away again', act: () => void putAway(done.map(({ id }) => id), !away) } })
    }
    return isDone
  }
  return { busy, problem, stayed, putAway }
}
