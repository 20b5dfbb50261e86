import { countWords } from '#shared/scheme/coat-words'
import { lchFromLab } from '#shared/optics/colorimetry'
import type { ZoneColour } from '#shared/picture/zone-colours'

/** Lightness, chroma and hue as whole numbers. */
export function lchFigures(lab: ZoneColour['promised']['lab']): readonly [number, number, number] {
  const [L, C, h] = lchFromLab(lab)
  return [Math.round(L), Math.round(C), Math.round(h) % 360]
}

/** A zone's colour in one sentence: "is deep olive after 13 coats: lightness 38, chroma 31, hue 91°." */
export function zoneSentence(zone: ZoneColour, coatsBelow: number, isClear: boolean): string {
  const [L, C, h] = lchFigures(zone.promised.lab)
  const laid = coatsBelow === 0 ? 'bare' : `after ${countWords(coatsBelow, 'coat')}`
  const screen = zone.promised.outOfGamut ? ' It cannot be shown on this screen.' : ''
  return `is ${zone.promised.words} ${laid}${isClear ? '' : ', before clear'}: lightness ${L}, chroma ${C}, hue ${h}°.${screen}`
}
