import { atLength, dagger, gillLine } from '../marks'
import { BRUSH, coat, EPOXY, FINE, mesh, THROUGH_MESH, under, type DemoScheme } from '../write-scheme'

const DAGGERS = [
  dagger('deep-crank-62', [0.36, 0.05], [0.36, 0.60], 1.25, 1.1), dagger('deep-crank-62', [0.45, 0.06], [0.452, 0.59], 1.2, 1.1), dagger('deep-crank-62', [0.54, 0.06], [0.543, 0.58], 1.1, 1.1),
  dagger('deep-crank-62', [0.63, 0.07], [0.634, 0.56], 1.0, 1.05), dagger('deep-crank-62', [0.72, 0.08], [0.724, 0.55], 0.9, 1.05), dagger('deep-crank-62', [0.80, 0.09], [0.804, 0.53], 0.8, 1),
  dagger('deep-crank-62', [0.87, 0.1], [0.873, 0.51], 0.7, 1),
]

export const EMBER: DemoScheme = {
  name: 'Ember',
  fish: '',
  blank: 'Deep crank 62',
  iris: [88, 0, 60],
  notes: ['Fluorescents over a full white', 'Black daggers, shoulder dot'],
  added: ['Gill edge, black line', 'Shoulder dot'],
  stack: [
    coat('White, two rounds', 'Opaque white', 5, { heat: true, note: 'Fluorescents want a full white below: no grey left.' }),
    coat('Fluorescent yellow, flank', 'Fluorescent yellow', 2.4, { gun: [80, 1.1] }),
    ...under('Diamond mesh 3.4 mm', 4701, mesh('diamond', 3.4, 0.3), [
      coat('Fluorescent green through the mesh', 'Fluorescent green', 2.2, { gun: [50, 0.8], tool: THROUGH_MESH, where: { zones: ['trunk'], fade: 3 } }),
    ]),
    coat('Fluorescent orange, belly', 'Fluorescent orange', 2.6, { gun: [150, 0.8], where: { zones: ['lower flank', 'belly'], reach: -2.5, fade: 6 } }),
    coat('Cerise, throat and vent', 'Fluorescent cerise', 1.4, { gun: [165, 0.6], where: { zones: ['belly'], fade: 6 } }),
    coat('Blue flash on the shoulder', 'Blue flash', 0.9, { gun: [40, 0.5] }),
    coat('Dark green back', 'Leaf green', 2.2, { gun: [22, 0.75], where: { zones: ['back', 'upper flank'], reach: -2, fade: 7 } }),
    coat('Black ridge', 'Opaque black', 1.5, { gun: [6, 0.55], where: { zones: ['back'], reach: -0.2, fade: 4 } }),
    coat('Black daggers', 'Opaque black', 1.5, { gun: [70, 2], tool: FINE, marks: [{ kind: 'strokes', with: 'airbrush', strokes: DAGGERS }] }),
    coat('Gill slash, cerise', 'Fluorescent cerise', 2.4, { gun: [90, 2], tool: FINE, marks: [gillLine('deep-crank-62', 1.4, { shift: -0.035 })] }),
    coat('Gill edge, black line', 'Opaque black', 1, { gun: [85, 2], tool: FINE, marks: [gillLine('deep-crank-62', 0.45)] }),
    coat('Shoulder dot', 'Opaque black', 3, { gun: [90, 2], tool: BRUSH, marks: [{ kind: 'dots', dots: [[0.362, 0.4, atLength('deep-crank-62', 2.3)]], soft: 0.08, grow: 0 }] }),
    EPOXY,
  ],
}
