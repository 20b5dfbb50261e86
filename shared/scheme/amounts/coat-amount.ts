import { type Cup, cupOf, REDUCER_DENSITY } from './cup'
import { dryDensity, dryWeight } from './dry-film'
import { type Figure, FILM_ROOM, given } from './figure'
import { LABEL_CELSIUS, type Mixes, mixesFor, STEP_CELSIUS } from './mixes'
import { type TwoParts, twoParts } from './two-part'
import type { Coat } from '../coat'
import { type AreaCells, coatAreaParts } from '../coat-area'
import { filmOfCoat, filmOfPass } from '../film'
import type { Materials } from '../materials'
import { reducedSolids, sprayedVolume, wetFilm } from '../paint-formulas'
import { passStrength } from '../pass-strength'
import type { PlanningValues } from '#shared/quantities/planning-values'

/** What the amounts are worked out for, and with what. */
export interface AmountInputs extends PlanningValues { pieces: number }

/** One paint of a cup, as it comes from its bottle. */
export interface PaintAmount {
  paintId: string
  ml: number
  drops: number
  /** Resin and hardener of it; null for what comes ready to lay. */
  twoParts: TwoParts | null
}

/** One cup: the pieces it is for and what goes into it, mL. */
export interface CupAmounts {
  first: number
  last: number
  mix: number
  reducer: number
  paints: PaintAmount[]
}

/** How what sets is cut into mixes, with its figures. */
export interface SettingAmount extends Mixes {
  potLifeFigure: Figure
  piecesFigure: Figure
  countFigure: Figure
}

/** What one coat takes for all pieces. */
export interface CoatAmount {
  coatId: string
  number: number
  area: Figure
  film: Figure
  /** Film before it dries. */
  wet: Figure
  /** Paint as it comes from the bottles. */
  paint: Figure
  reducer: Figure
  /** What goes into the cup, loss included. */
  mix: Figure
  /** The mix by weight. */
  mass: Figure
  /** What it leaves on one piece when dry. */
  dry: Figure
  /** Whether only clear is in its cup. */
  isClear: boolean
  /** Each paint's part of the whole. */
  paints: PaintAmount[]
  /** The cups it is laid from: one, or a mix for every few pieces of what sets. */
  cups: CupAmounts[]
  /** Shortest working time of what is in the cup at 25 °C, minutes; null for what does not set. */
  potLifeMinutes: number | null
  setting: SettingAmount | null
}

function setting(coat: Coat, potLifeMinutes: number, plan: AmountInputs): SettingAmount {
  const { pieces, room, setsFaster, usable, minutesPerPass } = plan
  const mixes = mixesFor({ ...plan, potLifeMinutes, passes: coat.passes })
  return {
    ...mixes,
    potLifeFigure: {
      value: mixes.potLife, quantity: 'minutes', formula: 'L · f^((T₀ − T) / D)', inputs: [
        given('L', `working time on its label at T₀`, potLifeMinutes, 'minutes'), given('f', 'how many times faster it sets D warmer', setsFaster),
        given('T₀', 'temperature of the label', LABEL_CELSIUS, 'temperature'), given('T', 'the room', room, 'temperature'), given('D', 'step', STEP_CELSIUS, 'temperature step'),
      ],
    },
    piecesFigure: {
      value: mixes.piecesPerMix, quantity: 'count', formula: 'P · u / (m · p), whole pieces', inputs: [
        given('P', 'pot life in the room', mixes.potLife, 'minutes'), given('u', 'share of it that is planned with', usable, 'share'),
        given('m', 'time of one pass on one piece', minutesPerPass, 'minutes'), given('p', 'passes', coat.passes),
      ],
    },
    countFigure: {
      value: mixes.batches.length, quantity: 'count', formula: 'N / n, rounded up',
      inputs: [given('N', 'pieces', pieces), given('n', 'pieces one mix reaches for, at least 1', Math.max(1, mixes.piecesPerMix))],
    },
  }
}

function paintsOf({ parts }: Cup, ml: number, dropsPerMl: number): PaintAmount[] {
  return parts.map(({ paint, share }) => ({
    paintId: paint.id,
    ml: ml * share,
    drops: Math.ceil(ml * share * dropsPerMl),
    twoParts: paint.twoPart ? twoParts(paint.twoPart, ml * share, paint.density) : null,
  }))
}

/** What one coat takes for all pieces; null when none of its paints is known. */
export function coatAmount(coat: Coat, number: number, materials: Pick<Materials, 'paints'>, cells: AreaCells, plan: AmountInputs): CoatAmount | null {
  const cup = cupOf(coat, materials)
  if (!cup) return null
  const { pieces, cupLoss, dropsPerMl } = plan
  const { solids, density, reducerPerPart, potLifeMinutes } = cup
  const parts = coatAreaParts(coat, cells)
  const area = (parts.body + parts.fins) / 100
  const film = filmOfCoat(coat, materials)
  const transfer = plan.transfer[coat.tool.kind]
  const sets = potLifeMinutes === null ? null : setting(coat, potLifeMinutes, plan)
  const batches = sets?.batches ?? [[1, pieces] as const]
  const perPiece = sprayedVolume(area, film, solids, transfer) * (1 + reducerPerPart)
  const mix = pieces * perPiece + batches.length * cupLoss
  const paint = mix / (1 + reducerPerPart)
  const N = given('N', 'pieces', pieces)
  const A = given('A', 'area of the coat on one piece', area, 'area')
  const d = given('d', 'dry film of the coat', film, 'film')
  const s = given('s', 'volume solids of the paint as bought, share', solids, 'share')
  const t = given('t', 'share that stays on the piece', transfer, 'share')
  const r = given('r', 'parts of reducer to one of paint', reducerPerPart)
  const l = given('l', 'left in cup and lines', cupLoss, 'volume')
  const M = given('M', 'mixes', batches.length)
  const V = given('V', 'mix for all pieces', mix, 'volume')
  return {
    coatId: coat.id,
    number,
    area: { value: area, quantity: 'area', formula: 'b + f', inputs: [given('b', 'on the body, zones with their reach', parts.body / 100, 'area'), given('f', 'on fins, both faces', parts.fins / 100, 'area')] },
    film: { value: film, quantity: 'film', formula: 'p · k · f', inputs: [
      given('p', 'passes', coat.passes), given('k', 'strength of a pass as reduced', passStrength(coat, materials)), given('f', 'film of a usual pass', filmOfPass(coat, materials), 'film'),
    ] },
    wet: { value: wetFilm(film, 100 * reducedSolids(solids, reducerPerPart)), quantity: 'film', formula: 'd · (1 + r) / s', inputs: [d, r, s] },
    mix: { value: mix, quantity: 'volume', formula: 'N · A · d · c / (s · t) · (1 + r) + M · l', inputs: [N, A, d, FILM_ROOM, s, t, r, M, l] },
    paint: { value: paint, quantity: 'volume', formula: 'V / (1 + r)', inputs: [V, r] },
    reducer: { value: mix - paint, quantity: 'volume', formula: 'V · r / (1 + r)', inputs: [V, r] },
    mass: { value: paint * density + (mix - paint) * REDUCER_DENSITY, quantity: 'mass', formula: 'B · ρ + R · ρᵣ', inputs: [
      given('B', 'paint', paint, 'volume'), given('ρ', 'its density', density, 'density'), given('R', 'reducer', mix - paint, 'volume'), given('ρᵣ', 'density of reducer', REDUCER_DENSITY, 'density'),
    ] },
    dry: dryWeight(area, film, dryDensity(cup)),
    isClear: cup.parts.every(part => part.paint.kind === 'clear'),
    paints: paintsOf(cup, paint, dropsPerMl),
    cups: batches.map(([first, last]) => {
      const own = (last - first + 1) * perPiece + cupLoss
      const ownPaint = own / (1 + reducerPerPart)
      return { first, last, mix: own, reducer: own - ownPaint, paints: paintsOf(cup, ownPaint, dropsPerMl) }
    }),
    potLifeMinutes,
    setting: sets,
  }
}
