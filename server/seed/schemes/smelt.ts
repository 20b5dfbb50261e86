import { gillLine } from '../marks'
import { coat, EPOXY, FINE, mesh, THROUGH_MESH, under, type DemoScheme } from '../write-scheme'

const BAND = [
  [0.222, 0.425], [0.35, 0.42], [0.5, 0.422], [0.7, 0.43], [0.9, 0.44], [1, 0.45], [1, 0.56], [0.85, 0.57], [0.6, 0.58], [0.4, 0.585], [0.25, 0.575],
] as [number, number][]

export const SMELT: DemoScheme = {
  name: 'Smelt, first ice',
  fish: 'Rainbow smelt',
  blank: 'Slim 115',
  ground: { name: 'Primed pale grey', colour: [82, -1, 3], finish: 'matt' },
  iris: [76, -2, 8],
  notes: ['Silver band taped', 'Lilac above the band, specks'],
  added: ['Lilac above the band', 'Specks on the back'],
  stack: [
    coat('White pearl', 'Fine white pearl', 0.9),
    coat('Thin olive back', 'Olive green', 1.3, { gun: [28, 0.8], where: { zones: ['back', 'upper flank'], reach: -0.5, fade: 6 } }),
    coat('Blue-green back', 'Blue-green', 1, { gun: [16, 0.75], where: { zones: ['back'], reach: 2, fade: 6 } }),
    ...under('Mesh 1.9 mm', 4401, mesh('hexagon', 1.9, 0.36), [
      coat('Smoke through the mesh', 'Smoke', 1.4, { gun: [36, 0.7], tool: THROUGH_MESH, where: { zones: ['back', 'upper flank', 'trunk'], reach: -1.2, fade: 4.5 } }),
    ]),
    coat('Smoke line where the band will be', 'Smoke', 1.1, { gun: [88, 0.34], where: { zones: ['trunk'], fade: 4 } }),
    ...under('Tape, both edges of the band', 4402, { kind: 'tape', does: 'opens', outlines: [BAND], soft: 0.14, wobble: 0 }, [
      coat('Aluminium band', 'Aluminium, fine', 2.6, { gun: [90, 0.8] }),
    ]),
    coat('Silver below the band', 'Silver pearl', 1.8, { gun: [112, 0.6], where: { zones: ['lower flank', 'belly'], reach: 1, fade: 5 } }),
    coat('Lilac above the band', 'Lilac flash', 1.2, { gun: [58, 0.22], where: { zones: ['trunk'], fade: 6 } }),
    coat('Green flash on the shoulder', 'Green flash', 2, { gun: [36, 0.36], where: { zones: ['back', 'upper flank'], fade: 6 } }),
    coat('Rose along the lower flank', 'Rose', 0.22, { gun: [118, 0.35] }),
    coat('White belly', 'Fine white pearl', 1.8, { gun: [170, 0.75], where: { zones: ['belly'], reach: 2, fade: 5 } }),
    coat('Dark ridge', 'Smoke', 2, { gun: [0, 0.55], where: { zones: ['back'], reach: 0.6, fade: 4 } }),
    coat('Hairline over the band', 'Smoke', 1.1, {
      gun: [90, 2], tool: FINE,
      marks: [{ kind: 'strokes', with: 'airbrush', strokes: [{ points: BAND.slice(0, 6), width: [0.22, 0.18], amount: [0.9, 0.6] }] }],
    }),
    coat('Specks on the back', 'Smoke', 2.2, {
      gun: [30, 1.2], tool: FINE, note: 'Flicked from a stiff brush, card held over the flank.',
      marks: [{ kind: 'scatter', seed: 4403, count: 230, u: [0.16, 0.97], v: [0.03, 0.32], radius: [0.1, 0.22], apart: 1, soft: 0.08, grow: 0 }],
    }),
    coat('Silver gill cover', 'Aluminium, fine', 1.4, { gun: [90, 1.4], where: { zones: ['gill cover', 'upper flank', 'lower flank'], fade: 3 } }),
    coat('Gill edge and fin smoke', 'Smoke', 1.1, { gun: [75, 1.3], tool: FINE, marks: [gillLine('slim-115', 0.7)], where: { fins: [{ fin: 'all', root: 0.3, tip: 0.8, on: 'rays' }] } }),
    EPOXY,
  ],
}
