import { onBeforeUnmount, onMounted, ref, type Ref } from 'vue'
import { useIntervalFn } from '@vueuse/core'
import type { RunActs } from './use-run-acts'
import type { RunHere } from './use-run-here'
import { benchDevice } from '~/bench/device/bench-device'
import { photoBox } from '~/bench/device/photo-box'
import { newId } from '~/bench/new-id'
import { sendPhoto } from '~/composables/photos/send-photo'
import { problemOf } from '~/errors/problem-of'

/** How often waiting photos are tried, ms. */
const TRY_MS = 20_000

/** Photos taken at the bench. */
export interface BenchPhotos {
  /** Keeps a photo of a step, of all pieces or some, and sends it when it can. */
  take: (file: File, stepId: string, pieces: readonly number[] | undefined) => Promise<void>
  waiting: Readonly<Ref<number>>
  keepsNothing: Readonly<Ref<string | null>>
}

/** Keeps photos on the tablet until the server has them; that one was taken is an act like any other, and goes ahead of it. */
export function useBenchPhotos({ run, owner }: RunHere, acts: RunActs): BenchPhotos {
  const box = photoBox(benchDevice, owner)
  const waiting = ref(0)
  const keepsNothing = ref<string | null>(null)
  let isSending = false

  async function send(): Promise<void> {
    if (isSending) return
    isSending = true
    try {
      const kept = await box.waiting()
      waiting.value = kept.length
      for (const photo of kept) {
        try {
          await sendPhoto({ schemeId: photo.schemeId, runId: photo.runId, photoId: photo.id }, photo.file, () => undefined)
          await box.drop(photo.id)
          waiting.value--
        }
        catch (error) {
          // One that is refused stays and stops no other; without a network none can go. The next try comes by itself.
          if (problemOf(error) === null) break
        }
      }
    }
    finally {
      isSending = false
    }
  }

  onMounted(send)
  const { pause } = useIntervalFn(send, TRY_MS)
  onBeforeUnmount(pause)

  return {
    waiting, keepsNothing,
    async take(file, stepId, pieces) {
      const id = newId()
      try {
        await box.keep({ id, runId: run.id, schemeId: run.scheme.id, file })
      }
      catch {
        keepsNothing.value = 'The photo is not kept: the storage of this tablet is full or closed. Make room, then take it again.'
        return
      }
      keepsNothing.value = null
      if (await acts.do({ v: 1, kind: 'photo-taken', photoId: id, stepId, ...pieces ? { pieces: [...pieces] } : {} })) await send()
      else await box.drop(id)
    },
  }
}
