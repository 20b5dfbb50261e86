import { onScopeDispose, useId, watch } from 'vue'
import { paintingThread } from './painting-thread'
import type { PictureAnswer, PictureQuestion } from '#shared/picture/picture-messages'

type Without<T, Keys extends string> = T extends unknown ? Omit<T, Keys> : never
/** A question for the painting thread, without the name and number it travels under. */
export type ThreadQuestion = Without<Exclude<PictureQuestion, { ask: 'forget' | 'paint' | 'pick' }>, 'picture' | 'request'>

/** Asks the painting thread whenever the question changes, and hears the newest answer. Asks nothing while there is no question. */
export function useThreadAnswer(question: () => ThreadQuestion | null, hear: (answer: PictureAnswer) => void): void {
  const name = useId()
  let latest = 0
  let hush: (() => void) | undefined

  watch(question, (asked) => {
    if (!asked) return
    const thread = paintingThread()
    hush?.()
    hush = thread.hear(name, (answer) => {
      if (answer.request === latest) hear(answer)
    })
    thread.ask({ ...asked, picture: name, request: ++latest })
  }, { immediate: true })

  onScopeDispose(() => {
    if (hush) paintingThread().ask({ ask: 'forget', picture: name })
    hush?.()
  })
}
