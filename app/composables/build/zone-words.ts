import { countWords } from '#shared/scheme/coat-words'
import { lchFromLab } from '#shared/optics/colorimetry'
import type { ZoneColour } from '#shared/picture/zone-colours'

/** Lightness, chroma and hue as whole numbers. */
export function lchFigures(lab: ZoneColour['promised']['lab']): readonly [number, number, number] {
  const [L, C, h] = lchFromLab(lab)
  return [Math.round(L), Math.round(C), Math.round(h) % 360]
}

/** How far the sprayed colour may lie from the promise, by the least that is known of a paint that lies there. */
export function spreadWords(trust: readonly (1 | 2 | 3)[]): string {
  return trust.every(level => level === 3)
    ? 'Typically within 2 of the sprayed colour, mostly within 6.'
    : 'A paint here is known by less than two good swatches, so spray it out before promising it.'
}

/** A zone's colour in one sentence: "is deep olive after 13 coats: lightness 38, chroma 31, hue 91°." */
export function zoneSentence(zone: ZoneColour, coatsBelow: number, isClear: boolean): string {
  const [L, C, h] = lchFigures(zone.promised.lab)
  const laid = coatsBelow === 0 ? 'bare' : `after ${countWords(coatsBelow, 'coat')}`
  const screen = zone.promised.outOfGamut ? ' An ordinary screen cannot show it fully.' : ''
  return `is ${zone.promised.words} ${laid}${isClear ? '' : ', before clear'}: lightness ${L}, chroma ${C}, hue ${h}°.${screen}`
}
