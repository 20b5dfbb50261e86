import { gillLine, pectoral, pectoralRays } from '../marks'
import { coat, EPOXY, FINE, type DemoScheme } from '../write-scheme'
import { bar } from '#shared/scheme/starter-masks'

const BARS = ([[0.36, 0.03], [0.5, 0.028], [0.63, 0.025], [0.75, 0.022], [0.86, 0.02]] as const)
  .map(([u, a]) => bar(u, 0.02, 0.58, a, 0.014, 0))

export const BURBOT: DemoScheme = {
  name: 'Burbot under the lamp',
  fish: 'Burbot',
  blank: 'Jerk 130',
  iris: [50, 8, 26],
  notes: ['Sponge in three rounds', 'Amber glaze, broken bars'],
  added: ['Amber glaze', 'Broken bars'],
  stack: [
    coat('White ground', 'Opaque white', 2.5, { heat: true }),
    coat('Cream', 'Cream', 2),
    coat('Ochre flank', 'Ochre', 0.9, { gun: [60, 0.95] }),
    coat('Olive over the ochre', 'Olive green', 1, { gun: [50, 0.9] }),
    coat('Gold pearl, upper flank', 'Old gold pearl', 1, { gun: [55, 0.8] }),
    coat('Sponge 1, umber, large', 'Umber', 1.8, { gun: [60, 1.1], tool: { kind: 'sponge' }, marks: [{ kind: 'torn sponge', seed: 4601, size: 9.5, threshold: 0.05, soft: 0.07 }] }),
    coat('Sponge 2, dark, small', 'Smoke', 2, { gun: [55, 1.05], tool: { kind: 'sponge' }, marks: [{ kind: 'torn sponge', seed: 4602, size: 4.2, threshold: 0.12, soft: 0.06 }] }),
    coat('Sponge 3, light flecks', 'Tan', 2, { gun: [70, 1.1], tool: { kind: 'sponge' }, marks: [{ kind: 'torn sponge', seed: 4603, size: 2.6, threshold: 0.3, soft: 0.05 }] }),
    coat('Amber glaze', 'Candy amber', 0.22, { gun: [75, 1] }),
    coat('Smoke back', 'Smoke', 2.2, { gun: [15, 0.8], where: { zones: ['back', 'upper flank'], reach: -3, fade: 12 } }),
    coat('Cream belly', 'Cream', 2.3, { gun: [165, 0.7], where: { zones: ['belly'], reach: 1.5, fade: 7 } }),
    coat('Broken bars', 'Smoke', 1.6, { gun: [60, 1.2], marks: BARS.map(points => ({ kind: 'outline', points, soft: 1.1, wobble: 1.2, amount: 0.7 })) }),
    coat('Gill shade', 'Umber', 0.9, { gun: [80, 1.3], tool: FINE, marks: [gillLine('jerk-130', 1)] }),
    coat('Pectoral fin, daggers', 'Umber', 1.5, { gun: [90, 2], tool: FINE, marks: [pectoral('jerk-130', 0.6)] }),
    coat('Fin rays, tan, fine line', 'Tan', 1.6, { gun: [90, 2], tool: FINE, marks: [pectoralRays('jerk-130', 0.6)] }),
    EPOXY,
  ],
}
