import { computed, type ComputedRef, inject, type InjectionKey, provide, reactive, ref, type Ref, type ShallowRef, shallowRef, toRaw, watch } from 'vue'
import { flatOf, movedPlace, placeUnder } from './flat-blank'
import { draw, type HandSettings, type HandTool, layReady, type ReadyMark, typedTrace, USUAL_SETTINGS } from './hand-tools'
import { partDrawer, type PartDrawing, partWords } from './part-drawing'
import { useSpoken } from '~/composables/ui/use-spoken'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import type { DrawingPoint } from '#shared/blank/side-outline'
import type { Mark, OnlySide, Place } from '#shared/scheme/mark'
import type { LaidMark } from '#shared/scheme/mark-lay'
import { type Fan, partAt, type MarkPart, type PartAt, withFan, withoutPart, withPlaces, withSide, withWidth } from '#shared/scheme/mark-parts'
import type { TracePoint } from '#shared/scheme/outline/trace'

/** Work by hand on the marks of one coat. */
export interface Hand {
  blank: ComputedRef<PreparedBlank>
  /** What draws; null takes hold of what is drawn. */
  tool: Ref<HandTool | null>
  settings: ComputedRef<HandSettings>
  drawings: ComputedRef<PartDrawing[]>
  chosen: Ref<PartAt | null>
  part: ComputedRef<MarkPart | null>
  /** Which place of the chosen part is worked on. */
  point: Ref<number>
  /** The line being drawn. */
  trace: ShallowRef<readonly TracePoint[]>
  /** The one flank that is worked on; both when there is none. */
  only: Ref<OnlySide>
  /** What was refused, or should be known about the last line; empty otherwise. */
  said: Ref<string>
  /** Adds to the line being drawn: a place in the drawing (mm, y down) and how hard it is pressed. */
  draws: (at: DrawingPoint, pressure: number) => void
  /** Lays the line that was drawn. */
  ends: () => void
  /** Lays a mark that finds its own place, or one between two typed places. */
  lays: (what: ReadyMark) => void
  types: (from: Place, to: Place) => void
  /** Moves the chosen part over the skin, mm toward the tail and toward the back. */
  moves: (along: number, up: number) => void
  /** Puts the worked-on place of the chosen part elsewhere. */
  puts: (place: Place) => void
  widens: (width: readonly [number, number]) => void
  /** The fan that is chosen; null for anything else. */
  fan: ComputedRef<Fan | null>
  /** Gives the chosen fan other rays. */
  spreads: (change: Partial<Pick<Fan, 'count' | 'length' | 'angle'>>) => void
  /** Lays the chosen part, with the sheet it is on, on both flanks or on one alone. */
  sides: (only: OnlySide) => void
  takesOut: () => void
  /** Whether something done here can be taken back, and taking it back, step by step. */
  canTakeBack: ComputedRef<boolean>
  takesBack: () => void
}

/** Steps that can be taken back. */
const PAST_MAX = 100
const KEY: InjectionKey<Hand> = Symbol('hand')

/** What the parts of the desk share. */
export function useHand(): Hand {
  const hand = inject(KEY)
  if (!hand) throw new Error('Parts of the hand\'s desk stand inside it.')
  return hand
}

/** Lays the marks that are given on the desk, for everything below this component; what comes of the work is handed to `change`. */
export function provideHand(work: { blank: () => PreparedBlank, marks: () => readonly Mark[], change: (marks: Mark[]) => void }): Hand {
  const { speak } = useSpoken()
  const blank = computed(work.blank)
  const marks = computed(() => toRaw(work.marks()).map(mark => toRaw(mark)))
  const drawer = computed(() => partDrawer(blank.value))
  const settingsOf = reactive(structuredClone(USUAL_SETTINGS) as Record<HandTool, HandSettings>)
  const tool = ref<HandTool | null>('airbrush line')
  const lastTool = ref<HandTool>('airbrush line')
  const chosen = ref<PartAt | null>(null)
  const point = ref(0)
  const trace = shallowRef<readonly TracePoint[]>([])
  const said = ref('')
  const only = ref<OnlySide>()
  /** What stood before each thing done here; it goes when somebody else changes the same marks meanwhile. */
  const past = shallowRef<readonly (readonly Mark[])[]>([])
  let given: readonly Mark[] = []
  const part = computed(() => chosen.value && partAt(marks.value, chosen.value))

  watch(tool, (now) => {
    if (now) lastTool.value = now
  })
  watch(chosen, () => {
    point.value = 0
  })

  function give(next: Mark[]) {
    past.value = [...past.value, marks.value].slice(-PAST_MAX)
    given = next
    work.change(next)
  }
  watch(marks, (now) => {
    if (now !== given && JSON.stringify(now) !== JSON.stringify(given)) past.value = []
  })

  function take(laid: LaidMark & { said?: string }) {
    if (!laid.ok) {
      said.value = laid.because
      return
    }
    said.value = laid.said ?? ''
    give(laid.marks)
    chosen.value = laid.at
    const now = partAt(laid.marks, laid.at)
    if (now) speak(`Laid: ${partWords(now)}`)
  }
  const change = (next: Mark[]) => {
    said.value = ''
    give(next)
  }
  const lay = (line: readonly TracePoint[], by: HandTool) => take(draw(blank.value, marks.value, by, { ...settingsOf[by], only: only.value }, line))

  const hand: Hand = {
    blank, tool, chosen, part, point, trace, only, said,
    settings: computed(() => settingsOf[tool.value ?? lastTool.value]),
    drawings: computed(() => drawer.value(marks.value)),
    draws(at, pressure) {
      const place = placeUnder(blank.value, at)
      trace.value = [...trace.value, { place, flat: flatOf(blank.value, place), pressure }]
    },
    ends() {
      const line = trace.value
      trace.value = []
      if (tool.value && line.length > 0) lay(line, tool.value)
    },
    lays: what => take(layReady(blank.value, marks.value, what, only.value)),
    types(from, to) {
      const by = tool.value ?? lastTool.value
      lay(typedTrace(blank.value, by, from, to), by)
    },
    moves(along, up) {
      if (chosen.value) change(withPlaces(marks.value, chosen.value, place => movedPlace(blank.value, place, along, up)))
    },
    puts(to) {
      if (chosen.value) change(withPlaces(marks.value, chosen.value, (place, order) => order === point.value ? to : place))
    },
    widens(width) {
      if (chosen.value) change(withWidth(marks.value, chosen.value, width))
    },
    fan: computed(() => {
      const mark = chosen.value && marks.value[chosen.value.mark]
      return mark?.kind === 'fan' ? mark : null
    }),
    spreads(to) {
      if (chosen.value) change(withFan(marks.value, chosen.value, to))
    },
    sides(to) {
      if (chosen.value) change(withSide(marks.value, chosen.value, to))
    },
    takesOut() {
      if (!chosen.value) return
      const [gone, was] = [chosen.value, part.value]
      chosen.value = null
      change(withoutPart(marks.value, gone))
      if (was) speak(`Taken out: ${partWords(was)}`)
    },
    canTakeBack: computed(() => past.value.length > 0),
    takesBack() {
      const before = past.value.at(-1)
      if (!before) return
      past.value = past.value.slice(0, -1)
      given = before
      chosen.value = null
      said.value = ''
      work.change([...before])
      speak('Taken back')
    },
  }
  provide(KEY, hand)
  return hand
}
