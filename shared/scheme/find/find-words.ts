import { type Lab, lchFromLab } from '#shared/optics/colorimetry'
import { distanceWords } from '#shared/optics/colour-words'
import type { FoundCoat } from '#shared/optics/find-coat'
import type { Light } from '#shared/optics/lights'
import { countWords, listWords } from '#shared/scheme/coat-words'

/** What each light is called on a bench. */
export const LIGHT_WORDS: Readonly<Record<Light, string>> = {
  'D65': 'daylight', 'A': 'a filament lamp', 'F11': 'a shop tube', 'LED-5000': 'a white bench lamp', 'LED-3000': 'a warm bench lamp',
}

/** Differences smaller than this are not worth a word, L* or chroma or along the hue. */
const NOTED = 1.2
/** Distance from which a proposal is no match, CIEDE2000: past it two colours are plainly different. */
export const FAR = 8

/** How a colour misses another: "lighter, duller and redder". Empty where nothing is worth a word. */
export function missWords(lab: Lab, wanted: Lab): string {
  const [L1, C1] = lchFromLab(lab), [L2, C2] = lchFromLab(wanted)
  const da = lab[1] - wanted[1], db = lab[2] - wanted[2]
  const alongHue = Math.sqrt(Math.max(0, da * da + db * db - (C1 - C2) ** 2))
  const words = [
    ...Math.abs(L1 - L2) > NOTED ? [L1 > L2 ? 'lighter' : 'darker'] : [],
    ...Math.abs(C1 - C2) > 2 * NOTED ? [C1 > C2 ? 'cleaner' : 'duller'] : [],
    ...alongHue > 2 * NOTED ? [Math.abs(da) > Math.abs(db) ? da > 0 ? 'redder' : 'greener' : db > 0 ? 'yellower' : 'bluer'] : [],
  ]
  return listWords(words)
}

/** Distance in words and what is off: "look together, a little lighter" or "another colour: darker and redder". */
export function nearWords({ lab, deltaE }: Pick<FoundCoat, 'lab' | 'deltaE'>, wanted: Lab): string {
  const miss = deltaE > 1 ? missWords(lab, wanted) : ''
  return miss === '' ? distanceWords(deltaE) : `${distanceWords(deltaE)}, ${deltaE < 3.5 ? 'a little ' : ''}${miss}`
}

/** What a hand's film does to it: "15 % thinner or thicker it stays within 2.4: look together." */
export function rangeWords({ thin, thick }: Pick<FoundCoat, 'thin' | 'thick'>): string {
  const farthest = Math.max(thin.deltaE, thick.deltaE)
  const worse = thin.deltaE >= thick.deltaE ? 'thinner' : 'thicker'
  return `A film 15 % thinner or thicker stays within ${farthest.toFixed(1)} of the wanted colour; ${worse} is farther off.`
}

/** What becomes of the match in another light. */
export function secondLightWords({ deltaE, second }: Pick<FoundCoat, 'deltaE' | 'second'>): string {
  const light = LIGHT_WORDS[second.light]
  const more = second.deltaE - deltaE
  if (second.deltaE <= 2) return `It holds under ${light}: ${second.deltaE.toFixed(1)}.`
  return more > 1.5 ? `Under ${light} it drifts: ${second.deltaE.toFixed(1)}, ${distanceWords(second.deltaE)}.` : `Under ${light} it is ${second.deltaE.toFixed(1)} off, much as in daylight.`
}

/** Why nothing comes near: what the nearest is, what it misses, and what could be done about it. */
export function farWords(nearest: Pick<FoundCoat, 'lab' | 'deltaE'>, wanted: Lab, ground: Lab): string {
  const miss = missWords(nearest.lab, wanted)
  const off = `The nearest is far: ${nearest.deltaE.toFixed(1)}, ${distanceWords(nearest.deltaE)}${miss === '' ? '' : `. It comes out ${miss}`}.`
  if (wanted[0] > ground[0] + NOTED && nearest.lab[0] < wanted[0] - NOTED) return `${off} The ground is darker than the wanted colour, and only an opaque paint lightens: lay a pale coat first, or look for the coat lower in the stack.`
  if (lchFromLab(nearest.lab)[1] < lchFromLab(wanted)[1] - 4) return `${off} No paint here is as clean over this ground: a paler ground brings a candy or a fluorescent out.`
  return `${off} No paint of the shelf, and no mix, goes that way over this ground.`
}

/** What is pressed to lay it: "Lay 2 passes". */
export function layWords(passes: number): string {
  return `Lay ${countWords(passes, 'pass', 'passes')}`
}
