import { computed, type ComputedRef } from 'vue'
import { useSession } from '~/composables/people/use-session'
import { type Quantity, UNIT_CHOICES, unitChoices, type UnitChoices, unitOf } from '#shared/quantities/quantities'
import { readMeasure } from '#shared/quantities/read-measure'
import { readable, toKept, toShown } from '#shared/quantities/shown-figure'

/** The units of the workshop one is in, and figures in them. */
export interface UseUnits {
  choices: ComputedRef<UnitChoices>
  /** The sign of a quantity's unit: bar. */
  unit: (quantity: Quantity) => string
  /** A kept figure to read, with its unit. */
  show: (kept: number, quantity: Quantity, digits?: number) => { value: string, unit: string }
  /** The same in one run of words. */
  say: (kept: number, quantity: Quantity, digits?: number) => string
  /** A pressure in another unit than the chosen one, as the other gauge says it. */
  otherGauge: (bar: number) => string
  /** A kept figure to type over, and back. */
  toShown: (kept: number, quantity: Quantity) => number
  toKept: (shown: number, quantity: Quantity) => number
  /** What was typed, as it is kept; null when it is no figure of the quantity. */
  read: (typed: string, quantity: Quantity) => number | null
}

/** Figures in the units the workshop chose. Everything is kept in metric; only what is shown and typed turns. */
export function useUnits(): UseUnits {
  const { session } = useSession()
  const choices = computed(() => unitChoices(session.value?.workshop?.units ?? 'metric', session.value?.workshop?.ownUnits))
  const show = (kept: number, quantity: Quantity, digits?: number) => readable(kept, quantity, choices.value, digits)
  const say = (kept: number, quantity: Quantity, digits?: number) => {
    const { value, unit } = show(kept, quantity, digits)
    return `${value} ${unit}`.trim()
  }
  return {
    choices, show, say,
    unit: quantity => unitOf(quantity, choices.value).sign,
    otherGauge(bar) {
      const [first, second] = UNIT_CHOICES.pressure
      const other = choices.value.pressure === first ? second : first
      const { value, unit } = readable(bar, 'pressure', { ...choices.value, pressure: other }, 2)
      return `${value} ${unit}`
    },
    toShown: (kept, quantity) => toShown(kept, quantity, choices.value),
    toKept: (shown, quantity) => toKept(shown, quantity, choices.value),
    read: (typed, quantity) => readMeasure(typed, quantity, choices.value),
  }
}
