import type { Coat } from '#shared/scheme/coat'
import type { Materials } from '#shared/scheme/materials'

/** How a stratum is hatched, by what its paint does to light. */
export type FilmTexture = 'plain' | 'dashes' | 'upright' | 'flakes' | 'clear'

/** The texture of a coat: by its flakes if it has any, else by the paint there is most of. */
export function filmTexture(coat: Coat, materials: Materials): FilmTexture {
  const main = [...coat.mix.parts].sort((x, y) => y.drops - x.drops)[0]
  const kinds = coat.mix.parts.map(part => materials.paints.find(paint => paint.id === part.paintId)?.kind)
  if (kinds.some(kind => kind === 'pearl' || kind === 'interference' || kind === 'metallic')) return 'flakes'
  switch (materials.paints.find(paint => paint.id === main?.paintId)?.kind) {
    case 'clear': return 'clear'
    case 'transparent':
    case 'candy': return 'upright'
    case 'semi-opaque':
    case 'fluorescent': return 'dashes'
    default: return 'plain'
  }
}
