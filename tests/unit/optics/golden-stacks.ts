import type { Lab } from '../../../shared/optics/colorimetry'
import { CARD_BLACK, CARD_WHITE, groundFromLab } from '../../../shared/optics/known-film'
import { mixOptics, type PaintOptics, paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { exactSeen } from '../../../shared/optics/seen-exact'
import type { SeenWish } from '../../../shared/optics/seen-wish'
import { promiseSpread } from '../../../shared/optics/spread'
import { promise, type Stack } from '../../../shared/optics/stack'

const cream = paintOpticsFrom({ how: 'two-swatches', overBlack: [62, 2, 12], overWhite: [88, 1, 16], passes: 1 })
const olive = paintOpticsFrom({ how: 'two-swatches', overBlack: [30, -6, 22], overWhite: [44, -8, 34], passes: 1 })
const black = paintOpticsFrom({ how: 'masstone-hide', masstone: [9, 0, -1], passesToHide: 2 })
const red = paintOpticsFrom({ how: 'masstone-hide', masstone: [42, 58, 38], passesToHide: 4 })
const candy = paintOpticsFrom({ how: 'dye-over-white', overWhite: [50, 62, 36], passes: 2 })
const teal = paintOpticsFrom({ how: 'dye-over-white', overWhite: [56, -34, -14], passes: 3, haze: 0.02 })
const gold = paintOpticsFrom({ how: 'interference', thickness: 75, oxide: 'anatase', flakesPerPass: 0.4, sigma: 8, edge: 0.06 })
const blue = paintOpticsFrom({ how: 'interference', wanted: [60, 0, -40], oxide: 'rutile', flakesPerPass: 0.4, sigma: 8, edge: 0.06 })
const bronze = paintOpticsFrom({ how: 'interference', thickness: 60, oxide: 'hematite', flakesPerPass: 0.5, sigma: 9, edge: 0.05, tint: [80, 8, 30] })
const flake = paintOpticsFrom({ how: 'metallic', flakesPerPass: 0.5, sigma: 9, edge: 0.06 })
const orange = paintOpticsFrom({ how: 'dye-over-white', overWhite: [66, 60, 72], passes: 2, haze: 0.012, fluorescent: { peak: 603, width: 56, quantumYield: 0.93 } })
const lemon = paintOpticsFrom({ how: 'dye-over-white', overWhite: [93, -18, 92], passes: 2.2, haze: 0.012, fluorescent: { peak: 520, width: 70, quantumYield: 0.9 } })
const clear = paintOpticsFrom({ how: 'clear' }), aged = paintOpticsFrom({ how: 'clear', yellowing: 0.05 })

const over = (ground: Lab, ...coats: [PaintOptics, number][]): Stack => ({ ground: groundFromLab(ground), coats: coats.map(([optics, passes]) => ({ optics, passes })), finish: 'gloss' })
const cup = (...parts: [PaintOptics, number][]) => mixOptics(parts.map(([optics, drops]) => ({ optics, drops })))
const scheme = over(CARD_WHITE, [cream, 2], [olive, 0.6], [candy, 0.5], [gold, 1], [clear, 2])

/** Stacks that between them use every part of the model. */
const STACKS: Readonly<Record<string, { stack: Stack, seen?: SeenWish }>> = {
  'two swatches over white': { stack: over(CARD_WHITE, [olive, 1]) },
  'two swatches over black': { stack: over(CARD_BLACK, [olive, 1]) },
  'two swatches, thin, matt': { stack: { ...over(CARD_WHITE, [olive, 0.4]), finish: 'matt' } },
  'masstone over white': { stack: over(CARD_WHITE, [red, 1.5]) },
  'black over cream, satin': { stack: { ...over(CARD_WHITE, [cream, 2], [black, 0.5]), finish: 'satin' } },
  'candy over pearl': { stack: over(CARD_BLACK, [gold, 2], [candy, 1]) },
  'hazy dye': { stack: over(CARD_WHITE, [teal, 2]) },
  'blue pearl over black': { stack: over(CARD_BLACK, [blue, 2]) },
  'blue pearl over white': { stack: over(CARD_WHITE, [blue, 2]) },
  'bronze in a dyed carrier': { stack: over(CARD_BLACK, [bronze, 2]) },
  'aluminium flake': { stack: over(CARD_BLACK, [flake, 3]) },
  'two pearls in one cup': { stack: over(CARD_BLACK, [cup([gold, 3], [blue, 2]), 2]) },
  'pearl in candy': { stack: over(CARD_WHITE, [cup([gold, 5], [candy, 3]), 2]) },
  'three films in one cup': { stack: over(CARD_WHITE, [cup([cream, 4], [olive, 2], [red, 1]), 1.5]) },
  'fluorescent over white': { stack: over(CARD_WHITE, [orange, 2]) },
  'fluorescent over black': { stack: over(CARD_BLACK, [orange, 2]) },
  'orange over lemon': { stack: over(CARD_WHITE, [lemon, 2], [orange, 0.5], [clear, 2]) },
  'aged clear': { stack: over(CARD_WHITE, [olive, 1], [aged, 3]) },
  'scheme in daylight': { stack: scheme },
  'scheme under a filament': { stack: scheme, seen: { light: 'A' } },
  'scheme under the shop tube': { stack: scheme, seen: { light: 'F11' } },
  'scheme at 5600 K': { stack: scheme, seen: { light: { kelvin: 5600 } } },
  'scheme five metres down': { stack: scheme, seen: { light: 'D65', water: { type: '3C', depth: 5, distance: 1, adapted: true } } },
  'fluorescent in tea-stained water': { stack: over(CARD_WHITE, [orange, 2]), seen: { light: 'D65', water: { type: 'tea-stained', depth: 1, distance: 0.5, adapted: false } } },
}

/** Colours of one stack, to four decimals. */
export interface Golden { lab: Lab, face?: Lab, flop?: Lab, typical: number, most: number }

/** What the engine makes of every golden stack today. */
export function goldenToday(): Record<string, Golden> {
  return Object.fromEntries(Object.entries(STACKS).map(([name, { stack, seen }]) => {
    const by = seen ? exactSeen(seen) : 'D65'
    const { lab, face, flop } = promise(stack, by)
    const { typical, most } = promiseSpread(stack, by)
    return [name, { lab: rounded(lab), ...(face && flop ? { face: rounded(face.lab), flop: rounded(flop.lab) } : {}), typical: round(typical), most: round(most) }]
  }))
}

const round = (value: number) => Number(value.toFixed(4))
const rounded = ([L, a, b]: Lab): Lab => [round(L), round(a), round(b)]
