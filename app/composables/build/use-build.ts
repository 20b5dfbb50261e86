import { computed, type ComputedRef, inject, type InjectionKey, provide, type Ref, ref, type ShallowRef, watch } from 'vue'
import { coatColours } from './coat-colours'
import { type FilmRow, filmRows } from './film-rows'
import { type UseSeen, useSeen } from './use-seen'
import { useToast } from '~/composables/ui/use-toast'
import { useSpoken } from '~/composables/ui/use-spoken'
import { useZonePromises } from '~/composables/picture/use-zone-colours'
import type { SchemeDraft } from '~/composables/scheme/use-scheme-draft'
import { type PreparedBlank, prepareBlank } from '#shared/blank/prepared-blank'
import type { ZoneName } from '#shared/blank/zone-names'
import type { PromiseSpread } from '#shared/optics/spread'
import type { Look } from '#shared/picture/look'
import type { PictureSide } from '#shared/picture/picture-sides'
import type { ZoneColour } from '#shared/picture/zone-colours'
import type { Coat } from '#shared/scheme/coat'
import type { SchemeEdit } from '#shared/scheme/edits'
import type { BlankView } from '#shared/blank/blank-view'
import type { MaskView } from '#shared/scheme/mask-view'
import type { SchemeView } from '#shared/scheme/scheme-view'
import { coatsOf } from '#shared/scheme/stack-order'
import type { PaintListItem } from '#shared/shelf/paint-view'

/** The sides a blank shows. */
export const SIDES: readonly { value: PictureSide, label: string }[] = [
  { value: 'left flank', label: 'left' }, { value: 'right flank', label: 'right' }, { value: 'back', label: 'back' }, { value: 'belly', label: 'belly' },
]

/** The tilt at which the promise is read: a lamp at 45° from the gloss. */
const PROMISE_TILT = 45

/** One scheme on the work surface: what is chosen, how it is seen, and what can be done to it. */
export interface Build {
  scheme: ComputedRef<SchemeView>
  draft: SchemeDraft
  /** Why nothing can be changed here; undefined when it can. */
  whyNot: ComputedRef<string | undefined>
  paints: ComputedRef<readonly PaintListItem[]>
  masks: ComputedRef<readonly MaskView[]>
  blanks: ComputedRef<readonly BlankView[]>
  look: ComputedRef<Look>
  blank: ComputedRef<PreparedBlank>
  rows: ComputedRef<FilmRow[]>
  /** Own colour of each coat. */
  colours: ComputedRef<ReadonlyMap<string, string>>
  coatId: Ref<string | null>
  coat: ComputedRef<Coat | null>
  /** Its number from the ground, 0 without one. */
  number: ComputedRef<number>
  zone: Ref<ZoneName>
  zones: ShallowRef<ZoneColour[] | null>
  /** How sure each zone's promise is; null while it is being worked out. */
  spreads: ShallowRef<ReadonlyMap<ZoneName, PromiseSpread> | null>
  upTo: Ref<string>
  clear: Ref<boolean>
  side: Ref<PictureSide>
  tilt: Ref<number>
  /** The light it is seen in, and the water it swims in. */
  seen: UseSeen
  /** On small screens the coat sheet lies over the rest. */
  isSheetOpen: Ref<boolean>
  /** A coat is being looked for. */
  isFinding: Ref<boolean>
  /** Does an edit; what cannot be done is said, and false comes back. */
  act: (edit: SchemeEdit) => boolean
  choose: (coatId: string) => void
}

const KEY: InjectionKey<Build> = Symbol('build')

/** What the parts of the build screen share. */
export function useBuild(): Build {
  const build = inject(KEY)
  if (!build) throw new Error('Parts of the build screen stand inside it.')
  return build
}

/** Lays a scheme on the work surface, for everything below this component. */
export function provideBuild(given: Pick<Build, 'scheme' | 'draft' | 'whyNot' | 'paints' | 'masks' | 'blanks'>): Build {
  const { draft, paints } = given
  const { say } = useToast()
  const { speak } = useSpoken()

  const look = computed((): Look => ({ body: draft.body.value, materials: draft.materials.value }))
  const coats = computed(() => coatsOf(draft.body.value.stack))
  const coatId = ref<string | null>(coats.value.at(-2)?.id ?? coats.value.at(-1)?.id ?? null)
  const upTo = ref('all')
  const clear = ref(true)
  const tilt = ref(PROMISE_TILT)
  const seen = useSeen()

  // A coat that was taken out leaves the hand on its neighbour, and the level on what is still there.
  watch(coats, (now, before) => {
    const isThere = (id: string | null) => now.some(coat => coat.id === id)
    if (!isThere(coatId.value)) {
      const was = before.findIndex(coat => coat.id === coatId.value)
      coatId.value = (now[Math.max(0, was - 1)] ?? now[0])?.id ?? null
    }
    if (upTo.value !== 'all' && upTo.value !== 'ground' && !isThere(upTo.value)) upTo.value = 'all'
  })

  const build: Build = {
    ...given,
    look,
    blank: computed(() => prepareBlank(draft.materials.value.blank.shape)),
    rows: computed(() => filmRows(draft.body.value)),
    colours: computed(() => coatColours(look.value, paints.value)),
    coatId,
    coat: computed(() => coats.value.find(coat => coat.id === coatId.value) ?? null),
    number: computed(() => coats.value.findIndex(coat => coat.id === coatId.value) + 1),
    zone: ref<ZoneName>('upper-flank'),
    ...useZonePromises(() => import.meta.client ? look.value : null, () => ({ upTo: upTo.value, clear: clear.value, light: { tilt: tilt.value }, seen: seen.wish.value })),
    upTo, clear, tilt,
    seen,
    side: ref<PictureSide>('left flank'),
    isSheetOpen: ref(false),
    isFinding: ref(false),
    act(edit) {
      const because = given.whyNot.value ?? draft.do(edit)
      if (because === null) return true
      say(because, { icon: 'note' })
      speak(because)
      return false
    },
    choose(id) {
      coatId.value = id
    },
  }
  provide(KEY, build)
  return build
}
