import { type Lab, lchFromLab } from './colorimetry'

/** Distance up to which each word holds, CIEDE2000; past the last it is another colour. */
const DISTANCES: readonly (readonly [upTo: number, words: DistanceWords])[] = [
  [0.5, 'the same'],
  [1, 'barely seen'],
  [2, 'seen side by side'],
  [3.5, 'look together'],
  [8, 'plainly different'],
]

/** How far two colours are apart, as a painter would say it. */
export type DistanceWords = 'the same' | 'barely seen' | 'seen side by side' | 'look together' | 'plainly different' | 'another colour'

/** Words for a distance in CIEDE2000. The marks follow usual shop tolerances for solid colours (common practice, no standard): up to 2 accepted, up to 3.5 looks right together. */
export function distanceWords(deltaE: number): DistanceWords {
  return DISTANCES.find(([upTo]) => deltaE <= upTo)?.[1] ?? 'another colour'
}

type HueWords = readonly [from: number, pale: string, bright: string, middle: string, dark: string]

/** Hue words by the angle they begin at, degrees of Lab hue. */
const HUES: readonly HueWords[] = [
  [0, 'pink', 'hot pink', 'rose', 'wine'],
  [16, 'salmon', 'coral', 'red', 'maroon'],
  [44, 'peach', 'orange', 'orange', 'brown'],
  [62, 'tan', 'orange', 'ochre', 'brown'],
  [77, 'buff', 'golden yellow', 'ochre', 'umber'],
  [88, 'cream', 'yellow', 'mustard', 'olive'],
  [102, 'cream', 'chartreuse', 'olive', 'olive'],
  [116, 'lime', 'lime', 'leaf green', 'moss'],
  [132, 'apple green', 'green', 'green', 'forest green'],
  [165, 'mint', 'mint', 'sea green', 'pine'],
  [190, 'aqua', 'turquoise', 'teal', 'teal'],
  [222, 'sky', 'sky', 'sky', 'petrol'],
  [252, 'sky blue', 'sky blue', 'blue', 'navy'],
  [286, 'periwinkle', 'periwinkle', 'ultramarine', 'navy'],
  [310, 'lavender', 'violet', 'violet', 'violet'],
  [326, 'lilac', 'orchid', 'purple', 'plum'],
  [344, 'pink', 'hot pink', 'magenta', 'wine'],
]

const GREY_CHROMA = 4, TINTED_CHROMA = 10, BRIGHT_CHROMA = 45
const LIGHT = 72, DARK = 38

/** A colour in two or three words, such as "deep olive"; for captions and screen readers, never for matching. */
export function colourWords(lab: Lab): string {
  const [L, C, h] = lchFromLab(lab)
  if (C < GREY_CHROMA) return greyWord(L)
  const [, pale, bright, middle, dark] = HUES.findLast(([from]) => h >= from)!
  const name = L <= DARK ? dark : L <= LIGHT ? middle : C < BRIGHT_CHROMA ? pale : bright
  if (C < TINTED_CHROMA) return `${greyWord(L)}, leaning ${name}`
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
  if (L <= DARK) return 'deep'
  if (L <= LIGHT && C < 24) return 'soft'
  return C > 70 ? 'bright' : ''
}
