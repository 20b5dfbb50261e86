import type { SchemeBody } from './body'
import type { Coat, Tool } from './coat'
import { type AreaCells, coatArea } from './coat-area'
import { filmOfCoat, filmOfPass } from './film'
import type { Materials, PaintSnapshot } from './materials'
import { sprayedVolume } from './paint-formulas'
import { passStrength } from './pass-strength'
import { coatsOf } from './stack-order'

/** What the amounts are worked out for, and the planning values a workshop may know better. */
export interface AmountInputs {
  pieces: number
  /** Share of the solids that stays on the piece, by tool. */
  transfer: Readonly<Record<Tool['kind'], number>>
  /** Left in cup and lines for each load, mL of mix. */
  cupLoss: number
  /** Drops that make one mL. */
  dropsPerMl: number
}

/**
 * Planning values, all common practice: an airbrush on a narrow body keeps 15 to 35 % on it, a cup keeps 0.5 to 1 mL back,
 * 20 drops make a mL. Weigh and count to learn your own.
 */
export const PLANNING_VALUES: Omit<AmountInputs, 'pieces'> = {
  transfer: { airbrush: 0.25, brush: 0.9, sponge: 0.8, dip: 0.9 },
  cupLoss: 0.75,
  dropsPerMl: 20,
}

/** A number with what it was worked out from. */
export interface Figure {
  value: number
  unit: 'mL' | 'cm²' | 'µm' | '%' | 'g' | 'drops'
  /** How, in symbols: "A · d · 10⁻⁴ / (s · t)". */
  formula: string
  inputs: { symbol: string, what: string, value: number, unit: string }[]
}

/** What one coat takes for all pieces. */
export interface CoatAmount {
  coatId: string
  number: number
  area: Figure
  film: Figure
  /** Paint as it comes from the bottles. */
  paint: Figure
  reducer: Figure
  /** What goes into the cup, loss included. */
  mix: Figure
  /** The mix by weight. */
  mass: Figure
  /** Each paint's part of it, as it comes from the bottle. */
  paints: { paintId: string, ml: number, drops: number }[]
  /** Shortest working time of what is in the cup at 25 °C, minutes; null for what does not set. */
  potLifeMinutes: number | null
}

function cupOf(coat: Pick<Coat, 'mix'>, materials: Pick<Materials, 'paints'>): { paint: PaintSnapshot, share: number }[] {
  const parts = coat.mix.parts.flatMap(({ paintId, drops }) => {
    const paint = materials.paints.find(each => each.id === paintId)
    return paint ? [{ paint, drops }] : []
  })
  const all = parts.reduce((sum, part) => sum + part.drops, 0)
  return parts.map(({ paint, drops }) => ({ paint, share: drops / all }))
}

function amountOf(coat: Coat, number: number, materials: Pick<Materials, 'paints'>, cells: AreaCells, given: AmountInputs): CoatAmount | null {
  const cup = cupOf(coat, materials)
  if (cup.length === 0) return null
  const { pieces, cupLoss, dropsPerMl } = given
  const area = coatArea(coat, cells) / 100
  const film = filmOfCoat(coat, materials)
  const solids = cup.reduce((sum, { paint, share }) => sum + share * paint.volumeSolids / 100, 0)
  const density = cup.reduce((sum, { paint, share }) => sum + share * paint.density, 0)
  const transfer = given.transfer[coat.tool.kind]
  const drops = coat.mix.parts.reduce((sum, part) => sum + part.drops, 0)
  const reducerPerPart = coat.mix.reducer / drops
  const laid = pieces * sprayedVolume(area, film, solids, transfer)
  const mix = laid * (1 + reducerPerPart) + cupLoss
  const paint = mix / (1 + reducerPerPart)
  const reducer = mix - paint
  const symbols = {
    N: { symbol: 'N', what: 'pieces', value: pieces, unit: '' },
    A: { symbol: 'A', what: 'area of the coat on one piece', value: area, unit: 'cm²' },
    d: { symbol: 'd', what: 'dry film of the coat', value: film, unit: 'µm' },
    s: { symbol: 's', what: 'volume solids of the paint as bought, share', value: solids, unit: '' },
    t: { symbol: 't', what: 'share that stays on the piece', value: transfer, unit: '' },
    r: { symbol: 'r', what: 'parts of reducer to one of paint', value: reducerPerPart, unit: '' },
    l: { symbol: 'l', what: 'left in cup and lines', value: cupLoss, unit: 'mL' },
  }
  const { N, A, d, s, t, r, l } = symbols
  return {
    coatId: coat.id,
    number,
    area: { value: area, unit: 'cm²', formula: 'zones and fins of the coat, with its reach', inputs: [] },
    film: { value: film, unit: 'µm', formula: 'p · k · f', inputs: [
      { symbol: 'p', what: 'passes', value: coat.passes, unit: '' },
      { symbol: 'k', what: 'strength of a pass as reduced', value: passStrength(coat, materials), unit: '' },
      { symbol: 'f', what: 'film of a usual pass', value: filmOfPass(coat, materials), unit: 'µm' },
    ] },
    mix: { value: mix, unit: 'mL', formula: 'N · A · d · 10⁻⁴ / (s · t) · (1 + r) + l', inputs: [N, A, d, s, t, r, l] },
    paint: { value: paint, unit: 'mL', formula: 'mix / (1 + r)', inputs: [{ symbol: 'mix', what: 'mix in the cup', value: mix, unit: 'mL' }, r] },
    reducer: { value: reducer, unit: 'mL', formula: 'mix · r / (1 + r)', inputs: [{ symbol: 'mix', what: 'mix in the cup', value: mix, unit: 'mL' }, r] },
    mass: {
      value: paint * density + reducer, unit: 'g', formula: 'paint · ρ + reducer · 1 g/mL',
      inputs: [{ symbol: 'ρ', what: 'density of the paint', value: density, unit: 'g/mL' }],
    },
    paints: cup.map(part => ({ paintId: part.paint.id, ml: paint * part.share, drops: Math.ceil(paint * part.share * dropsPerMl) })),
    potLifeMinutes: cup.reduce<number | null>((least, { paint: { potLifeMinutes } }) => potLifeMinutes === undefined ? least : Math.min(least ?? potLifeMinutes, potLifeMinutes), null),
  }
}

/**
 * Paint, reducer and mix of every coat for a number of pieces, from the ground up; coats without a known paint are left out.
 * Estimates from planning values, each with its formula and inputs.
 * @throws {RangeError} when pieces is not a whole number of at least 1
 */
export function amounts(body: Pick<SchemeBody, 'stack'>, materials: Pick<Materials, 'paints'>, cells: AreaCells, given: AmountInputs): CoatAmount[] {
  if (!Number.isInteger(given.pieces) || given.pieces < 1) throw new RangeError(`amounts: pieces must be a whole number of at least 1, got ${given.pieces}`)
  return coatsOf(body.stack).flatMap((coat, i) => amountOf(coat, i + 1, materials, cells, given) ?? [])
}

/** How much of each paint the whole scheme takes, mL as it comes from the bottle, in the order of first use. */
export function paintTotals(coats: readonly Pick<CoatAmount, 'paints'>[]): { paintId: string, ml: number }[] {
  const totals = new Map<string, number>()
  for (const { paintId, ml } of coats.flatMap(coat => coat.paints)) totals.set(paintId, (totals.get(paintId) ?? 0) + ml)
  return [...totals].map(([paintId, ml]) => ({ paintId, ml }))
}
