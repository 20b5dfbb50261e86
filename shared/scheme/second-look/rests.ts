import type { PaintBase } from '#shared/shelf/paint'
import type { SchemeBody } from '../body'
import type { Coat } from '../coat'
import { filmOfCoat } from '../film'
import type { Materials } from '../materials'
import { coatWord } from '../publishable'
import { maskWord } from '../stack-order'
import type { Finding } from './finding'

/** A night, minutes: what clear that seals a film is usually made to wait. Common practice; a maker's own figure comes first. */
const NIGHT = 480
/** Minutes that water-based paint is left before anything with solvent goes over it, and that any paint is left before a mask is lifted off it. Common practice. */
const BEFORE_SOLVENT = 60, BEFORE_LIFTING = 3
/** Paint laid without a night between, dry film in µm, above which it stays soft underneath. Our figure. */
const FILM_OF_A_DAY = 250

const SEALING: readonly PaintBase[] = ['epoxy', 'uv-resin', 'moisture-cure', 'two-part-urethane']
const WITH_SOLVENT: readonly PaintBase[] = ['solvent', 'moisture-cure', 'two-part-urethane']
const DRYING: readonly PaintBase[] = ['water', 'solvent']

/** Warns of coats that do not rest long enough for what comes after them. */
export function restFindings(body: SchemeBody, materials: Materials): Finding[] {
  const findings: Finding[] = []
  let last: Coat | undefined
  let film = 0, saidThick = false
  for (const item of body.stack) {
    if (item.act === 'fit') continue
    if (item.act === 'lift') {
      if (last && last.rest < BEFORE_LIFTING && !last.heatSet) findings.push(liftedEarly(body, last, item.maskId))
      continue
    }
    const { coat } = item
    if (last) findings.push(...betweenCoats(body, materials, last, coat))
    if (last && last.rest >= NIGHT) film = 0
    if (!basesIn(coat, materials).some(base => SEALING.includes(base))) film += filmOfCoat(coat, materials)
    if (film > FILM_OF_A_DAY && !saidThick) {
      saidThick = true
      findings.push({
        look: 'thick-for-a-day', coatId: coat.id, key: `thick-for-a-day ${coat.id} ${Math.round(film)}`,
        says: `${coatWord(body, coat)} brings the paint of one day to about ${Math.round(film)} µm of dry film.`,
        why: 'Paint dries from the top: a thick film laid in one go stays soft underneath, and clear over it can split. Let it lie a night in between.',
      })
    }
    last = coat
  }
  return findings
}

function betweenCoats(body: SchemeBody, materials: Materials, below: Coat, coat: Coat): Finding[] {
  const under = basesIn(below, materials), over = basesIn(coat, materials)
  const isSealed = over.some(base => SEALING.includes(base)) && under.some(base => DRYING.includes(base)) && below.rest < NIGHT
  if (isSealed) {
    return [{
      look: 'clear-over-damp', coatId: coat.id, key: `clear-over-damp ${coat.id} ${below.id} ${below.rest}`,
      says: `${coatWord(body, coat)} goes over paint that has rested ${minutes(below.rest)}.`,
      why: 'Clear seals in what has not dried: the film stays soft, clouds or splits along the back. A night between is usual; the sheet of the clear comes first.',
    }]
  }
  const isAttacked = over.some(base => WITH_SOLVENT.includes(base)) && under.includes('water') && below.rest < BEFORE_SOLVENT
  return isAttacked
    ? [{
        look: 'solvent-over-fresh', coatId: coat.id, key: `solvent-over-fresh ${coat.id} ${below.id} ${below.rest}`,
        says: `${coatWord(body, coat)} is solvent-based over water-based paint that has rested ${minutes(below.rest)}.`,
        why: 'Solvent lifts and wrinkles water-based paint that is still fresh.',
      }]
    : []
}

function liftedEarly(body: SchemeBody, coat: Coat, maskId: string): Finding {
  return {
    look: 'lifted-early', coatId: coat.id, key: `lifted-early ${coat.id} ${maskId} ${coat.rest}`,
    says: `${maskWord(body.masks, maskId)} is lifted ${coat.rest === 0 ? 'at once' : `${minutes(coat.rest)} after`} ${lower(coatWord(body, coat))} is laid.`.replace(/^./, first => first.toUpperCase()),
    why: 'Wet paint strings along the edge of a mask and creeps under it as it comes off. Let it go dull first, or heat-set it.',
  }
}

function basesIn(coat: Coat, { paints }: Materials): PaintBase[] {
  return coat.mix.parts.flatMap(part => paints.find(paint => paint.id === part.paintId)?.base ?? [])
}

function minutes(count: number): string {
  return count >= 120 ? `${Math.round(count / 60)} hours` : `${count} ${count === 1 ? 'minute' : 'minutes'}`
}

function lower(word: string): string {
  return word.charAt(0).toLowerCase() + word.slice(1)
}
