import { gillLine } from '../marks'
import { coat, EPOXY, FINE, mesh, under, type DemoScheme } from '../write-scheme'

export const HERRING: DemoScheme = {
  name: 'Herring, slack tide',
  fish: 'Atlantic herring',
  blank: 'Pencil 110',
  iris: [80, -1, 10],
  notes: ['Pearl over pearl', 'Lilac flank, gold breath on the shoulder'],
  added: ['Lilac flash, flank', 'Gold breath along the shoulder'],
  stack: [
    coat('White ground', 'Opaque white', 3, { heat: true }),
    coat('Smoke under the scales', 'Smoke', 1.7, { gun: [56, 0.85], where: { zones: ['trunk'], fade: 6 } }),
    coat('Blue under the scales', 'Clear blue', 1.1, { gun: [42, 0.6], where: { zones: ['trunk'], fade: 6 }, rest: 20 }),
    ...under('Mesh 2.5 mm', 4501, mesh('hexagon', 2.5, 0.36), [
      coat('White through the mesh', 'Opaque white', 0.9, { gun: [84, 0.9], where: { zones: ['trunk'], fade: 4 } }),
      coat('Silver through the mesh', 'Silver pearl', 2.2, { gun: [80, 0.95], where: { zones: ['trunk'], fade: 4 } }),
    ]),
    coat('Silver on head and belly', 'Silver pearl', 1.3, { gun: [112, 0.85] }),
    coat('Deep blue-green back', 'Blue-green', 2.6, { gun: [24, 0.78], where: { zones: ['back', 'upper flank'], reach: -2.6, fade: 5.5 } }),
    coat('Dark ridge', 'Deep water blue', 3.4, { gun: [10, 0.76], where: { zones: ['back'], reach: 1.6, fade: 4.5 } }),
    coat('Black on the ridge', 'Opaque black', 0.9, { gun: [0, 0.6], where: { zones: ['back'], reach: 0.4, fade: 4 } }),
    coat('Green flash, upper flank', 'Green flash', 1.8, { gun: [46, 0.4], where: { zones: ['back', 'upper flank'], fade: 6 } }),
    coat('Blue flash, back', 'Blue flash', 0.9, { gun: [18, 0.55], where: { zones: ['back'], reach: 2.5, fade: 6 } }),
    coat('Lilac flash, flank', 'Lilac flash', 1, { gun: [78, 0.42], where: { zones: ['trunk'], fade: 6 } }),
    coat('Gold breath along the shoulder', 'Candy amber', 0.3, { gun: [58, 0.22], where: { zones: ['trunk'], fade: 6 } }),
    coat('White belly', 'Fine white pearl', 2.2, { gun: [172, 0.8], where: { zones: ['belly'], reach: 2, fade: 6 } }),
    coat('Gill cover, smoke', 'Smoke', 0.8, { gun: [80, 1.3], tool: FINE, marks: [gillLine('pencil-110', 0.9)] }),
    coat('Head and nose', 'Deep water blue', 2, { gun: [18, 0.75], where: { zones: ['head', 'back', 'upper flank'], reach: -1.6, fade: 4.5 } }),
    coat('Brass on the cheek', 'Candy amber', 0.35, { gun: [90, 0.8], where: { zones: ['gill cover'], fade: 5 } }),
    EPOXY,
  ],
}
