import { BODY_BEARS, type BodyMaterial } from './body-material'
import { mixBatches } from './mix-batches'
import type { MixAdvice, RunStep } from './run-step'
import { GLUE_CAUTION, HEAT_CAUTION, prepareCaution, restCaution } from './step-cautions'
import type { Coat } from '#shared/scheme/coat'
import { isClearCoat } from '#shared/picture/coat-paint'
import { type LaidCoat, laidCoats } from '#shared/scheme/laid-coats'
import type { PaintSnapshot } from '#shared/scheme/materials'
import type { Look } from '#shared/picture/look'
import { sameValue } from '#shared/scheme/canonical'
import type { PaintBase } from '#shared/shelf/paint'
import { cautionFor } from '#shared/shelf/hazards'

/** Rests this long or longer are spent on the turner when the coat is a clear, minutes. */
const TURNS_FROM = 120

/** Forms in which steps were worked out so far: a run keeps the one it began with, so that nobody has to go back to a step that was added. */
export const STEPS_FORMS = [1, 2] as const
export type StepsForm = typeof STEPS_FORMS[number]
/** The form of runs that begin today. */
export const STEPS_FORM_NOW: StepsForm = 2

/** What decides the steps beside the finish and the number of pieces. */
export interface StepsWish {
  /** 1: without warming up, setting the airbrush, test spray, looking over and curing. */
  form: StepsForm
  /** What the bodies are made of; null where nobody said. */
  madeOf: BodyMaterial | null
}

/** Where a coat stands among its neighbours. */
interface Place { laid: LaidCoat, before: readonly LaidCoat[], after: readonly LaidCoat[], pieces: number, look: Look, wish: StepsWish }

/** How long the last coat of a kind takes to be hard all the way, hours at room temperature. Common practice; the data sheet knows better. */
const CURE_HOURS: Readonly<Record<PaintBase, number>> = {
  'water': 24, 'solvent': 24, 'epoxy': 24, 'uv-resin': 1, 'moisture-cure': 72, 'two-part-urethane': 48,
}

/**
 * What to do, step by step, to paint so many pieces of a revision: make ready, warm up, mix, set the airbrush, fit, test spray,
 * lay, rest, heat-set, lift, clean out, eyes, look over, clear, turn, cure, inspect. The same revision, number of pieces and
 * wish always give the same steps with the same ids, on every tablet.
 * @throws {RangeError} when pieces is not a whole number of at least 1
 */
export function runSteps(look: Look, pieces: number, wish: StepsWish = { form: STEPS_FORM_NOW, madeOf: null }): RunStep[] {
  const { body, materials } = look
  const isNew = wish.form > 1
  const laid = laidCoats(body)
  const masks = new Map(body.masks.map(mask => [mask.id, mask]))
  const steps: RunStep[] = [{ id: 'prepare', kind: 'prepare', only: null, caution: prepareCaution(materials.paints) }]
  if (isNew) steps.push({ id: 'warm', kind: 'warm', only: null, caution: null })
  /** Masks that go on right before the next coat: after its cup is full, so that they are not on for longer than they must. */
  const toFit: RunStep[] = []
  let isOver = false
  const eyes: RunStep = { id: 'eyes', kind: 'eyes', only: null, caution: GLUE_CAUTION }
  let index = 0
  let needsEyes = body.eyes !== null

  for (const item of body.stack) {
    if (item.act !== 'coat') {
      const mask = masks.get(item.maskId)
      const step: RunStep | undefined = mask && { id: `${item.act}:${mask.id}`, kind: item.act, mask, only: null, caution: null }
      if (step) (isNew && item.act === 'fit' ? toFit : steps).push(step)
      // One that comes off before anything was laid is fitted and lifted all the same.
      if (item.act === 'lift' && toFit.length > 0) steps.splice(-1, 0, ...toFit.splice(0))
      continue
    }
    const one = laid[index]
    if (!one) continue
    if (needsEyes && isClearCoat(one.coat, materials)) {
      steps.push(eyes)
      needsEyes = false
    }
    if (isNew && !isOver && isClearCoat(one.coat, materials)) {
      steps.push({ id: 'look-over', kind: 'look-over', only: null, caution: null })
      isOver = true
    }
    const own = coatSteps({ laid: one, before: laid.slice(0, index), after: laid.slice(index + 1), pieces, look, wish })
    const fitAt = own.findIndex(step => step.kind === 'test' || step.kind === 'lay')
    steps.push(...own.toSpliced(Math.max(0, fitAt), 0, ...toFit.splice(0)))
    index++
  }
  steps.push(...toFit)
  if (needsEyes) steps.push(eyes)
  const last = laid.at(-1)
  if (isNew && last) steps.push(cureStep(last, look))
  steps.push({ id: 'inspect', kind: 'inspect', only: null, caution: null })
  return steps
}

function cureStep({ coat, number }: LaidCoat, look: Look): RunStep {
  const cup = cupOf(coat, look)
  const hours = Math.max(...cup.map(paint => CURE_HOURS[paint.base]), 1)
  return { ...coatBase(coat, number, look), id: `cure:${coat.id}`, kind: 'cure', minutes: hours * 60, caution: restCaution(cup) }
}

function coatBase(coat: Coat, number: number, look: Look) {
  return { coat, number, coatName: coatName(coat, look), isClear: isClearCoat(coat, look.materials), only: null }
}

/** How the airbrush stands after the coats below: as the last of them set it. */
function airbrushAfter(before: readonly LaidCoat[]): Coat['tool'] | null {
  return before.findLast(({ coat }) => coat.tool.kind === 'airbrush')?.coat.tool ?? null
}

function coatSteps({ laid: { coat, number, masks }, before, after, pieces, look, wish }: Place): RunStep[] {
  const cup = cupOf(coat, look)
  const base = coatBase(coat, number, look)
  const isNew = wish.form > 1
  const caution = cautionFor(cup)
  const potLifeMinutes = potLifeOf(cup)
  const batches = mixBatches(pieces, potLifeMinutes, coat.passes)
  const below = before.at(-1)
  const isFilled = below !== undefined && staysInCup(below.coat, coat, look)
  const { tool } = coat
  const set: RunStep[] = isNew && tool.kind === 'airbrush' && !sameValue(tool, airbrushAfter(before))
    ? [{ ...base, id: `set:${coat.id}`, kind: 'set', tool, caution: null }]
    : []
  const test: RunStep[] = isNew && tool.kind === 'airbrush' && (!isFilled || set.length > 0) && cup.length > 0
    ? [{ ...base, id: `test:${coat.id}`, kind: 'test', caution }]
    : []
  const coats = [coat, ...sameCupAbove(coat, after, look)]

  const steps = batches.flatMap((range, k): RunStep[] => {
    const part = batches.length === 1 ? { tail: '', only: null } : { tail: `:${k + 1}`, only: range }
    const mix: RunStep = {
      ...base, id: `mix:${coat.id}${part.tail}`, kind: 'mix', only: part.only, coats, advice: adviceFor(coat, cup), potLifeMinutes, caution,
    }
    const lay: RunStep = { ...base, id: `lay:${coat.id}${part.tail}`, kind: 'lay', only: part.only, through: masks, caution }
    const before = k === 0 ? [...set, ...test] : []
    return isFilled || cup.length === 0 ? [...before, lay] : [mix, ...before, lay]
  })
  if (base.isClear && coat.rest >= TURNS_FROM) steps.push({ ...base, id: `turn:${coat.id}`, kind: 'turn', minutes: coat.rest, caution: restCaution(cup) })
  else if (coat.rest > 0) steps.push({ ...base, id: `rest:${coat.id}`, kind: 'rest', minutes: coat.rest, caution: restCaution(cup) })
  if (coat.heatSet) steps.push({ ...base, id: `heat:${coat.id}`, kind: 'heat', ...coat.heatSet, limit: wish.madeOf === null ? null : BODY_BEARS[wish.madeOf], caution: HEAT_CAUTION })
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
