import type { PaintKnown } from './paint'
import type { PaintTrust } from './paint-view'
import type { StoredOptics } from './stored-optics'

/**
 * How far a prediction with this paint can be trusted, and why.
 * The wording follows what each way of knowing was seen to give on measured pigments over several grounds (see docs/optics.md).
 */
export function paintTrust(known: PaintKnown, optics: Pick<StoredOptics, 'clipped' | 'fluorescent'>): PaintTrust {
  const trust = byHow(known, optics)
  if (!optics.clipped || trust.level === 1) return trust
  return { level: trust.level === 3 ? 2 : 1, words: `${trust.words} Its swatches contradict each other a little; spray them again, thinner.` }
}

function byHow(known: PaintKnown, { fluorescent }: Pick<StoredOptics, 'fluorescent'>): PaintTrust {
  switch (known.how) {
    case 'two-swatches':
      return { level: 3, words: 'Known over black and over white, which tells the most about a paint.' }
    case 'masstone-hide':
      return { level: 2, words: 'Known by its own colour and its passes to hide: good for opaque paint, a guess for a see-through one.' }
    case 'dye-over-white':
      return { level: 2, words: 'Known over white only: good for a true dye, too clean for one that clouds.' }
    case 'flake':
      return { level: 1, words: 'Worked out from its flake: hue is right, strength and sparkle are estimates until a face and a flop swatch are read.' }
    case 'fluorescent':
      return fluorescent && !fluorescent.Kf
        ? { level: 1, words: 'Known over white before its glow could be shown; save the paint again, and its glow is in the picture.' }
        : { level: 1, words: 'Known over white; its glow is worked out from an estimate of the light it gives off. Fluorescents fade: judge a fresh swatch.' }
    case 'clear':
      return { level: 3, words: 'Clear: it deepens what is under it.' }
  }
}
