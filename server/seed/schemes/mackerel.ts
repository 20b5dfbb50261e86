import { gillLine } from '../marks'
import { coat, EPOXY, FINE, under, type DemoScheme } from '../write-scheme'
import type { Place } from '#shared/scheme/mark'

/** One of the wavy bars over a mackerel's back: a ribbon that swings as it comes down. */
function wave(u: number, bottom: number, width: number): Place[] {
  const rows = 9
  const side = (offset: number) => Array.from({ length: rows }, (_, i): Place => {
    const k = i / (rows - 1)
    return [u + 0.009 * Math.sin(2.2 * Math.PI * k) + offset * (1 - 0.45 * k), 0.015 + (bottom - 0.015) * k]
  })
  return [...side(-width / 2), ...side(width / 2).reverse()]
}
const WAVES = Array.from({ length: 22 }, (_, i) => wave(0.27 + i * 0.031, 0.38 + 0.05 * Math.sin(i * 1.9), 0.0125))

export const MACKEREL: DemoScheme = {
  name: 'Mackerel, off the pier',
  fish: 'Atlantic mackerel',
  blank: 'Minnow 90',
  iris: [70, 2, 22],
  notes: ['Wavy bars cut', 'Green over the steel, pink on the belly'],
  added: ['Green flash over the bars', 'Rose on the belly'],
  stack: [
    coat('White ground', 'Opaque white', 3, { heat: true }),
    coat('Silver all over', 'Silver pearl', 2.2),
    coat('Aluminium on the flank', 'Aluminium, fine', 0.8, { gun: [92, 0.6] }),
    coat('Steel blue back', 'Clear blue', 1.4, { gun: [24, 0.75], where: { zones: ['back', 'upper flank'], reach: -1, fade: 5 } }),
    coat('Blue-green over the steel', 'Blue-green', 1.8, { gun: [20, 0.75], where: { zones: ['back', 'upper flank'], reach: -1, fade: 4 } }),
    ...under('Wavy bars', 4801, { kind: 'stencil', does: 'opens', soft: 0.22, wobble: 0.3, outlines: WAVES }, [
      coat('Bars', 'Opaque black', 1.8, { gun: [35, 1.1], tool: FINE, note: 'Low pressure, plate held close: the bars are hard at the top.' }),
    ]),
    coat('Green flash over the bars', 'Green flash', 1.4, { gun: [30, 0.6], where: { zones: ['back', 'upper flank'], fade: 5 } }),
    coat('Dark ridge', 'Opaque black', 1.1, { gun: [0, 0.55], where: { zones: ['back'], reach: -1.2, fade: 3 } }),
    coat('White belly', 'Fine white pearl', 2, { gun: [170, 0.75], where: { zones: ['belly'], reach: 1, fade: 5 } }),
    coat('Rose on the belly', 'Rose', 0.4, { gun: [130, 0.4] }),
    coat('Gill cover, smoke', 'Smoke', 0.9, { gun: [80, 1.3], tool: FINE, marks: [gillLine('minnow-90', 0.7)] }),
    coat('Nose, dark', 'Deep water blue', 1.6, { gun: [15, 0.7], where: { zones: ['head', 'back'], reach: 0, fade: 4 } }),
    EPOXY,
  ],
}
