import { builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank, type PreparedBlank } from '#shared/blank/prepared-blank'
import { fillSurfaceRow, newSurfaceRow } from '#shared/blank/surface-table'
import { placeOnSurface, type Side } from '#shared/blank/surface-coordinates'
import { emptyViewSamples, type ViewSamples } from '#shared/blank/view-sample-lists'
import { fitView, viewSamples } from '#shared/blank/view-samples'
import { Coat } from '#shared/scheme/coat'
import { Mask, type MaskForm } from '#shared/scheme/mask'

export const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`

export const minnow = prepareBlank(builtInBlank('minnow-90'))
export const shad = prepareBlank(builtInBlank('shad-80'))

/** Samples at given places of the skin, as a view with fine pixels would hold them. */
export function samplesAt(blank: PreparedBlank, places: readonly (readonly [u: number, v: number, side?: Side])[], scale = 40): ViewSamples {
  const samples = emptyViewSamples({ ...fitView(blank, { width: 100, height: 50 }), scale }, places.length)
  places.forEach(([u, v, side = 1], i) => {
    const place = placeOnSurface(blank, u, v, side)
    samples.pixel[i] = i
    samples.coverage[i] = 1
    samples.bodyNormal.set(place.normal, 3 * i)
    samples.section.set([place.position[1] - centreAt(blank, place.t), place.position[2]], 2 * i)
    samples.U[i] = place.U
    samples.V[i] = place.V
    samples.u[i] = place.u
    samples.v[i] = place.v
    samples.side[i] = side
  })
  return samples
}

function centreAt(blank: PreparedBlank, t: number): number {
  const section = { t: 0, x: 0, c: 0, h: 0, w: 0, n: 2, g: 0, xt: 0, ct: 0, ht: 0, wt: 0, nt: 0, gt: 0 }
  blank.profile.section(t, section)
  return section.c
}

/** Half the girth at a share u, mm. */
export function girthAt(blank: PreparedBlank, t: number): number {
  const row = newSurfaceRow()
  fillSurfaceRow(blank.table, t, row)
  return (row.V[0] ?? 0) - (row.V[row.V.length - 1] ?? 0)
}

/** What a view of a blank shows. */
export function seen(blank: PreparedBlank, width: number, roll = 0): ViewSamples {
  return viewSamples(blank, fitView(blank, { width, height: width / 2, roll }))
}

/** A coat with what a test cares about. */
export function coatOf(parts: Partial<Omit<Coat, 'where'>> & { where?: Partial<Coat['where']> } = {}): Coat {
  return Coat.parse({
    id: id(1), mix: { parts: [] }, tool: { kind: 'airbrush', nozzle: 0.3, pressure: 1.5, distance: 8 },
    gun: { aim: 'all over' }, passes: 1, ...parts, where: { ...parts.where },
  })
}

/** A mask of a form. */
export const maskOf = (form: Partial<MaskForm> & Pick<MaskForm, 'kind'>, seed = 5): Mask => Mask.parse({ id: id(90), name: 'mask', form, seed })

export const mean = (values: ArrayLike<number>) => Array.from(values).reduce((sum, value) => sum + value, 0) / values.length
export const spread = (values: ArrayLike<number>) => {
  const middle = mean(values)
  return Math.sqrt(mean(Array.from(values).map(value => (value - middle) ** 2)))
}
