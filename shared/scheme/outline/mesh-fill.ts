import type { SchemeBody } from '../body'
import { countWords } from '../coat-words'
import type { Coat } from '../coat'
import { laidCoats } from '../laid-coats'
import type { Mask, Mesh } from '../mask'
import type { Materials } from '../materials'
import { effectivePasses } from '../pass-strength'
import { coatWord } from '../publishable'
import type { Finding } from '../second-look/finding'
import { maskWord } from '../stack-order'

/** Wet paint that stands higher than this share of a thread climbs along it and closes the cell. Our figure, common practice. */
const FLOOD = 0.5
/** Once what drifts under the threads adds up to so many full passes, the lines between the cells are painted too. Our figure. */
const DRIFT = 1
/** Softness of a thread's shadow, mm: lying on the paint, and per mm it stands off (spray opens by 13.5° to a side). */
const SOFT = { tight: 0.03, perLift: 0.24 }

/** What a second look says of a coat that fills the cells of a net; its kind is `mesh-filled`. */
export type MeshFill = Omit<Finding, 'look'> & { maskId: string, /** As many passes keep the cells open. */ most: number }

/** Share of a pass that drifts to the middle of a thread's shadow, 0 to 1. */
export function driftUnder({ thread, lift }: Pick<Mesh, 'thread' | 'lift'>): number {
  const soft = Math.hypot(SOFT.tight, SOFT.perLift * lift)
  return Math.min(1, 2 * tail(thread / 2 / soft))
}

/** Wet paint of one pass as it lands, µm: the cup's planning film over its solids, with the reducer usual for it. 0 where solids are not known. */
export function wetOfPass(coat: Pick<Coat, 'mix'>, { paints }: Pick<Materials, 'paints'>): number {
  const drops = coat.mix.parts.reduce((sum, part) => sum + part.drops, 0)
  return coat.mix.parts.reduce((sum, part) => {
    const paint = paints.find(each => each.id === part.paintId)
    return paint && paint.volumeSolids > 0 ? sum + part.drops / drops * paint.filmPerPass / (paint.volumeSolids / 100) * (1 + paint.reducerPer100 / 100) : sum
  }, 0)
}

/** Most passes of a cup that may go through a net in one coat before wet paint fills its cells; at least one. */
export function passesThroughNet(mesh: Pick<Mesh, 'thread'>, wet: number): number {
  return wet > 0 ? Math.max(1, Math.floor(FLOOD * mesh.thread * 1000 / wet)) : Infinity
}

/**
 * Warns of coats whose passes fill the cells of a net, wet or by what drifts under its threads. A net is a one-shot mask: lifted, it
 * never goes back in register, so that there is no second try.
 */
export function meshFills(body: SchemeBody, materials: Materials): MeshFill[] {
  const drifted = new Map<string, number>()
  return laidCoats(body).flatMap(({ coat, masks }) => masks.flatMap((mask): MeshFill[] => {
    if (mask.form.kind !== 'mesh') return []
    const before = drifted.get(mask.id) ?? 0
    const drift = driftUnder(mask.form)
    const now = before + drift * effectivePasses(coat, materials)
    drifted.set(mask.id, now)
    const most = passesThroughNet(mask.form, wetOfPass(coat, materials))
    if (coat.passes > most) return [flooded(body, materials, coat, mask, mask.form, most)]
    return before < DRIFT && now >= DRIFT ? [blurred(body, coat, mask, drift, Math.max(1, Math.floor((DRIFT - before) / drift)))] : []
  }))
}

function flooded(body: SchemeBody, materials: Materials, coat: Coat, mask: Mask, mesh: Mesh, most: number): MeshFill {
  const wet = Math.round(coat.passes * wetOfPass(coat, materials))
  return {
    coatId: coat.id, maskId: mask.id, most, key: `mesh-filled ${coat.id} ${mask.id} ${coat.passes} ${mesh.thread}`,
    says: `${coatWord(body, coat)} lays ${countWords(coat.passes, 'pass', 'passes')} through ${maskWord(body.masks, mask.id)} in one go: about ${wet} µm of wet paint against threads of ${Math.round(mesh.thread * 1000)} µm.`,
    why: `Wet paint climbs along the threads and fills the cells, and a net once lifted never goes back in register. ${countWords(most, 'pass keeps', 'passes keep')} them open; for more, let it go dull and lay another coat while the net stays on.`,
  }
}

function blurred(body: SchemeBody, coat: Coat, mask: Mask, drift: number, most: number): MeshFill {
  return {
    coatId: coat.id, maskId: mask.id, most, key: `mesh-filled ${coat.id} ${mask.id} ${coat.passes} drift ${drift.toFixed(2)}`,
    says: `With ${coatWord(body, coat).replace(/^./, first => first.toLowerCase())}, what drifts under the threads of ${maskWord(body.masks, mask.id)} adds up to a full pass: ${Math.round(drift * 100)} % of each.`,
    why: 'The lines between the cells are painted as well, and the scales run together. Pull the net tight to the flank, or lay fewer passes: it is fitted once.',
  }
}

/** Upper tail of the normal spread, right to 8e-8 (Abramowitz and Stegun, 26.2.17). */
function tail(x: number): number {
  const t = 1 / (1 + 0.2316419 * x)
  const sum = t * (0.319381530 + t * (-0.356563782 + t * (1.781477937 + t * (-1.821255978 + t * 1.330274429))))
  return Math.exp(-x * x / 2) / Math.sqrt(2 * Math.PI) * sum
}
