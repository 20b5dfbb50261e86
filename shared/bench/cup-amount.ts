import type { MixStep } from './run-step'
import type { Look } from '#shared/picture/look'
import { amounts, PLANNING_VALUES } from '#shared/scheme/amounts'
import type { AreaCells } from '#shared/scheme/coat-area'

/** One thing that goes into the cup. */
export interface CupPart {
  /** Null for reducer. */
  paintId: string | null
  name: string
  /** As the scheme writes it: drops for one small cup. */
  ratio: number
  ml: number
  drops: number
  /** g */
  grams: number
}

/** What to put into one cup. */
export interface CupAmount {
  parts: CupPart[]
  ml: number
  /** By weight, g. */
  grams: number
}

/** g/mL; reducers of water-based paints are mostly water (common practice). */
const REDUCER_DENSITY = 1

/**
 * What to put into the cup at a mix step for so many pieces: every coat laid from it, with the loss in cup and lines once.
 * An estimate from planning values (common practice), not a promise: null when the cup has no known paint.
 * @throws {RangeError} when pieces is not a whole number of at least 1
 */
export function cupAmount(step: MixStep, look: Look, cells: AreaCells, pieces: number): CupAmount | null {
  const own = amounts(look.body, look.materials, cells, { pieces, ...PLANNING_VALUES })
    .filter(amount => step.coats.some(coat => coat.id === amount.coatId))
  const [first] = own
  if (!first) return null
  const { cupLoss, dropsPerMl } = PLANNING_VALUES
  const ml = own.reduce((sum, amount) => sum + amount.mix.value, 0) - (own.length - 1) * cupLoss
  // All coats of one cup are mixed alike, so that the whole divides as the first does.
  const scale = ml / first.mix.value
  const part = (paintId: string | null, name: string, ratio: number, volume: number, density: number): CupPart =>
    ({ paintId, name, ratio, ml: volume * scale, drops: Math.ceil(volume * scale * dropsPerMl), grams: volume * scale * density })
  const paints = first.paints.flatMap(({ paintId, ml: volume }) => {
    const paint = look.materials.paints.find(each => each.id === paintId)
    return paint ? [part(paintId, paint.name, step.coat.mix.parts.find(each => each.paintId === paintId)?.drops ?? 0, volume, paint.density)] : []
  })
  const reducer = step.coat.mix.reducer > 0 ? [part(null, 'Reducer', step.coat.mix.reducer, first.reducer.value, REDUCER_DENSITY)] : []
  return { parts: [...paints, ...reducer], ml, grams: first.mass.value * scale }
}
