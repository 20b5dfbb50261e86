import { ZodError } from 'zod'
import { type BlankDimensions, blankFromDimensions } from '#shared/blank/blank-from-dimensions'
import { bodyMeasures } from '#shared/blank/body-measures'
import type { BlankShape } from '#shared/blank/blank-shape'
import { BUILT_IN_BLANKS, builtInBlank } from '#shared/blank/built-in-blanks'
import { profileOf } from '#shared/blank/profile'

/** A blank as a maker says it; its short lasting name is made from its label. */
export type OwnBlank = Omit<BlankDimensions, 'name'>

/** A form one may start from, and what it brings along. */
export interface FormOption { value: string, label: string, has: { lip: boolean, fins: boolean, joints: boolean } }

/** The built-in forms to choose from. */
export function formOptions(): FormOption[] {
  return BUILT_IN_BLANKS.map(shape => ({
    value: shape.name,
    label: shape.label.replace(/ \d+$/, ''),
    has: { lip: shape.lip !== undefined, fins: shape.fins.length > 0, joints: shape.joints.length > 0 },
  }))
}

/** Length, height and width of a form, mm, to half a millimetre. */
export function sizeOfForm(form: string): Pick<OwnBlank, 'length' | 'height' | 'width'> {
  const { length, height, width } = bodyMeasures(profileOf(builtInBlank(form)))
  const half = (value: number) => Math.round(value * 2) / 2
  return { length, height: half(height), width: half(width) }
}

/** The shape of an own blank, or what is wrong with its figures. */
export function blankFromWish(wish: OwnBlank): { shape: BlankShape, trouble?: undefined } | { shape?: undefined, trouble: string } {
  try {
    return { shape: blankFromDimensions({ ...wish, name: lastingName(wish.label), label: wish.label.trim() || 'Blank' }) }
  }
  catch (error) {
    if (error instanceof ZodError) return { trouble: `These figures make no blank: ${error.issues[0]?.message ?? 'they are out of range'}.` }
    throw error
  }
}

/** Lower-case letters, digits and dashes of a label; "blank" where nothing is left. */
export function lastingName(label: string): string {
  const plain = label.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase().replace(/[^a-z0-9]+/g, '-').replace(/^-+|-+$/g, '').slice(0, 60)
  return plain || 'blank'
}
