import type { RunStep } from './run-step'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { amounts, type CoatAmount, PLANNING_VALUES } from '#shared/scheme/amounts'
import { areaCells } from '#shared/scheme/coat-area'
import type { Coat } from '#shared/scheme/coat'
import type { LaidCoat } from '#shared/scheme/laid-coats'
import { laidCoats } from '#shared/scheme/laid-coats'
import type { Materials, PaintSnapshot } from '#shared/scheme/materials'
import type { SchemeBody } from '#shared/scheme/body'
import { cautionFor } from '#shared/shelf/hazards'

/** A published finish as the bench gets it. */
export interface BenchScheme { body: SchemeBody, materials: Materials }

/** Rests this long or longer are spent on the turner when the coat is a clear, minutes. */
const TURNS_FROM = 120

/**
 * What to do, step by step, to paint so many pieces of a revision: mix, fit, lay, rest, heat-set, lift, clean out, clear, turn.
 * The same revision and number of pieces always give the same steps with the same ids, on every tablet.
 */
export function runSteps(scheme: BenchScheme, pieces: number): RunStep[] {
  const { body, materials } = scheme
  const laid = laidCoats(body)
  const cells = areaCells(prepareBlank(materials.blank.shape))
  const toMix = new Map(amounts(body, materials, cells, { pieces, ...PLANNING_VALUES }).map(amount => [amount.coatId, amount]))
  const masks = new Map(body.masks.map(mask => [mask.id, mask]))
  const steps: RunStep[] = [{ id: 'prepare', kind: 'prepare', caution: null }]
  let number = 0
  let hasEyes = body.eyes === null

  for (const item of body.stack) {
    if (item.act !== 'coat') {
      const mask = masks.get(item.maskId)
      if (mask) steps.push({ id: `${item.act}:${mask.id}`, kind: item.act, mask, caution: null })
      continue
    }
    const one = laid[number]
    const amount = toMix.get(item.coat.id)
    if (!one || !amount) continue
    if (!hasEyes && isClear(one.coat, materials)) {
      steps.push({ id: 'eyes', kind: 'eyes', caution: null })
      hasEyes = true
    }
    steps.push(...coatSteps(one, laid[number + 1], amount, materials))
    number++
  }
  if (!hasEyes) steps.push({ id: 'eyes', kind: 'eyes', caution: null })
  steps.push({ id: 'inspect', kind: 'inspect', caution: null })
  return steps
}

function coatSteps({ coat, number, masks }: LaidCoat, next: LaidCoat | undefined, amount: CoatAmount, materials: Materials): RunStep[] {
  const base = { coat, number, coatName: coatName(coat, materials) }
  const caution = cautionFor(cupOf(coat, materials))
  const steps: RunStep[] = [
    { ...base, id: `mix:${coat.id}`, kind: 'mix', amount, caution },
    { ...base, id: `lay:${coat.id}`, kind: 'lay', through: masks.map(mask => mask.name), caution },
  ]
  if (isClear(coat, materials) && coat.rest >= TURNS_FROM)
    steps.push({ ...base, id: `turn:${coat.id}`, kind: 'turn', minutes: coat.rest, caution: null })
  else if (coat.rest > 0)
    steps.push({ ...base, id: `rest:${coat.id}`, kind: 'rest', minutes: coat.rest, caution: null })
  if (coat.heatSet)
    steps.push({ ...base, id: `heat:${coat.id}`, kind: 'heat', ...coat.heatSet, caution: HEAT })
  if (coat.tool.kind === 'airbrush' && next && !sameCup(coat, next.coat))
    steps.push({ ...base, id: `clean:${coat.id}`, kind: 'clean', next: coatName(next.coat, materials), caution: null })
  return steps
}

/** Common practice: foam bodies soften from about 43 °C, and a heat gun blisters acrylic; solvents near heat burn. */
const HEAT: RunStep['caution'] = {
  headline: 'Heat: keep it moving, no solvent near',
  body: 'Stay below what the body bears: some foams soften from 43 °C, and air in a hollow body swells. No heat near open solvent or its vapour.',
  pictograms: ['GHS02'],
  statements: [],
}

function isClear(coat: Coat, materials: Materials): boolean {
  const paints = cupOf(coat, materials)
  return paints.length > 0 && paints.every(paint => paint.kind === 'clear')
}

function cupOf(coat: Coat, materials: Materials): PaintSnapshot[] {
  return coat.mix.parts.flatMap(part => materials.paints.filter(paint => paint.id === part.paintId))
}

function coatName(coat: Coat, materials: Materials): string {
  return coat.name || cupOf(coat, materials).map(paint => paint.name).join(' and ') || 'an empty cup'
}

function sameCup(a: Coat, b: Coat): boolean {
  const parts = (coat: Coat) => coat.mix.parts.map(part => `${part.paintId} ${part.drops}`).sort().join()
  return parts(a) === parts(b) && a.mix.reducer === b.mix.reducer
}
