import { type Lab, lchFromLab } from './colorimetry'

/** Distance up to which each word holds, CIEDE2000; past the last it is another colour. */
const DISTANCES: readonly (readonly [upTo: number, words: DistanceWords])[] = [
  [0.5, 'the same'],
  [1, 'barely seen'],
  [3.5, 'seen side by side'],
  [8, 'look together'],
  [20, 'plainly different'],
]

/** How far two colours are apart, as a painter would say it. */
export type DistanceWords = 'the same' | 'barely seen' | 'seen side by side' | 'look together' | 'plainly different' | 'another colour'

/** Words for a distance in CIEDE2000. The marks are common practice, not a standard. */
export function distanceWords(deltaE: number): DistanceWords {
  return DISTANCES.find(([upTo]) => deltaE <= upTo)?.[1] ?? 'another colour'
}

/** Hue words by the angle they begin at, degrees of Lab hue, for colours of middling lightness. */
const HUES: readonly (readonly [from: number, light: string, middle: string, dark: string])[] = [
  [0, 'pink', 'rose', 'wine'],
  [20, 'salmon', 'red', 'maroon'],
  [46, 'peach', 'orange', 'brown'],
  [68, 'buff', 'amber', 'brown'],
  [80, 'cream yellow', 'gold', 'umber'],
  [92, 'yellow', 'mustard', 'olive'],
  [104, 'chartreuse', 'olive', 'olive'],
  [118, 'lime', 'leaf green', 'moss'],
  [138, 'light green', 'green', 'forest green'],
  [168, 'mint', 'sea green', 'pine'],
  [195, 'aqua', 'teal', 'deep sea'],
  [225, 'sky', 'cyan blue', 'petrol'],
  [255, 'sky blue', 'blue', 'navy'],
  [290, 'periwinkle', 'ultramarine', 'midnight blue'],
  [306, 'lavender', 'violet', 'violet'],
  [325, 'orchid', 'purple', 'plum'],
  [345, 'pink', 'magenta', 'wine'],
]

const GREY_CHROMA = 4

/** A colour in two or three words, such as "deep olive"; for captions and screen readers, never for matching. */
export function colourWords(lab: Lab): string {
  const [L, C, h] = lchFromLab(lab)
  if (C < GREY_CHROMA) return greyWord(L)
  const hue = HUES.findLast(([from]) => h >= from)!
  const name = L > 72 ? hue[1] : L > 38 ? hue[2] : hue[3]
  if (C < 12) return `${greyWord(L)}, leaning ${name}`
  return [toneWord(L, C), name].filter(Boolean).join(' ')
}

function greyWord(L: number): string {
  if (L < 12) return 'black'
  if (L < 32) return 'charcoal'
  if (L < 58) return 'mid grey'
  if (L < 82) return 'light grey'
  return L < 93 ? 'off white' : 'white'
}

function toneWord(L: number, C: number): string {
  if (L < 22) return 'very deep'
  if (L < 38) return 'deep'
  if (C < 24) return L > 72 ? 'pale' : 'soft'
  return C > 70 ? 'bright' : ''
}
