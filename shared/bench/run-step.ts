import type { Caution } from '#shared/shelf/hazards'
import type { Coat } from '#shared/scheme/coat'
import type { CoatAmount } from '#shared/scheme/amounts'
import type { Mask } from '#shared/scheme/mask'

interface StepBase {
  /** Lasting name of the step within the run. */
  id: string
  /** The caution to show with it, if any. */
  caution: Caution | null
}

interface CoatStep extends StepBase { coat: Coat, number: number, coatName: string }

/** One thing to do at the bench, in the order of the stack. */
export type RunStep
  /** What protects whom, before anything is opened. */
  = | StepBase & { kind: 'prepare' }
    /** Fill the cup. */
    | CoatStep & { kind: 'mix', amount: CoatAmount }
    | StepBase & { kind: 'fit', mask: Mask }
    /** Spray, brush or dip one coat, piece by piece. */
    | CoatStep & { kind: 'lay', through: string[] }
    /** Wait; minutes from the coat. */
    | CoatStep & { kind: 'rest', minutes: number }
    | CoatStep & { kind: 'heat', seconds: number, distance: number }
    | StepBase & { kind: 'lift', mask: Mask }
    /** Empty and rinse before the next colour. */
    | CoatStep & { kind: 'clean', next: string }
    | StepBase & { kind: 'eyes' }
    /** On the turner until it no longer runs. */
    | CoatStep & { kind: 'turn', minutes: number }
    | StepBase & { kind: 'inspect' }

export type RunStepKind = RunStep['kind']
