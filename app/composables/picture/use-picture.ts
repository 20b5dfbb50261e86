import { onScopeDispose, ref, shallowRef, toValue, useId, watch, type MaybeRefOrGetter, type Ref, type ShallowRef } from 'vue'
import { paintingThread, type PaintingThread } from './painting-thread'
import type { Look } from '#shared/picture/look'
import type { PickedPlace } from '#shared/picture/pick-place'
import type { PictureAnswer, PictureStage, ShownPicture } from '#shared/picture/picture-messages'
import { fullOptions } from '#shared/picture/option-defaults'
import type { PictureWish } from '#shared/picture/picture-options'

/** A picture that follows its look. */
export interface UsePicture {
  /** The newest painting there is; it may still be of the look before the last edit. */
  picture: ShallowRef<ShownPicture | null>
  stage: Ref<PictureStage | 'none'>
  /** Why the last request could not be painted. */
  failed: Ref<string | null>
  /** What lies at a place of the picture, given in shares of its width and height. */
  pick: (right: number, down: number) => Promise<PickedPlace | undefined>
}

/**
 * Paints a look away from the page, and again whenever the look or the wish changes: coarse first, then finer. Bodies, materials and
 * wishes are values: they are replaced by others, never changed in themselves, so nobody has to search them for changes.
 * Nothing is painted while either is null. Only in a browser.
 */
export function usePicture(look: MaybeRefOrGetter<Look | null>, wish: MaybeRefOrGetter<PictureWish | null>): UsePicture {
  const name = useId()
  const picture = shallowRef<ShownPicture | null>(null)
  const stage = ref<PictureStage | 'none'>('none')
  const failed = ref<string | null>(null)
  const picks = new Map<number, (place: PickedPlace | undefined) => void>()
  let latest = 0
  let picked = 0
  let thread: PaintingThread | undefined
  let hush: (() => void) | undefined

  function hear(answer: PictureAnswer): void {
    if (answer.answer === 'picked') {
      picks.get(answer.request)?.(answer.place)
      picks.delete(answer.request)
      return
    }
    if (answer.answer === 'zones' || answer.answer === 'spreads' || answer.answer === 'let-down') return
    if (answer.answer === 'failed') {
      failed.value = answer.reason
      if (answer.request === Infinity) thread = undefined
      return
    }
    // A coarse painting of an older look must not replace a fine one of it, but a fine one of a newer look may come late.
    if (answer.request < latest && stage.value !== 'none' && answer.stage === 'coarse') return
    // What was drawn is drawn; what was not is too late.
    picture.value?.bitmap.close()
    picture.value = answer.painted
    stage.value = answer.stage
    failed.value = null
  }

  function onThread(): PaintingThread {
    if (!thread) {
      hush?.()
      thread = paintingThread()
      const ears = [thread.hear(name, hear), thread.hear(`${name} pick`, hear)]
      hush = () => ears.forEach(stop => stop())
    }
    return thread
  }

  watch([() => toValue(look)?.body, () => toValue(look)?.materials, () => toValue(wish)], () => {
    const [newLook, newWish] = [toValue(look), toValue(wish)]
    if (!newLook || !newWish) return
    onThread().ask({ ask: 'paint', picture: name, request: ++latest, look: newLook, options: fullOptions(newWish) })
  }, { immediate: true })

  onScopeDispose(() => {
    thread?.ask({ ask: 'forget', picture: name })
    hush?.()
    picture.value?.bitmap.close()
  })

  return {
    picture, stage, failed,
    pick(right, down) {
      const [nowLook, nowWish] = [toValue(look), toValue(wish)]
      if (!nowLook || !nowWish) return Promise.resolve(undefined)
      const options = fullOptions(nowWish)
      const request = ++picked
      return new Promise((resolve) => {
        picks.set(request, resolve)
        onThread().ask({ ask: 'pick', picture: `${name} pick`, request, look: nowLook, options, x: right * options.width, y: down * options.height })
      })
    },
  }
}
