import { type Lab, labFromLch, lchFromLab, type Rgb, xyzFromLab } from '#shared/optics/colorimetry'
import { colourWords } from '#shared/optics/colour-words'
import { hexFromSrgb, screenFromXyz } from '#shared/optics/screen-colour'

/** One chip of a card: a colour a screen can show, with its words. */
export interface Chip { lab: Lab, hex: string, words: string }

/** Hues of the card's columns, degrees: from red round to rose. Brown, olive and ochre are their darker chips. */
const HUES = [28, 48, 66, 84, 104, 132, 168, 212, 262, 296, 338]
/** Lightness of its rows, palest first. */
const ROWS = [88, 76, 64, 52, 40, 27]
/** Of what the screen can show at a lightness and hue, so much is painted: clean, not glaring. */
const CLEAN = 0.82
const CHROMA_MOST = 130

/** A chip card, row by row, palest first; the last column is grey. */
export function chipCard(): Chip[][] {
  return ROWS.map((L, row) => [...HUES.map(h => chip(labFromLch([L, CLEAN * mostChroma(L, h), h]))), chip([[97, 80, 62, 45, 28, 10][row]!, 0, 0])])
}

function chip(lab: Lab): Chip {
  return { lab: lab.map(value => Math.round(value)) as Lab, ...chipColour(lab) } // three of three
}

/** How a screen shows a colour, and what it is called. */
export function chipColour(lab: Lab): { hex: string, words: string } {
  const shown: Rgb = screenFromXyz(xyzFromLab(lab)).srgb
  return { hex: hexFromSrgb(shown), words: colourWords(lab) }
}

/** The most chroma a screen can show at a lightness and hue. */
function mostChroma(L: number, h: number): number {
  let low = 0, high = CHROMA_MOST
  for (let i = 0; i < 12; i++) {
    const middle = (low + high) / 2
    if (screenFromXyz(xyzFromLab(labFromLch([L, middle, h]))).outOfGamut) high = middle
    else low = middle
  }
  return low
}

/** Turns a colour by steps of lightness, chroma and hue, as one asks for "a little lighter, a little cleaner". */
export function turnedColour(lab: Lab, [dL, dC, dh]: readonly [number, number, number]): Lab {
  const [L, C, h] = lchFromLab(lab)
  return labFromLch([Math.min(100, Math.max(0, L + dL)), Math.max(0, C + dC), (h + dh + 360) % 360])
}

/** Hues of red, yellow, green and blue paint, degrees: between two of them a hue turns from the one to the other. Our judgement. */
const CORNERS: readonly (readonly [from: number, back: string, on: string])[] = [
  [20, 'redder', 'yellower'], [90, 'yellower', 'greener'], [165, 'greener', 'bluer'], [265, 'bluer', 'redder'],
]

/** What turning a colour's hue back and on makes of it, in a painter's words: "redder" and "yellower" for an orange. */
export function turnWords(lab: Lab): { back: string, on: string } {
  const h = lchFromLab(lab)[2]
  const [, back, on] = CORNERS.findLast(([from]) => h >= from) ?? CORNERS.at(-1)!
  return { back, on }
}
