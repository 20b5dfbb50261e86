import type { Light } from '#shared/optics/lights'
import type { SeenLamp } from '#shared/optics/seen-wish'
import { FRESH_WATERS, SEA_WATERS, type FreshWaterName, type SeaWater, type Water } from '#shared/optics/water'

/** Lights by their names at the bench; the standard's own name stands behind. */
export const LIGHT_WORDS: Readonly<Record<Light, { word: string, help: string }>> = {
  'D65': { word: 'Daylight', help: 'An overcast sky, 6500 K (CIE D65). Colours are promised in it.' },
  'A': { word: 'Filament lamp', help: 'A warm bulb, 2856 K (CIE A).' },
  'F11': { word: 'Shop tubes', help: 'Narrow-band fluorescent tubes, 4000 K (CIE F11).' },
  'LED-5000': { word: 'White bench LED', help: 'A cool white LED, 5000 K. Our approximation: a blue peak and a phosphor.' },
  'LED-3000': { word: 'Warm LED', help: 'A warm white LED, 3000 K. Our approximation.' },
}

const SEA_WORDS: Readonly<Record<SeaWater, string>> = {
  'I': 'Open sea, clearest', 'IA': 'Open sea, very clear', 'IB': 'Open sea, clear', 'II': 'Open sea', 'III': 'Open sea, least clear',
  '1C': 'Coast, clear', '3C': 'Coast', '5C': 'Coast, greenish', '7C': 'Coast, cloudy', '9C': 'Coast, murky',
}
const FRESH_WORDS: Readonly<Record<FreshWaterName, string>> = {
  'clear': 'Clear lake', 'green': 'Green lake', 'tea-stained': 'Tea-stained', 'muddy': 'Muddy river',
}

/** Waters to choose from, fresh ones first. */
export const WATER_CHOICES: readonly { value: Water, label: string }[] = [
  ...FRESH_WATERS.map(value => ({ value, label: FRESH_WORDS[value] })),
  ...SEA_WATERS.map(value => ({ value, label: `${SEA_WORDS[value]} (${value})` })),
]

/** A water in words. */
export function waterWord(water: Water): string {
  return { ...FRESH_WORDS, ...SEA_WORDS }[water]
}

/** A light in words. */
export function lampWord(lamp: SeenLamp): string {
  return typeof lamp === 'string' ? LIGHT_WORDS[lamp].word : `Own light, ${lamp.kelvin} K`
}
