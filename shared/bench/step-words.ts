import { durationWords } from './piece-words'
import { type MixAdvice, type RunStep, type WaitStep, waitSeconds } from './run-step'
import { countWords, listWords, toolWords } from '#shared/scheme/coat-words'
import type { Mask } from '#shared/scheme/mask'

const MASK_WORD: Readonly<Record<Mask['form']['kind'], string>> = { mesh: 'mesh', stencil: 'stencil', tape: 'tape' }

/** What to do, as its plate says it: "Lay coat 9", "Fit the mesh", "Mix for 12 pieces". */
export function stepTitle(step: RunStep, pieces: number): string {
  switch (step.kind) {
    case 'prepare': return 'Make ready'
    case 'warm': return 'Warm up'
    case 'mix': return `Mix for ${countWords(pieces, 'piece')}`
    case 'set': return 'Set the airbrush'
    case 'test': return 'Test spray'
    case 'fit': return `Fit the ${MASK_WORD[step.mask.form.kind]}`
    case 'lay': return step.isClear ? `Clear, coat ${step.number}` : `Lay coat ${step.number}`
    case 'rest': return `Rest ${durationWords(waitSeconds(step))}`
    case 'heat': return `Heat-set ${durationWords(step.seconds)}`
    case 'lift': return `Lift the ${MASK_WORD[step.mask.form.kind]}`
    case 'clean': return 'Clean out'
    case 'eyes': return 'Set the eyes'
    case 'look-over': return 'Look it over'
    case 'cure': return `Cure ${durationWords(step.minutes * 60)}`
    case 'turn': return `Turn ${durationWords(step.minutes * 60)}`
    case 'inspect': return 'Inspect'
  }
}

/** The line under the plate: what it is about. */
export function stepLine(step: RunStep): string {
  switch (step.kind) {
    case 'prepare': return 'Air, light, gloves, and everything within reach'
    case 'warm': return 'paint, blanks and room at one warmth'
    case 'set': return `${toolWords(step.tool)}, for coat ${step.number}`
    case 'test': return `${step.coatName} on a card, as it will be laid`
    case 'mix': return mixLine(step.coatName, step.number, step.coats.length)
    case 'fit': return step.mask.name
    case 'lay': return `${step.coatName}${throughWords(step.through)}`
    case 'rest': return `after coat ${step.number}, ${step.coatName}`
    case 'heat': return `coat ${step.number}, from ${step.distance} cm away`
    case 'lift': return step.mask.name
    case 'clean': return step.next === null ? `${step.coatName} was the last` : `${step.coatName} out, ${step.next} comes next`
    case 'eyes': return 'before the clear, so that it seals them in'
    case 'look-over': return 'what is under the clear stays under it'
    case 'cure': return `coat ${step.number}, until it is hard all the way`
    case 'turn': return `coat ${step.number}, until it no longer runs`
    case 'inspect': return 'each piece against the master, under the same lamp'
  }
}

/** What follows, in Next: "rest 6 minutes", "mix coat 10", "fit the mesh". */
export function nextWords(step: RunStep): string {
  switch (step.kind) {
    case 'prepare': return 'make ready'
    case 'warm': return 'warm up'
    case 'mix': return `mix coat ${step.number}`
    case 'set': return 'set the airbrush'
    case 'test': return 'test spray'
    case 'fit': return `fit the ${MASK_WORD[step.mask.form.kind]}`
    case 'lay': return step.isClear ? `lay the clear, coat ${step.number}` : `lay coat ${step.number}`
    case 'rest': return `rest ${shortDuration(step)}`
    case 'heat': return `heat-set ${shortDuration(step)}`
    case 'lift': return `lift the ${MASK_WORD[step.mask.form.kind]}`
    case 'clean': return 'clean out'
    case 'eyes': return 'set the eyes'
    case 'look-over': return 'look it over'
    case 'cure': return `cure ${shortDuration(step)}`
    case 'turn': return `turn ${shortDuration(step)}`
    case 'inspect': return 'inspect'
  }
}

/** A step's name in a list or a log: "Lay coat 9, Smoke black". */
export function stepName(step: RunStep): string {
  switch (step.kind) {
    case 'mix': return `Mix coat ${step.number}, ${step.coatName}`
    case 'lay': return `${step.isClear ? 'Clear, coat' : 'Lay coat'} ${step.number}, ${step.coatName}`
    case 'set':
    case 'test': return `${stepTitle(step, 0)} for coat ${step.number}`
    case 'rest':
    case 'heat':
    case 'cure':
    case 'turn': return `${stepTitle(step, 0)}, coat ${step.number}`
    case 'clean': return `Clean out after coat ${step.number}`
    case 'fit':
    case 'lift': return `${stepTitle(step, 0)}, ${step.mask.name}`
    case 'prepare':
    case 'warm':
    case 'eyes':
    case 'look-over':
    case 'inspect': return stepTitle(step, 0)
  }
}

/** What a timer counts: "rest, coat 9". */
export function timerWords(step: WaitStep): string {
  const word = { rest: 'rest', heat: 'heat-set', turn: 'on the turner', cure: 'curing' }[step.kind]
  return `${word}, coat ${step.number}`
}

/** What to mind while mixing, as sentences (common practice). */
export const MIX_ADVICE: Readonly<Record<MixAdvice, string>> = {
  'strain': 'Strain it into the cup: a lump stops the needle.',
  'stir often': 'Stir again and again: the flakes sink.',
  'stir both parts': 'Weigh both parts, then stir until no streak is left, sides and floor of the cup too.',
  'shallow cup': 'Pour it out shallow: a deep cup heats itself and sets early.',
}

/** What to do at steps that need telling, one short sentence each; empty where the plate says it all. */
export function stepAdvice(step: RunStep): string[] {
  switch (step.kind) {
    case 'prepare': return [
      'Fan on and pointing out, filter fitted, gloves that suit what is in the bottles.',
      'Blanks clean and dry, lips taped, hook hangers plugged. Number them.',
      'Drain the compressor. Set the pressure while air is flowing.',
    ]
    case 'warm': return [
      'Room at 21 to 24 °C and below 75 % humidity; not under 15 °C. Bottles and blanks an hour in it.',
      'Shake or stir every bottle until nothing lies at its floor.',
    ]
    case 'set': return [
      'Read the pressure while air is flowing, not while it stands.',
      'Water through it first: an even cone, no spitting.',
    ]
    case 'test': return ['One pass at the same distance. Stop if it spits, runs or dries in the air.', 'Keep the card: it shows a new bottle beside the old one.']
    case 'mix': return step.advice.map(advice => MIX_ADVICE[advice])
    case 'fit': return step.mask.form.kind === 'mesh'
      ? ['The coat below must not mark under a gloved finger.', 'Stretch it evenly and pin it under the belly.']
      : ['The coat below must not mark under a gloved finger.', 'Set it to its marks, the same way round on both flanks.']
    case 'lift': return ['Straight off, not along. Clean it before the paint sets.']
    case 'clean': return ['Empty, rinse until it runs clear, blow dry. Catch the waste.']
    case 'eyes': return ['Dry fit first. One drop each, then leave them alone.']
    case 'look-over': return ['Under the lamp, all round: dust, fingerprints, missed spots, a mask that moved.', 'The paint must be dry through: what is damp splits the clear.']
    case 'cure': return ['Warm, dry and out of the way. Tack-free is not yet hard.']
    case 'turn': return ['On the wheel at once. No dust, no draught, no fingers.']
    case 'inspect': return ['Look for missed spots, runs, dust and fingerprints, then at the colour.']
    case 'heat': return [step.limit === null ? 'Stay below what the body bears: find out what it is made of.' : `This body bears ${step.limit} °C: stay below it, keep it moving.`]
    case 'lay':
    case 'rest': return []
  }
}

/** With what a coat is laid, where there is no airbrush to set: "brush". */
export function handToolWords(step: Extract<RunStep, { kind: 'lay' }>): string | null {
  return step.coat.tool.kind === 'airbrush' ? null : toolWords(step.coat.tool)
}

function throughWords(masks: readonly Mask[]): string {
  if (masks.length === 0) return ''
  const past = masks.every(mask => mask.form.kind !== 'mesh' && mask.form.does === 'shields')
  return `, ${past ? 'past' : 'through'} ${listWords(masks.map(mask => mask.name))}`
}

function mixLine(name: string, number: number, coats: number): string {
  return coats === 1 ? `${name}, coat ${number}` : `${name}, coats ${number} to ${number + coats - 1} from one cup`
}

/** A length of time in little room: "6 min", "8 h", "40 s". */
function shortDuration(step: WaitStep): string {
  return durationWords(waitSeconds(step)).replace(/ minutes?/, ' min').replace(/ hours?/, ' h').replace(/ seconds?/, ' s')
}
