import { gillShade, lateralLine } from '../marks'
import { coat, EPOXY, FINE, mesh, THROUGH_MESH, under, type DemoScheme } from '../write-scheme'

export const SHINER: DemoScheme = {
  name: 'Shiner, warm shallows',
  fish: 'Golden shiner',
  blank: 'Flat crank 60',
  iris: [80, 4, 52],
  notes: ['Gold scales over olive', 'Softer back, dipped line'],
  added: ['Dipped line'],
  stack: [
    coat('White ground', 'Opaque white', 3, { heat: true }),
    coat('Olive under the scales', 'Olive green', 1.6, { gun: [58, 0.9], where: { zones: ['trunk'], fade: 5 } }),
    coat('Brown under the scales', 'Brown glaze', 0.8, { gun: [70, 0.8], where: { zones: ['trunk'], fade: 5 }, rest: 20 }),
    ...under('Mesh 2.2 mm', 4901, mesh('hexagon', 2.2, 0.34), [
      coat('Cream through the mesh', 'Cream', 0.8, { gun: [88, 1], tool: THROUGH_MESH, where: { zones: ['trunk'], fade: 3 } }),
      coat('Gold through the mesh', 'Old gold pearl', 2.2, { gun: [84, 1], where: { zones: ['trunk'], fade: 3 } }),
    ]),
    coat('Gold on head and belly', 'Old gold pearl', 1.1, { gun: [100, 0.9] }),
    coat('Candy yellow breath', 'Candy yellow', 0.5, { gun: [90, 0.7] }),
    coat('Olive back', [['Olive green', 10], ['Smoke', 4]], 2.2, { gun: [20, 0.75], where: { zones: ['back', 'upper flank'], reach: -1, fade: 5 } }),
    coat('Dark ridge', 'Umber', 1.2, { gun: [4, 0.6], where: { zones: ['back'], reach: -0.5, fade: 3.5 } }),
    coat('Pale belly', 'Fine white pearl', 1.8, { gun: [170, 0.75], where: { zones: ['belly'], reach: 1, fade: 5 } }),
    coat('Dipped line', 'Smoke', 1, { gun: [90, 2], tool: FINE, marks: [lateralLine(0.29, 0.94, 34)] }),
    coat('Gill shade', 'Brown glaze', 0.9, { gun: [78, 1.3], tool: FINE, marks: [gillShade('flat-crank-60')] }),
    EPOXY,
  ],
}
