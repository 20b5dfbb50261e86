import type { PaintForm, Wrong } from './paint-form'
import { readNumber } from '#shared/quantities/read-measure'
import { TwoPart } from '#shared/shelf/paint'

type TwoPartFields = Pick<PaintForm, 'isTwoPart' | 'ratioBy' | 'resin' | 'hardener' | 'resinDensity' | 'hardenerDensity'>

/** The fields of a paint that is mixed with a hardener, filled from what is known of it. */
export function twoPartFields(known: TwoPart | undefined): Partial<TwoPartFields> {
  if (!known) return {}
  return {
    isTwoPart: true, ratioBy: known.by, resin: known.resin, hardener: known.hardener,
    resinDensity: written(known.resinDensity), hardenerDensity: written(known.hardenerDensity),
  }
}

const written = (density: number | undefined) => density === undefined ? '' : String(density)

/** What those fields say; nothing for a paint that comes ready to lay. */
export function twoPartOfForm(form: TwoPartFields): { value?: TwoPart, wrong: Wrong } {
  if (!form.isTwoPart) return { wrong: {} }
  const wrong: Wrong = {}
  const density = (field: 'resinDensity' | 'hardenerDensity') => {
    if (form[field].trim() === '') return undefined
    const read = TwoPart.shape.resinDensity.safeParse(readNumber(form[field]))
    if (!read.success) wrong[field] = 'A density is a figure from 0.5 to 3, such as 1.16.'
    return read.data
  }
  const { ratioBy: by, resin, hardener } = form
  const [resinDensity, hardenerDensity] = [density('resinDensity'), density('hardenerDensity')]
  return {
    value: { by, resin, hardener, ...resinDensity !== undefined && { resinDensity }, ...hardenerDensity !== undefined && { hardenerDensity } },
    wrong,
  }
}
