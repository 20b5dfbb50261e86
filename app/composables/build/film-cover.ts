import { BACK_EDGE, BELLY_EDGE } from '#shared/blank/zones'
import { aimOf, caught } from '#shared/picture/deposit/gun-aim'
import type { Coat, Where, ZoneName } from '#shared/scheme/coat'
import type { LaidCoat } from '#shared/scheme/laid-coats'
import type { Mark, Place } from '#shared/scheme/mark'
import type { Mask } from '#shared/scheme/mask'

/** What a cut needs to know of its blank, mm. */
export interface CutBlank { length: number, /** Round the body from back to belly. */ halfGirth: number }

/** The cut runs aslant, from A on the belly toward the tail to A′ on the back toward the head, so that it meets several bars. */
const U_AT_BACK = 0.36
const U_AT_BELLY = 0.68

/** Share of the length at which the cut passes a share of the half girth. */
export const cutAt = (v: number) => U_AT_BACK + (U_AT_BELLY - U_AT_BACK) * v

const GIRTH: readonly (readonly [ZoneName, from: number, to: number])[] = [
  ['back', -1, BACK_EDGE], ['upper flank', BACK_EDGE, 0.5], ['lower flank', 0.5, BELLY_EDGE], ['belly', BELLY_EDGE, 2],
]
const LENGTH: readonly ZoneName[] = ['head', 'gill cover', 'trunk', 'tail']
const smooth = (x: number) => x <= 0 ? 0 : x >= 1 ? 1 : x * x * (3 - 2 * x)

/** Distance inside the chosen girth zones, mm; negative outside, endless when no zone limits. */
function insideGirth({ zones }: Where, v: number, { halfGirth }: CutBlank): number {
  const chosen = GIRTH.filter(([zone]) => zones.includes(zone))
  if (chosen.length === 0) return Infinity
  const whole = chosen.reduce<[number, number][]>((runs, [, from, to]) => {
    const last = runs.at(-1)
    if (last?.[1] === from) last[1] = to
    else runs.push([from, to])
    return runs
  }, [])
  return Math.max(...whole.map(([from, to]) => Math.min(v - from, to - v))) * halfGirth
}

function zoneShare(where: Where, v: number, blank: CutBlank): number {
  if (!where.body) return 0
  const lengths = LENGTH.filter(zone => where.zones.includes(zone))
  if (lengths.length > 0 && !lengths.includes('trunk')) return 0
  const u = cutAt(v)
  const { along } = where
  if (along) {
    const rise = smooth(0.5 + (u - along.from) * blank.length / Math.max(0.5, along.fadeFrom))
    const fall = smooth(0.5 + (along.to - u) * blank.length / Math.max(0.5, along.fadeTo))
    if (rise * fall === 0) return 0
  }
  const inside = insideGirth(where, v, blank) + where.reach
  const fade = where.edge === 'hard' ? 0.3 : where.fade ?? blank.length / 20
  return smooth(0.5 + inside / Math.max(0.3, fade))
}

function gunShare({ gun }: Coat, v: number, { halfGirth }: CutBlank): number {
  const radius = halfGirth / Math.PI
  const aim = aimOf(gun, radius)
  if (!aim) return 1
  const turn = v * Math.PI
  return caught(aim, Math.cos(turn), Math.sin(turn), radius * Math.cos(turn), radius * Math.sin(turn))
}

function isWithin(outline: readonly Place[], u: number, v: number): boolean {
  let inside = false
  for (let i = 0, j = outline.length - 1; i < outline.length; j = i++) {
    const [a, b] = [outline[i], outline[j]]
    if (!a || !b) continue
    if ((a[1] > v) !== (b[1] > v) && u < (b[0] - a[0]) * (v - a[1]) / (b[1] - a[1]) + a[0]) inside = !inside
  }
  return inside
}

/** What a mask lets through where the cut passes it: a thread keeps paint off, a bar lets it in. */
function maskShare({ form }: Mask, v: number, { halfGirth }: CutBlank): number {
  if (form.kind === 'mesh') {
    const along = v * halfGirth / form.pitch
    return along - Math.floor(along) < Math.min(0.45, Math.max(0.18, form.thread / form.pitch)) ? 0 : 1
  }
  const isIn = form.outlines.some(outline => isWithin(outline, cutAt(v), v))
  return isIn === (form.does === 'opens') ? 1 : 0
}

function markShare(mark: Mark, v: number, { halfGirth, length }: CutBlank): number {
  const u = cutAt(v)
  const near = (place: Place, radius: number) => Math.hypot((u - place[0]) * length, (v - place[1]) * halfGirth) <= radius
  switch (mark.kind) {
    case 'strokes': return mark.strokes.some(({ points, width }) => points.some(point => near(point, Math.max(...width) / 2 + 0.4))) ? 1 : 0
    case 'outline': return isWithin(mark.points, u, v) ? Math.min(1, mark.amount) : 0
    case 'dots': return mark.dots.some(([x, y, radius]) => near([x, y], radius + mark.grow)) ? 1 : 0
    case 'scatter': return v > mark.v[0] && v < mark.v[1] && Math.sin(v * 61) > 0.4 ? 1 : 0
    case 'fan': return 0
    case 'worm tracks': return Math.sin(v * halfGirth * 2 * Math.PI / mark.wavelength) > 0.3 ? 1 : 0
    case 'torn sponge': return Math.sin(v * halfGirth * 2 * Math.PI / (2 * mark.size)) + 0.5 * Math.sin(v * 23) > mark.threshold ? 1 : 0
  }
}

/** Share of its full film that a coat leaves where the cut passes v (0 back … 1 belly). An estimate for a drawing, not for a dose. */
export function coverAt({ coat, masks }: Pick<LaidCoat, 'coat' | 'masks'>, v: number, blank: CutBlank): number {
  const laid = coat.marks.length > 0
    ? Math.max(...coat.marks.map(mark => markShare(mark, v, blank)))
    : zoneShare(coat.where, v, blank) * gunShare(coat, v, blank)
  return laid === 0 ? 0 : masks.reduce((share, mask) => share * maskShare(mask, v, blank), laid)
}
