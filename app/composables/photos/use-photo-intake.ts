import { computed, type ComputedRef, type Ref, ref } from 'vue'
import { useEventListener } from '@vueuse/core'
import { type PhotoPlace, sendPhoto } from './send-photo'
import { explain } from '~/errors/explain'
import { sentence } from '~/errors/sentence'
import { photoFileRefusal } from '#shared/photos/photo-file-check'
import type { PhotoView } from '#shared/photos/photo-view'

/** Files on their way at once: as many as the workshop opens at once. */
const AT_ONCE = 2

/** One file on its way in. A file that has arrived is a photo and no longer here. */
export interface IntakeFile {
  readonly id: number
  readonly name: string
  readonly bytes: number
  /** Waiting its turn, on its way, being opened at the other end, or refused. */
  stage: 'waiting' | 'sending' | 'opening' | 'refused'
  /** Bytes that have gone. */
  sent: number
  /** Why it was refused, in one sentence. */
  why: string | null
  /** Trying again may help: it was not the file that was wrong before it was sent. */
  mayTryAgain: boolean
}

/** Photos on their way in, each by itself: one that is refused holds no other up. */
export interface PhotoIntake {
  files: Ref<IntakeFile[]>
  isBusy: ComputedRef<boolean>
  add: (files: Iterable<File>) => void
  tryAgain: (id: number) => void
  putAway: (id: number) => void
}

/** Takes files in for a scheme, or for a run of it; `arrived` hears of each photo as soon as it is one. */
export function usePhotoIntake(place: PhotoPlace, arrived: (photo: PhotoView) => void): PhotoIntake {
  const files = ref<IntakeFile[]>([])
  const kept = new Map<number, File>()
  const isBusy = computed(() => files.value.some(file => file.stage !== 'refused'))
  let count = 0

  function next() {
    const under = files.value.filter(file => file.stage === 'sending' || file.stage === 'opening').length
    for (const file of files.value.filter(one => one.stage === 'waiting').slice(0, Math.max(0, AT_ONCE - under))) void send(file)
  }

  async function send(file: IntakeFile) {
    const whole = kept.get(file.id)
    if (!whole) return
    file.stage = 'sending'
    file.sent = 0
    try {
      const photo = await sendPhoto(place, whole, (bytes) => {
        file.sent = bytes
        if (bytes >= file.bytes) file.stage = 'opening'
      })
      putAway(file.id)
      arrived(photo)
    }
    catch (error) {
      file.stage = 'refused'
      file.why = explain(error)
    }
    next()
  }

  function add(added: Iterable<File>) {
    for (const file of added) {
      const id = ++count
      const refusal = photoFileRefusal(file)
      if (!refusal) kept.set(id, file)
      files.value.push({
        id, name: file.name, bytes: file.size, sent: 0,
        stage: refusal ? 'refused' : 'waiting', why: refusal && sentence(refusal), mayTryAgain: !refusal,
      })
    }
    next()
  }

  function tryAgain(id: number) {
    const file = files.value.find(one => one.id === id)
    if (!file || file.stage !== 'refused') return
    file.stage = 'waiting'
    file.why = null
    next()
  }

  function putAway(id: number) {
    kept.delete(id)
    files.value = files.value.filter(file => file.id !== id)
  }

  if (import.meta.client) {
    useEventListener(window, 'beforeunload', (event) => {
      if (isBusy.value) event.preventDefault()
    })
  }
  return { files, isBusy, add, tryAgain, putAway }
}
