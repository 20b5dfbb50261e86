import type { Coat, Tool } from '#shared/scheme/coat'
import type { Mask } from '#shared/scheme/mask'
import type { Caution } from '#shared/shelf/hazards'

interface StepBase {
  /** Lasting name of the step within the run. */
  id: string
  /** First and last piece it is for, where the coat is laid in more than one mix; null for all of the run. */
  only: readonly [first: number, last: number] | null
  /** The caution to show with it, if any. */
  caution: Caution | null
}

interface CoatStep extends StepBase { coat: Coat, number: number, coatName: string, isClear: boolean }

/** One thing to do at the bench, in the order of the stack. */
export type RunStep
  /** What protects whom, before anything is opened. */
  = | StepBase & { kind: 'prepare' }
    /** Paint, blanks and room come to one warmth. */
    | StepBase & { kind: 'warm' }
    /** Fill the cup: for this coat and those after it that are laid from the same cup. */
    | CoatStep & { kind: 'mix', coats: readonly Coat[], advice: readonly MixAdvice[], potLifeMinutes: number | null }
    /** Needle and nozzle, pressure while air is flowing, distance. */
    | CoatStep & { kind: 'set', tool: Extract<Tool, { kind: 'airbrush' }> }
    | StepBase & { kind: 'fit', mask: Mask }
    /** One pass on a card before one on a piece. */
    | CoatStep & { kind: 'test' }
    /** Spray, brush or dip one coat, piece by piece. */
    | CoatStep & { kind: 'lay', through: readonly Mask[] }
    /** Wait; minutes from the coat. */
    | CoatStep & { kind: 'rest', minutes: number }
    /** Warm it; `limit` is what the body bears, °C, null where nobody said what it is made of. */
    | CoatStep & { kind: 'heat', seconds: number, distance: number, limit: number | null }
    | StepBase & { kind: 'lift', mask: Mask }
    /** Empty and rinse; `next` is the coat the airbrush is wanted for, null when it is done for this run. */
    | CoatStep & { kind: 'clean', next: string | null }
    | StepBase & { kind: 'eyes' }
    /** What is under the clear stays under it: dust, prints and missed spots go now. */
    | StepBase & { kind: 'look-over' }
    /** On the turner until it no longer runs. */
    | CoatStep & { kind: 'turn', minutes: number }
    /** Hard all the way, before it is handled and fitted out; minutes. */
    | CoatStep & { kind: 'cure', minutes: number }
    | StepBase & { kind: 'inspect' }

export type RunStepKind = RunStep['kind']
/** A step that takes time by itself. */
export type WaitStep = Extract<RunStep, { kind: 'rest' | 'heat' | 'turn' | 'cure' }>
/** A step that fills the cup. */
export type MixStep = Extract<RunStep, { kind: 'mix' }>
/** A step that lays a coat. */
export type LayStep = Extract<RunStep, { kind: 'lay' }>

/** What to mind while mixing: flakes sink, lumps stop a needle, two parts must be stirred whole, a small cup stays cool. */
export type MixAdvice = 'strain' | 'stir often' | 'stir both parts' | 'shallow cup'

/** How long a waiting step takes, seconds. */
export function waitSeconds(step: WaitStep): number {
  return step.kind === 'heat' ? step.seconds : step.minutes * 60
}

/** Whether a step takes time by itself. */
export function isWait(step: RunStep): step is WaitStep {
  return step.kind === 'rest' || step.kind === 'heat' || step.kind === 'turn' || step.kind === 'cure'
}

/** Whether a step is for a piece at all. */
export function isFor(step: RunStep, piece: number): boolean {
  return step.only === null || (piece >= step.only[0] && piece <= step.only[1])
}
