import type { z } from 'zod'
import { Ground } from './body'
import { Coat } from './coat'
import { countWords } from './coat-words'
import { Mask } from './mask'

const COAT_LABELS: Readonly<Record<keyof Coat, string>> = {
  id: 'Coat', name: 'Name', mix: 'Mix', tool: 'Tool', gun: 'Aim', where: 'Where', marks: 'Marks', passes: 'Passes', rest: 'Rest', heatSet: 'Heat-set', note: 'Note', laidFrom: 'Build-up',
}
const MASK_LABELS: Readonly<Record<keyof Mask, string>> = { id: 'Mask', name: 'Name', form: 'Form', seed: 'Fitting', fromMaskId: 'Origin' }
const GROUND_LABELS: Readonly<Record<keyof Ground, string>> = { name: 'Name of the ground', colour: 'Colour of the ground', finish: 'Finish of the ground' }

type Issue = z.core.$ZodIssue

function counted(issue: Extract<Issue, { code: 'too_big' | 'too_small' }>, limit: number | bigint): string {
  switch (issue.origin) {
    case 'string': return countWords(Number(limit), 'character')
    case 'array': return `${limit} of them`
    default: return String(limit)
  }
}

function limitWords(issue: Issue): string {
  switch (issue.code) {
    case 'too_big': return `at most ${counted(issue, issue.maximum)}`
    case 'too_small': return `at least ${counted(issue, issue.minimum)}`
    default: return 'not something that can be used here'
  }
}

/** The first field of a change that its form does not allow, as a sentence; null when all can be. Fields that are not in the change are not asked about. */
function faultOf<T extends object>(
  form: z.ZodObject, labels: Readonly<Record<keyof T & string, string>>, change: Partial<T>,
): string | null {
  for (const field of Object.keys(change) as (keyof T & string)[]) {
    const parsed = (form.shape[field] as z.ZodType | undefined)?.safeParse(change[field])
    const issue = parsed?.error?.issues[0]
    if (issue) return `${labels[field]}: ${limitWords(issue)}.`
  }
  return null
}

/** Why fields of a coat cannot be set so, as a sentence: "Passes: at most 30."; null when they can. */
export function coatFault(change: Partial<Coat>): string | null {
  return faultOf<Coat>(Coat, COAT_LABELS, change)
}

/** Why fields of a mask cannot be set so, as a sentence; null when they can. */
export function maskFault(change: Partial<Mask>): string | null {
  return faultOf<Mask>(Mask, MASK_LABELS, change)
}

/** Why a ground cannot be so, as a sentence; null when it can. */
export function groundFault(ground: Ground): string | null {
  return faultOf<Ground>(Ground, GROUND_LABELS, ground)
}
