import type { PaintKind } from '#shared/shelf/paint'
import type { Coat } from '../coat'
import type { Materials } from '../materials'
import { coatWord } from '../publishable'
import type { SchemeBody } from '../body'
import type { Finding, GroundUnder } from './finding'

/** A candy and a fluorescent live of light that comes back from below; an interference of a ground that sends none back. L*; our figures, common practice. */
const DARK_FOR_CANDY = 45, DARK_FOR_FLUORESCENT = 75, PALE_FOR_INTERFERENCE = 60
/** A coat of pearl that changes no more than this is work for nothing, CIEDE2000. */
const UNSEEN = 1.5

/** Warns of coats that depend on their ground and do not get the one that carries them. */
export function groundFindings(body: SchemeBody, materials: Materials, coats: readonly Coat[], grounds: readonly GroundUnder[]): Finding[] {
  return coats.flatMap((coat) => {
    const under = grounds.find(each => each.coatId === coat.id)
    const kinds = kindsIn(coat, materials)
    if (!under) return []
    const lightness = Math.round(under.below[0])
    const finding = (look: Finding['look'], says: string, why: string): Finding =>
      ({ look, coatId: coat.id, key: `${look} ${coat.id} ${lightness}`, says: `${coatWord(body, coat)} ${says}`, why })
    const darker = (limit: number) => under.below[0] < limit
    return [
      ...kinds.has('candy') && darker(DARK_FOR_CANDY)
        ? [finding('candy-over-dark', `is a candy over a dark ground (lightness ${lightness}).`, 'A candy only takes light away: over a dark ground hardly any comes back to be coloured. Silver, gold or white carries it.')]
        : [],
      ...kinds.has('fluorescent') && darker(DARK_FOR_FLUORESCENT)
        ? [finding('fluorescent-over-dark', `is fluorescent over a ground of lightness ${lightness}.`, 'A fluorescent glows by the light that goes through it twice: over white it is several times as bright.')]
        : [],
      ...kinds.has('interference') && under.below[0] > PALE_FOR_INTERFERENCE
        ? [finding('interference-over-pale', `is an interference pearl over a pale ground (lightness ${lightness}).`, 'Over a pale ground the light its flakes let through comes back and hides their colour, or shows its opposite. A dark ground carries it.')]
        : [],
      ...kinds.has('pearl') && under.change < UNSEEN
        ? [finding('pearl-unseen', `changes the colour by ${under.change.toFixed(1)} at most.`, 'This pearl is hardly told from the ground it lies on. A darker ground, or another colour under it, lets it be seen.')]
        : [],
    ]
  })
}

function kindsIn(coat: Coat, { paints }: Materials): Set<PaintKind> {
  return new Set(coat.mix.parts.flatMap(part => paints.find(paint => paint.id === part.paintId)?.kind ?? []))
}
