import { atLength, gillShade } from '../marks'
import { allFins, BRUSH, coat, EPOXY, FINE, type DemoScheme } from '../write-scheme'
import type { Mark } from '#shared/scheme/mark'

const DARK_OLIVE = [['Olive green', 13], ['Opaque black', 1]] as const
const BLANK = 'two-joint-swimmer-180'
const LOWER_FINS = ['anal', 'pelvic']
const reds = (grow: number): Mark => ({
  kind: 'scatter', seed: 4302, count: 26, u: [0.28, 0.9], v: [0.34, 0.64], radius: [atLength(BLANK, 0.55), atLength(BLANK, 0.8)], apart: atLength(BLANK, 6.5), soft: 0.16, grow: atLength(BLANK, grow),
})

export const BROOK_TROUT: DemoScheme = {
  name: 'Brook trout, October',
  fish: 'Brook trout',
  blank: 'Two-joint swimmer 180',
  iris: [56, 14, 40],
  notes: ['Worm tracks and haloes', 'Deeper belly, black line on the fins'],
  added: ['Black under the belly', 'Black line on the lower fins'],
  stack: [
    coat('White ground', 'Opaque white', 3, { where: { fins: allFins() }, heat: true }),
    coat('White pearl all over', 'Fine white pearl', 1.4),
    coat('Candy amber, lower flank', 'Candy amber', 0.8, { gun: [105, 0.75], where: { fins: [{ fin: 'tail', root: 1, tip: 1, on: 'whole' }, { fin: 'dorsal', root: 0.8, tip: 0.8, on: 'whole' }] } }),
    coat('Olive flank', 'Olive green', 1.5, { gun: [70, 0.85], where: { fins: [{ fin: 'dorsal', root: 1, tip: 1, on: 'whole' }, { fin: 'adipose', root: 1, tip: 0.8, on: 'whole' }, { fin: 'tail', root: 1, tip: 1, on: 'whole' }] } }),
    coat('Blue-green over the upper flank', 'Blue-green', 0.75, { gun: [48, 0.75], where: { zones: ['back', 'upper flank'], fade: 16 } }),
    coat('Dark back', DARK_OLIVE, 3, { gun: [26, 0.85], where: { zones: ['back', 'upper flank'], reach: -2, fade: 15, fins: [{ fin: 'dorsal', root: 0.7, tip: 0.3, on: 'rays' }, { fin: 'tail', root: 0.7, tip: 0.5, on: 'whole' }] } }),
    coat('Worm tracks', 'Pale olive', 2.4, {
      gun: [20, 1.2], tool: FINE, where: { zones: ['back', 'upper flank'], reach: -7, fade: 9 },
      marks: [{ kind: 'worm tracks', seed: 4301, wavelength: 3.1, width: 0.62 }], note: 'Fine line, broken: no track longer than the eye is wide.',
    }),
    coat('Pale spots', 'Pale yellow', 2.2, {
      gun: [80, 2], tool: BRUSH, marks: [{ kind: 'scatter', seed: 4303, count: 110, u: [0.25, 0.93], v: [0.2, 0.68], radius: [atLength(BLANK, 0.5), atLength(BLANK, 1.05)], apart: atLength(BLANK, 3.4), soft: 0.2, grow: 0 }],
    }),
    coat('Pale spots on the fins', 'Pale yellow', 1.6, { tool: FINE, where: { body: false, fins: [{ fin: 'tail', root: 0.8, tip: 0.8, on: 'spots' }, { fin: 'dorsal', root: 0.8, tip: 0.8, on: 'spots' }] } }),
    coat('Halo, pale blue', 'Pale blue', 2.2, { gun: [85, 2], tool: BRUSH, marks: [reds(0.62)] }),
    coat('Red spots inside the haloes', 'Signal red', 2.2, { gun: [85, 2], tool: BRUSH, marks: [reds(0)] }),
    coat('Orange belly', 'Candy orange', 3.2, { gun: [150, 0.85], where: { zones: ['lower flank', 'belly'], reach: -6, fade: 10 } }),
    coat('Candy red, low on the belly', 'Candy red', 1.2, { gun: [160, 0.55], where: { zones: ['belly'], reach: -1, fade: 8 } }),
    coat('Black under the belly', 'Opaque black', 1.1, { gun: [178, 0.3], where: { zones: ['belly'], reach: -6, fade: 6 } }),
    coat('Head and gill smoke', DARK_OLIVE, 1.3, { gun: [40, 0.9], where: { zones: ['head', 'back', 'upper flank'], reach: 2, fade: 10 } }),
    coat('Gill shade', 'Smoke', 0.9, { gun: [80, 1.3], tool: FINE, marks: [gillShade(BLANK)] }),
    coat('Orange lower fins', 'Candy orange', 2.4, { where: { body: false, fins: LOWER_FINS.map(fin => ({ fin, root: 1, tip: 1, on: 'whole' })) } }),
    coat('Black line on the lower fins', 'Opaque black', 1.5, { tool: FINE, where: { body: false, fins: LOWER_FINS.map(fin => ({ fin, root: 1, tip: 1, on: 'leading edge', width: 2.2 })) } }),
    coat('White leading edge', 'Opaque white', 4.5, { tool: BRUSH, where: { body: false, fins: LOWER_FINS.map(fin => ({ fin, root: 1, tip: 1, on: 'leading edge', width: 1.2 })) } }),
    EPOXY,
  ],
}
