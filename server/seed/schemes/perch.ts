import { gillShade, pectoral, pectoralRays } from '../marks'
import { allFins, coat, EPOXY, FINE, mesh, THROUGH_MESH, under, type DemoScheme } from '../write-scheme'
import { bar } from '#shared/scheme/starter-masks'

const BARS = [
  [0.30, 0.02, 0.60, 0.026, 0.010, 0.006], [0.395, 0.01, 0.72, 0.030, 0.011, 0.004], [0.485, 0.01, 0.74, 0.030, 0.012, 0],
  [0.575, 0.01, 0.72, 0.028, 0.011, -0.002], [0.66, 0.01, 0.70, 0.026, 0.010, -0.004], [0.745, 0.01, 0.68, 0.024, 0.010, -0.004],
  [0.825, 0.01, 0.66, 0.02, 0.010, -0.004],
] as const

const DARK_OLIVE = [['Olive green', 13], ['Opaque black', 1]] as const

export const PERCH: DemoScheme = {
  name: 'Perch, evening water',
  fish: 'Yellow perch',
  blank: 'Shad 80',
  iris: [58, 22, 48],
  notes: ['Bars cut, mesh on', 'Warmer flank, redder fins'],
  added: ['Red on the fin tips', 'Pectoral rays'],
  stack: [
    coat('White ground', 'Opaque white', 3, { where: { fins: allFins() }, heat: true }),
    coat('White pearl all over', 'Fine white pearl', 1.2),
    coat('Gold on the flank', [['Old gold pearl', 20], ['Candy yellow', 5], ['Candy amber', 2]], 3.2, { gun: [78, 0.95] }),
    ...under('Mesh 2 mm', 4101, mesh('hexagon', 2, 0.32), [
      coat('Olive through the mesh', 'Olive green', 1.5, {
        gun: [58, 0.85], tool: THROUGH_MESH, where: { zones: ['trunk'], fade: 3 }, note: 'Let the gold dry to the touch before the mesh goes on.',
      }),
    ]),
    coat('Candy yellow, lower flank', 'Candy yellow', 0.8, { gun: [100, 0.55], where: { zones: ['trunk'], fade: 5 } }),
    coat('Olive back', 'Olive green', 2.4, { gun: [22, 0.75], where: { zones: ['back', 'upper flank'], reach: -1, fade: 9, fins: [{ fin: 'dorsal', root: 0.9, tip: 0.7, on: 'whole' }, { fin: 'tail', root: 0.9, tip: 0.25, on: 'whole' }] } }),
    coat('Dark ridge', DARK_OLIVE, 2.6, { gun: [12, 0.7], where: { zones: ['back'], reach: 1.5, fade: 5 } }),
    ...under('Bars', 4102, { kind: 'stencil', does: 'opens', soft: 0.55, wobble: 0.5, outlines: BARS.map(([u, top, bottom, a, b, lean]) => bar(u, top, bottom, a, b, lean)) }, [
      coat('Bars', DARK_OLIVE, 2.1, { gun: [60, 1.4], tool: THROUGH_MESH, note: 'Stop when the foot of the bar goes smoky, not black.' }),
    ]),
    coat('Bars, cores freehand', 'Smoke', 1.5, {
      gun: [45, 1.1], tool: FINE,
      marks: BARS.map(([u, top, bottom, a, b, lean]) => ({
        kind: 'outline' as const, points: bar(u, top, top + (bottom - top) * 0.8, a * 0.67, b * 0.67, lean), soft: 0.9, wobble: 0.4, amount: 1,
      })),
    }),
    coat('White belly', 'Cream', 2.2, { gun: [170, 0.75], where: { zones: ['belly'], reach: 1.5, fade: 5 } }),
    coat('Gill cover shade', 'Brown glaze', 1, { gun: [75, 1.2], tool: FINE, marks: [gillShade('shad-80')] }),
    coat('Head smoke', DARK_OLIVE, 2.4, { gun: [30, 0.85], where: { zones: ['head', 'back', 'upper flank'], fade: 6 } }),
    coat('Orange fins', 'Fin orange', 1.6, { where: { body: false, fins: [{ fin: 'tail', root: 0.25, tip: 0.8, on: 'whole' }, { fin: 'anal', root: 0.8, tip: 1, on: 'whole' }] } }),
    coat('Red on the fin tips', 'Candy red', 1, { where: { body: false, fins: [{ fin: 'tail', root: 0, tip: 1, on: 'whole' }, { fin: 'anal', root: 0, tip: 0.8, on: 'whole' }] } }),
    coat('Pectoral fin, daggers', 'Fin orange', 1.7, { gun: [90, 2], tool: FINE, marks: [pectoral('shad-80')] }),
    coat('Pectoral rays', 'Brown glaze', 1.4, { gun: [90, 2], tool: FINE, marks: [pectoralRays('shad-80')] }),
    coat('Ray shade', 'Opaque black', 1.1, { where: { body: false, fins: [{ fin: 'dorsal', root: 0.2, tip: 0.5, on: 'rays' }, { fin: 'tail', root: 0.3, tip: 0.2, on: 'rays' }] }, tool: FINE }),
    EPOXY,
  ],
}
