import { type Action, may } from '#shared/people/may'
import { useSession } from './use-session'

/** Whether the role one has here includes an action: to hide or explain what the server would refuse. */
export function useMay(): (action: Action) => boolean {
  const { session } = useSession()
  return action => may(session.value?.role, action)
}
