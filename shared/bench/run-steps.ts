import { mixBatches } from './mix-batches'
import type { MixAdvice, RunStep } from './run-step'
import { GLUE_CAUTION, HEAT_CAUTION, prepareCaution, restCaution } from './step-cautions'
import type { Coat } from '#shared/scheme/coat'
import { isClearCoat } from '#shared/picture/coat-paint'
import { type LaidCoat, laidCoats } from '#shared/scheme/laid-coats'
import type { PaintSnapshot } from '#shared/scheme/materials'
import type { Look } from '#shared/picture/look'
import { cautionFor } from '#shared/shelf/hazards'

/** Rests this long or longer are spent on the turner when the coat is a clear, minutes. */
const TURNS_FROM = 120

/** Where a coat stands among its neighbours. */
interface Place { laid: LaidCoat, before: LaidCoat | undefined, after: readonly LaidCoat[], pieces: number, look: Look }

/**
 * What to do, step by step, to paint so many pieces of a revision: mix, fit, lay, rest, heat-set, lift, clean out, clear, turn.
 * The same revision and number of pieces always give the same steps with the same ids, on every tablet.
 * @throws {RangeError} when pieces is not a whole number of at least 1
 */
export function runSteps(look: Look, pieces: number): RunStep[] {
  const { body, materials } = look
  const laid = laidCoats(body)
  const masks = new Map(body.masks.map(mask => [mask.id, mask]))
  const steps: RunStep[] = [{ id: 'prepare', kind: 'prepare', only: null, caution: prepareCaution(materials.paints) }]
  const eyes: RunStep = { id: 'eyes', kind: 'eyes', only: null, caution: GLUE_CAUTION }
  let index = 0
  let needsEyes = body.eyes !== null

  for (const item of body.stack) {
    if (item.act !== 'coat') {
      const mask = masks.get(item.maskId)
      if (mask) steps.push({ id: `${item.act}:${mask.id}`, kind: item.act, mask, only: null, caution: null })
      continue
    }
    const one = laid[index]
    if (!one) continue
    if (needsEyes && isClearCoat(one.coat, materials)) {
      steps.push(eyes)
      needsEyes = false
    }
    steps.push(...coatSteps({ laid: one, before: laid[index - 1], after: laid.slice(index + 1), pieces, look }))
    index++
  }
  if (needsEyes) steps.push(eyes)
  steps.push({ id: 'inspect', kind: 'inspect', only: null, caution: null })
  return steps
}

function coatSteps({ laid: { coat, number, masks }, before, after, pieces, look }: Place): RunStep[] {
  const { materials } = look
  const cup = cupOf(coat, look)
  const base = { coat, number, coatName: coatName(coat, look), isClear: isClearCoat(coat, materials), only: null }
  const caution = cautionFor(cup)
  const potLifeMinutes = potLifeOf(cup)
  const batches = mixBatches(pieces, potLifeMinutes, coat.passes)
  const isFilled = before !== undefined && staysInCup(before.coat, coat, look)
  const coats = [coat, ...sameCupAbove(coat, after, look)]

  const steps = batches.flatMap((range, k): RunStep[] => {
    const part = batches.length === 1 ? { tail: '', only: null } : { tail: `:${k + 1}`, only: range }
    const mix: RunStep = {
      ...base, id: `mix:${coat.id}${part.tail}`, kind: 'mix', only: part.only, coats, advice: adviceFor(coat, cup), potLifeMinutes, caution,
    }
    const lay: RunStep = { ...base, id: `lay:${coat.id}${part.tail}`, kind: 'lay', only: part.only, through: masks, caution }
    return isFilled || cup.length === 0 ? [lay] : [mix, lay]
  })
  if (base.isClear && coat.rest >= TURNS_FROM) steps.push({ ...base, id: `turn:${coat.id}`, kind: 'turn', minutes: coat.rest, caution: restCaution(cup) })
  else if (coat.rest > 0) steps.push({ ...base, id: `rest:${coat.id}`, kind: 'rest', minutes: coat.rest, caution: restCaution(cup) })
  if (coat.heatSet) steps.push({ ...base, id: `heat:${coat.id}`, kind: 'heat', ...coat.heatSet, caution: HEAT_CAUTION })
  const next = after[0]?.coat
  if (coat.tool.kind === 'airbrush' && !(next && staysInCup(coat, next, look)))
    steps.push({ ...base, id: `clean:${coat.id}`, kind: 'clean', next: nextForAirbrush(after, look), caution })
  return steps
}

/** What a coat is called at the bench: its own name, else what is in its cup. */
export function coatName(coat: Coat, look: Pick<Look, 'materials'>): string {
  return coat.name || cupOf(coat, look).map(paint => paint.name).join(' and ') || 'An empty cup'
}

function cupOf(coat: Coat, { materials }: Pick<Look, 'materials'>): PaintSnapshot[] {
  return coat.mix.parts.flatMap(part => materials.paints.filter(paint => paint.id === part.paintId))
}

function potLifeOf(cup: readonly PaintSnapshot[]): number | null {
  return cup.reduce<number | null>((least, { potLifeMinutes }) => potLifeMinutes === undefined ? least : Math.min(least ?? potLifeMinutes, potLifeMinutes), null)
}

/** Whether the cup can go from one coat to the next as it is: the same mix by the same tool, and nothing in it that sets. */
function staysInCup(a: Coat, b: Coat, look: Look): boolean {
  const parts = (coat: Coat) => coat.mix.parts.map(part => `${part.paintId} ${part.drops}`).sort().join()
  return a.tool.kind === b.tool.kind && parts(a) === parts(b) && a.mix.reducer === b.mix.reducer && potLifeOf(cupOf(a, look)) === null
}

function sameCupAbove(coat: Coat, after: readonly LaidCoat[], look: Look): Coat[] {
  const end = after.findIndex(each => !staysInCup(coat, each.coat, look))
  return (end < 0 ? after : after.slice(0, end)).map(each => each.coat)
}

function nextForAirbrush(after: readonly LaidCoat[], look: Look): string | null {
  const next = after.find(each => each.coat.tool.kind === 'airbrush')
  return next ? coatName(next.coat, look) : null
}

/** Common practice: flakes sink and are stirred, whatever goes through a nozzle is strained, resins are stirred whole and kept shallow. */
function adviceFor(coat: Coat, cup: readonly PaintSnapshot[]): MixAdvice[] {
  const hasFlakes = cup.some(paint => paint.optics.kind === 'flake')
  const sets = cup.some(paint => paint.base === 'epoxy' || paint.base === 'two-part-urethane')
  return [
    ...coat.tool.kind === 'airbrush' ? ['strain' as const] : [],
    ...hasFlakes ? ['stir often' as const] : [],
    ...sets ? ['stir both parts' as const] : [],
    ...cup.some(paint => paint.base === 'epoxy') ? ['shallow cup' as const] : [],
  ]
}
