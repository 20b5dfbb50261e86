import { gillLine, lateralLine, pectoral, pectoralRays } from '../marks'
import { allFins, coat, EPOXY, FINE, mesh, under, type DemoScheme } from '../write-scheme'

const RED_FINS = ['tail', 'anal', 'pelvic', 'dorsal']

export const ROACH: DemoScheme = {
  name: 'Roach, low sun',
  fish: 'Roach',
  blank: 'Glide 160',
  iris: [44, 54, 38],
  notes: ['Silver scales over black', 'Brass on the shoulder, darker back'],
  added: ['Brass on the shoulder', 'Fin rays and smoke edge'],
  stack: [
    coat('White ground', 'Opaque white', 3, { where: { fins: allFins() }, heat: true }),
    coat('Black under the scales', 'Smoke', 2.6, { gun: [62, 0.95], where: { zones: ['trunk'], fade: 8 }, rest: 30, note: 'Dry before the mesh: 30 minutes on a damp day.' }),
    ...under('Mesh 4 mm', 4201, mesh('hexagon', 4, 0.62), [
      coat('White through the mesh', 'Opaque white', 0.75, { gun: [82, 1], where: { zones: ['trunk'], reach: -1, fade: 5 } }),
      coat('Aluminium through the mesh', 'Aluminium, fine', 0.9, { gun: [80, 1], where: { zones: ['trunk'], reach: -1, fade: 5 } }),
      coat('Silver through the mesh', 'Silver pearl', 2.4, { gun: [80, 1], where: { zones: ['trunk'], reach: -1, fade: 5 }, note: 'Lift the mesh while the last pass still gives a little.' }),
    ]),
    coat('Silver on head and belly', 'Silver pearl', 1.2, { gun: [110, 0.9] }),
    coat('Green flash, upper flank', 'Green flash', 1.1, { gun: [45, 0.5], where: { zones: ['back', 'upper flank'], fade: 10 } }),
    coat('Blue-green back', 'Blue-green', 1.5, { gun: [22, 0.8], where: { zones: ['back', 'upper flank'], reach: -3, fade: 14 } }),
    coat('Dark ridge', 'Deep water blue', 1.8, { gun: [8, 0.7], where: { zones: ['back'], reach: 1, fade: 9 } }),
    coat('Brass on the shoulder', 'Candy amber', 0.32, { gun: [62, 0.5], where: { zones: ['upper flank'], reach: 2, fade: 14 } }),
    coat('White belly', 'Opaque white', 2, { gun: [172, 0.75], where: { zones: ['belly'], reach: 2, fade: 10 } }),
    coat('Gill shade and lateral line', 'Smoke', 1, { gun: [75, 1.3], tool: FINE, marks: [gillLine('glide-160', 1), lateralLine(0.25, 0.95, 62)] }),
    coat('Head, blue-green smoke', 'Blue-green', 1.5, { gun: [20, 0.75], where: { zones: ['head', 'back', 'upper flank'], reach: -1, fade: 9 } }),
    coat('Red fins', 'Fin orange', 1.3, { where: { body: false, fins: RED_FINS.map(fin => ({ fin, root: 0.45, tip: 0.9, on: 'whole' })) } }),
    coat('Candy red on the tips', 'Candy red', 1.5, { where: { body: false, fins: ['tail', 'anal', 'pelvic'].map(fin => ({ fin, root: 0.1, tip: 0.7, on: 'whole' })) } }),
    coat('Pectoral fin', 'Fin orange', 1.4, { gun: [90, 2], tool: FINE, marks: [pectoral('glide-160', 0.64)] }),
    coat('Pectoral rays', 'Candy red', 1.6, { gun: [90, 2], tool: FINE, marks: [pectoralRays('glide-160', 0.64)] }),
    coat('Fin rays and smoke edge', 'Smoke', 1, {
      tool: FINE, where: { body: false, fins: [{ fin: 'all', root: 0.3, tip: 0.6, on: 'rays' }, { fin: 'all', root: 0, tip: 0.8, on: 'rim', width: 1.6 }] },
    }),
    EPOXY,
  ],
}
