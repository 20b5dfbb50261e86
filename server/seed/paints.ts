import type { Lab, PaintBase, PaintDraft, PaintKind, PaintKnown } from '#shared/shelf/paint'

/** A paint of the demo shelf; described, never branded. Colours and figures are our own inventions. */
export interface Demo extends Partial<PaintDraft> { kind: PaintKind, known: PaintKnown, pricePerMl: number, volumeLeft: number }

const opaque = (masstone: Lab, passesToHide: number): PaintKnown => ({ how: 'masstone-hide', masstone, passesToHide })
const clearish = (overWhite: Lab, passes: number, haze = 0.012): PaintKnown => ({ how: 'dye-over-white', overWhite, passes, haze })
const candy = (overWhite: Lab, passes: number): PaintKnown => clearish(overWhite, passes, 0.006)
const pearl = (thickness: number, flakesPerPass = 0.5, sigma = 9, edge = 0.06): PaintKnown =>
  ({ how: 'flake', oxide: 'anatase', thickness, flakesPerPass, sigma, edge })
const glowing = (overWhite: Lab, passes: number, emissionPeak: number, emissionWidth: number, quantumYield: number): PaintKnown =>
  ({ how: 'fluorescent', overWhite, passes, haze: 0.012, emissionPeak, emissionWidth, quantumYield })

const solid = (known: PaintKnown, left: number, price: number, more: Partial<Demo> = {}): Demo =>
  ({ kind: 'opaque', known, volumeLeft: left, pricePerMl: price, reducerPer100: 25, filmPerPass: 5, volumeSolids: 28, ...more })
const glaze = (known: PaintKnown, left: number, price: number, kind: PaintKind = 'transparent'): Demo =>
  ({ kind, known, volumeLeft: left, pricePerMl: price, reducerPer100: 40, filmPerPass: 3, volumeSolids: 20 })
const flake = (known: PaintKnown, left: number, price: number, kind: PaintKind): Demo =>
  ({ kind, known, volumeLeft: left, pricePerMl: price, reducerPer100: 30, filmPerPass: 4, volumeSolids: 22, restMinutes: 6 })
const loud = (known: PaintKnown, left: number, price: number): Demo =>
  ({ kind: 'fluorescent', known, volumeLeft: left, pricePerMl: price, reducerPer100: 20, filmPerPass: 4, volumeSolids: 24 })

const PAINTS = {
  'White primer': solid(opaque([95, -0.4, 1.6], 5), 210, 0.09, { kind: 'primer', filmPerPass: 8, restMinutes: 10 }),
  'Opaque white': solid(opaque([96, -0.6, 2], 6), 118, 0.11),
  'Cream': solid(opaque([90, 1.5, 14], 6), 64, 0.11),
  'Opaque black': solid(opaque([8, 0.2, -0.4], 2.2), 140, 0.1),
  'Tan': solid(opaque([66, 8, 30], 4), 48, 0.12),
  'Ochre': solid(opaque([58, 14, 44], 4), 52, 0.12),
  'Umber': solid(opaque([27, 8, 14], 3), 71, 0.12, { kind: 'semi-opaque' }),
  'Pale olive': solid(opaque([78, -3, 34], 5), 33, 0.12),
  'Signal red': solid(opaque([42, 58, 36], 4), 40, 0.14),
  'Fin orange': solid(opaque([60, 46, 58], 4.5), 24, 0.14),
  'Pale yellow': solid(opaque([88, 0, 38], 5), 37, 0.13),
  'Pale blue': solid(opaque([68, -8, -24], 4.5), 29, 0.13),
  'Smoke': glaze(clearish([52, 1, 5], 2), 88, 0.16),
  'Brown glaze': glaze(clearish([44, 14, 30], 2.2), 61, 0.16),
  'Olive green': glaze(clearish([52, -6, 42], 2.4), 74, 0.16),
  'Leaf green': glaze(clearish([48, -34, 22], 2.4), 39, 0.16),
  'Blue-green': glaze(clearish([42, -26, -14], 2.4), 55, 0.16),
  'Clear blue': glaze(clearish([36, 6, -46], 2.4), 42, 0.16),
  'Deep water blue': glaze(clearish([26, 4, -28], 2), 47, 0.16),
  'Rose': glaze(clearish([72, 34, 2], 2.4), 30, 0.16),
  'Candy yellow': glaze(candy([84, 2, 82], 2.4), 51, 0.22, 'candy'),
  'Candy amber': glaze(candy([66, 24, 70], 2.4), 36, 0.22, 'candy'),
  'Candy orange': glaze(candy([60, 46, 62], 2.4), 28, 0.22, 'candy'),
  'Candy red': glaze(candy([42, 62, 36], 2.6), 6, 0.22, 'candy'),
  'Fine white pearl': flake(pearl(44, 0.42, 12, 0.12), 58, 0.24, 'pearl'),
  'Silver pearl': flake(pearl(50, 0.62), 66, 0.24, 'pearl'),
  'Old gold pearl': flake(pearl(74, 0.55), 40, 0.26, 'pearl'),
  'Lilac flash': flake(pearl(106), 22, 0.3, 'interference'),
  'Blue flash': flake(pearl(118), 25, 0.3, 'interference'),
  'Green flash': flake(pearl(150), 27, 0.3, 'interference'),
  'Aluminium, fine': flake({ how: 'flake', oxide: 'aluminium', flakesPerPass: 0.7, sigma: 8, edge: 0.05 }, 45, 0.28, 'metallic'),
  'Fluorescent yellow': loud(glowing([93, -18, 92], 2.2, 520, 70, 0.9), 34, 0.2),
  'Fluorescent green': loud(glowing([82, -52, 60], 2.2, 522, 58, 0.85), 31, 0.2),
  'Fluorescent orange': loud(glowing([66, 60, 72], 2, 603, 56, 0.93), 26, 0.2),
  'Fluorescent cerise': loud(glowing([58, 74, 10], 2, 614, 56, 0.92), 18, 0.2),
  'Sanding sealer': {
    kind: 'sealer', known: { how: 'clear', yellowing: 0.01 }, base: 'solvent', volumeLeft: 400, pricePerMl: 0.05, filmPerPass: 12, volumeSolids: 22,
    restMinutes: 60, density: 0.92, hazards: ['H225', 'H336'],
  },
  'Slow epoxy clear': {
    kind: 'clear', known: { how: 'clear', yellowing: 0.02 }, base: 'epoxy', volumeLeft: 480, pricePerMl: 0.07, filmPerPass: 150, volumeSolids: 100,
    restMinutes: 720, potLifeMinutes: 25, twoPart: { by: 'volume', resin: 2, hardener: 1, resinDensity: 1.16, hardenerDensity: 1.02 },
    density: 1.11, hazards: ['H315', 'H317', 'H319', 'H411'],
    note: 'Two parts resin to one of hardener by volume, 100 to 44 by weight. On the turner for ten hours.',
  },
  'Water clear, satin': {
    kind: 'clear', known: { how: 'clear', yellowing: 0 }, base: 'water', volumeLeft: 190, pricePerMl: 0.08, filmPerPass: 20, volumeSolids: 32, restMinutes: 45,
  },
} satisfies Record<string, Demo>

export type DemoPaintName = keyof typeof PAINTS
/** Thirty-eight bottles of the demo workshop. */
export const DEMO_PAINTS: Readonly<Record<DemoPaintName, Demo>> = PAINTS

const BASE: PaintBase = 'water'

/** A demo paint as somebody would have typed it. */
export function demoPaint(name: DemoPaintName): PaintDraft {
  return {
    name, base: BASE, reducerPer100: 0, filmPerPass: 4, volumeSolids: 25, density: 1.05, restMinutes: 5, hazards: [], note: '', ...DEMO_PAINTS[name],
  }
}
