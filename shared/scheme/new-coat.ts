import type { Coat, Tool } from './coat'
import type { PaintKind } from '#shared/shelf/paint'
import type { PaintSnapshot } from './materials'

/** Drops of paint a new coat's cup starts with: enough that reducer per 100 parts comes out in whole drops. */
const NEW_DROPS = 20

/** A new coat's passes by the kind of paint: see-through ones are built up in more. Common practice; test first. */
const PASSES: Readonly<Record<PaintKind, number>> = {
  'sealer': 2, 'primer': 3, 'opaque': 3, 'semi-opaque': 4, 'transparent': 4, 'candy': 4, 'pearl': 3, 'interference': 3, 'metallic': 3, 'fluorescent': 5, 'clear': 1,
}

/** What a paint is usually sprayed with: nozzle mm, pressure bar with air flowing, distance cm. Starting points from common practice; test first. */
export function usualTool(kind: PaintKind): Tool {
  switch (kind) {
    case 'primer':
    case 'sealer':
    case 'pearl':
    case 'interference':
    case 'metallic':
      return { kind: 'airbrush', nozzle: 0.5, pressure: 1.9, distance: 10 }
    case 'opaque':
    case 'semi-opaque':
    case 'fluorescent':
      return { kind: 'airbrush', nozzle: 0.4, pressure: 1.5, distance: 10 }
    case 'transparent':
    case 'candy':
      return { kind: 'airbrush', nozzle: 0.3, pressure: 1.1, distance: 8 }
    case 'clear':
      return { kind: 'brush' }
  }
}

/** A coat as one would lay this paint without thinking: all over, usual thinning, passes, tool and rest. Without a paint its cup is empty. */
export function newCoat(id: string, paint?: Pick<PaintSnapshot, 'id' | 'name' | 'kind' | 'reducerPer100'>, rest = 5): Coat {
  return {
    id,
    name: '',
    mix: paint
      ? { parts: [{ paintId: paint.id, drops: NEW_DROPS }], reducer: Math.round(NEW_DROPS * paint.reducerPer100 / 100) }
      : { parts: [], reducer: 0 },
    tool: usualTool(paint?.kind ?? 'opaque'),
    gun: { aim: 'all over' },
    where: { body: true, zones: [], reach: 0, edge: 'fades', fins: [{ fin: 'all', root: 1, tip: 1, on: 'whole' }] },
    marks: [],
    passes: PASSES[paint?.kind ?? 'opaque'],
    rest,
    heatSet: null,
    note: '',
  }
}
