import { type Ref, shallowRef, watch } from 'vue'
import { useDebounceFn } from '@vueuse/core'
import { knownOfForm, type PaintForm } from './paint-form'
import { hidesTooWell } from '#shared/optics/known-film'
import type { PaintOptics } from '#shared/optics/paint-optics'
import { bareGround, cardOf, drawdown, type DrawdownStep } from '#shared/shelf/drawdown'
import { opticsOfKnown } from '#shared/shelf/optics-of-known'
import type { PaintKnown } from '#shared/shelf/paint'
import { paintTrust } from '#shared/shelf/paint-trust'
import type { PaintTrust } from '#shared/shelf/paint-view'

/** Quiet time after typing before the engine is asked, ms: it takes about 40. */
const ASK_AFTER_MS = 160

/** What the engine makes of a form. */
export interface PaintPreview {
  steps: DrawdownStep[]
  black: string
  white: string
  optics: PaintOptics
  trust: PaintTrust
  /** What a painter should know of the swatches. */
  remarks: string[]
}

/** The drawdown of what is being written, worked out here by the engine; the last one stays while a colour is half typed. */
export function usePaintPreview(form: Ref<PaintForm>): { preview: Ref<PaintPreview | null>, trouble: Ref<string | null> } {
  const preview = shallowRef<PaintPreview | null>(null)
  const trouble = shallowRef<string | null>(null)

  function work() {
    const known = knownOfForm(form.value)
    trouble.value = null
    if (!known.value) return
    try {
      preview.value = previewOf(known.value)
    }
    catch (error) {
      if (!(error instanceof RangeError)) throw error
      trouble.value = error.message
    }
  }
  watch(form, useDebounceFn(work, ASK_AFTER_MS), { deep: true })
  work()
  return { preview, trouble }
}

/** What the engine makes of what is known of a paint. Throws RangeError, in words, when it can make nothing. */
export function previewOf(known: PaintKnown): PaintPreview {
  const optics = opticsOfKnown(known)
  const card = cardOf(known)
  return {
    optics,
    steps: drawdown(optics, card),
    black: bareGround(card.black).hex,
    white: bareGround(card.white).hex,
    trust: paintTrust(known, optics),
    remarks: remarksOn(known, optics),
  }
}

function remarksOn(known: PaintKnown, optics: PaintOptics): string[] {
  if (known.how !== 'two-swatches') {
    return optics.clipped ? ['No film has quite this colour. The nearest that can be is shown.'] : []
  }
  return [
    ...optics.clipped ? ['The two swatches contradict each other: no film looks like this over black and like that over white. The nearest that can be is shown. Read both again, after the same passes and under the same light.'] : [],
    ...hidesTooWell(known.overBlack, known.overWhite) ? ['It hides so well that its strength is a guess. Spray the swatches thinner, so that the black shows through.'] : [],
  ]
}
