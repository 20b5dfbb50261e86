import type { SchemeBody } from './body'
import type { PaintKnown } from '#shared/shelf/paint'
import type { PaintSnapshot } from './materials'
import { newCoat } from './new-coat'

/** Lightness from which a paint counts as a white base, L*. Our choice. */
const WHITE_FROM = 85
/** Distance from the grey axis up to which a paint counts as white, C*. Our choice. */
const WHITE_CHROMA = 8

/** How light a paint is when it hides, L*, if it is near enough to white; null otherwise. */
function whiteness(known: PaintKnown): number | null {
  const lab = known.how === 'masstone-hide' ? known.masstone : known.how === 'two-swatches' ? known.overBlack : null
  if (!lab) return null
  const [L, a, b] = lab
  return L >= WHITE_FROM && Math.hypot(a, b) <= WHITE_CHROMA ? L : null
}

/** The paint to start a scheme with: the whitest opaque or primer on the shelf, since brightness comes from below; null when there is none. */
export function whiteBase<P extends Pick<PaintSnapshot, 'kind'> & { known: PaintKnown }>(paints: readonly P[]): P | null {
  const white = paints.flatMap((paint) => {
    const L = paint.kind === 'opaque' || paint.kind === 'primer' ? whiteness(paint.known) : null
    return L === null ? [] : [{ paint, L }]
  })
  return white.reduce<{ paint: P, L: number } | null>((best, each) => best && best.L >= each.L ? best : each, null)?.paint ?? null
}

/** A finish to start from: a sealed, pale body, dark eyes, and a white base coat when there is a white on the shelf. */
export function newSchemeBody(
  blankId: string, base?: { coatId: string, paint: Pick<PaintSnapshot, 'id' | 'name' | 'kind' | 'reducerPer100'>, rest: number },
): SchemeBody {
  return {
    format: 1,
    blankId,
    ground: { name: 'Sealed wood', colour: [78, 5, 20], finish: 'satin' },
    stack: base ? [{ act: 'coat', coat: { ...newCoat(base.coatId, base.paint, base.rest), name: 'White base' } }] : [],
    masks: [],
    eyes: { iris: [78, 4, 60], pupil: [8, 0, 0], rim: [25, 2, 6] },
  }
}
