import type { RunAct } from './run-event'
import { type DoneAct, inPlace, type RunPlan, standingActs } from './run-state'
import type { Look } from '#shared/picture/look'
import { PLANNING_VALUES } from '#shared/scheme/amounts'
import type { Coat } from '#shared/scheme/coat'
import { type AreaCells, coatArea } from '#shared/scheme/coat-area'
import { filmOfCoat } from '#shared/scheme/film'
import type { Materials } from '#shared/scheme/materials'
import { sprayedVolume } from '#shared/scheme/paint-formulas'

/** What was taken of a paint, and out of which bottle. */
export interface PaintUsed {
  paintId: string
  /** Null where no bottle of it was named. */
  bottleId: string | null
  /** As it comes from the bottle, mL. */
  ml: number
}

type Laid = Extract<RunAct, { kind: 'pass-laid' }>
type CupAct = Extract<RunAct, { kind: 'thinned' | 'paint-changed' }>

/** Paint of one pass of a coat on one piece, mL as it comes from the bottles; planning values as in the amounts. */
function paintOfPass(coat: Coat, look: Look, cells: AreaCells): { paintId: string, ml: number }[] {
  const cup = cupOf(coat, look.materials)
  const drops = cup.reduce((sum, part) => sum + part.drops, 0)
  if (drops === 0) return []
  const solids = cup.reduce((sum, part) => sum + part.drops / drops * part.paint.volumeSolids / 100, 0)
  const ml = sprayedVolume(coatArea(coat, cells) / 100, filmOfCoat({ ...coat, passes: 1 }, look.materials), solids, PLANNING_VALUES.transfer[coat.tool.kind])
  return cup.map(part => ({ paintId: part.paint.id, ml: ml * part.drops / drops }))
}

/** Paint that stays in cup and lines each time the cup is filled, mL. */
function paintOfCup(coat: Coat, look: Look): { paintId: string, ml: number }[] {
  const cup = cupOf(coat, look.materials)
  const drops = cup.reduce((sum, part) => sum + part.drops, 0)
  if (drops === 0) return []
  const paint = PLANNING_VALUES.cupLoss / (1 + coat.mix.reducer / coat.mix.parts.reduce((sum, part) => sum + part.drops, 0))
  return cup.map(part => ({ paintId: part.paint.id, ml: paint * part.drops / drops }))
}

function cupOf(coat: Coat, materials: Pick<Materials, 'paints'>) {
  return coat.mix.parts.flatMap(({ paintId, drops }) => {
    const paint = materials.paints.find(each => each.id === paintId)
    return paint ? [{ paint, drops }] : []
  })
}

/** The cup of a coat as it was mixed for a piece (0: for any), and which paint stands in for which. */
function cupFor(coat: Coat, piece: number, said: readonly CupAct[]): { coat: Coat, standIn: ReadonlyMap<string, string> } {
  const standIn = new Map<string, string>()
  let reducer = coat.mix.reducer
  for (const act of said) {
    if (act.coatId !== coat.id || (act.pieces && !act.pieces.includes(piece))) continue
    if (act.kind === 'thinned') reducer = act.reducer
    else standIn.set(act.from, act.to)
  }
  return { coat: { ...coat, mix: { ...coat.mix, reducer } }, standIn }
}

/** Which bottle a paint of a coat comes out of at a moment of the run. */
class BottlesAtHand {
  private readonly now: Map<string, string>

  constructor(start: Readonly<Record<string, string>>) {
    this.now = new Map(Object.entries(start))
  }

  take({ paintId, bottleId, coatId }: Extract<RunAct, { kind: 'bottle-used' }>): void {
    if (coatId !== undefined) {
      this.now.set(`${paintId} ${coatId}`, bottleId)
      return
    }
    for (const key of this.now.keys()) if (key.startsWith(`${paintId} `)) this.now.delete(key)
    this.now.set(paintId, bottleId)
  }

  of(paintId: string, coatId: string): string | null {
    return this.now.get(`${paintId} ${coatId}`) ?? this.now.get(paintId) ?? null
  }
}

/**
 * What a run took out of which bottle by now: every pass that was laid, on whatever piece, by the coat as it was mixed then,
 * and the loss in cup and lines once for each mix. The same acts give the same in any order of arrival; an act twice takes
 * nothing twice, and what was taken back gives its paint back. `start` is the bottle of each paint at the start.
 * An estimate from planning values (common practice), as the amounts are; a paint that stands in for another counts drop for drop.
 */
export function paintUsed(look: Look, cells: AreaCells, plan: RunPlan, events: readonly DoneAct[], start: Readonly<Record<string, string>>): PaintUsed[] {
  const used = new Map<string, PaintUsed>()
  const bottles = new BottlesAtHand(start)
  const said: CupAct[] = []
  const mixed = new Set<string>()
  const lays = new Map(plan.steps.flatMap(step => step.kind === 'lay' ? [[step.coat.id, step.coat] as const] : []))
  const onePass = new Map<string, { paintId: string, ml: number }[]>()

  const take = (parts: readonly { paintId: string, ml: number }[], times: number, coatId: string, standIn: ReadonlyMap<string, string>) => {
    for (const { paintId: written, ml } of parts) {
      const paintId = standIn.get(written) ?? written
      const bottleId = bottles.of(paintId, coatId)
      const key = `${paintId} ${bottleId}`
      used.set(key, { paintId, bottleId, ml: (used.get(key)?.ml ?? 0) + ml * times })
    }
  }
  const lay = ({ coatId, pieces, passes }: Laid) => {
    const planned = lays.get(coatId)
    if (!planned) return
    for (const piece of new Set(pieces)) {
      const { coat, standIn } = cupFor(planned, piece, said)
      const key = `${coatId} ${coat.mix.reducer}`
      const parts = onePass.get(key) ?? paintOfPass(coat, look, cells)
      onePass.set(key, parts)
      take(parts, passes, coatId, standIn)
    }
  }

  for (const { act } of standingActs(events).sort(inPlace)) {
    if (act.kind === 'bottle-used') bottles.take(act)
    else if (act.kind === 'thinned' || act.kind === 'paint-changed') said.push(act)
    else if (act.kind === 'pass-laid') lay(act)
    else if (act.kind === 'step-done' && !mixed.has(act.stepId)) {
      const mix = plan.steps.find(step => step.id === act.stepId)
      if (mix?.kind !== 'mix') continue
      mixed.add(mix.id)
      const { coat, standIn } = cupFor(mix.coat, act.pieces?.[0] ?? 0, said)
      take(paintOfCup(coat, look), 1, coat.id, standIn)
    }
  }
  return [...used.values()].sort((a, b) => `${a.paintId} ${a.bottleId}` < `${b.paintId} ${b.bottleId}` ? -1 : 1)
}
