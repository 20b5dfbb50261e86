import type { SchemeBody } from '#shared/scheme/body'
import { type Coat, GIRTH_ZONES, LENGTH_ZONES, type Where, type ZoneName } from '#shared/scheme/coat'
import type { Materials } from '#shared/scheme/materials'
import { coatsOf, rowOfCoat } from '#shared/scheme/stack-order'

/** Where in the stack a coat goes: right above another, or on top of all colour and under the clear. */
export type StackPlace = 'above' | 'top'

/** A zone as the picture names it (upper-flank, fin:dorsal) and as a coat does. */
const BODY_ZONES = new Map<string, ZoneName>([...GIRTH_ZONES, ...LENGTH_ZONES].map(zone => [zone.replaceAll(' ', '-'), zone]))

/** Where a coat lies that is meant for some zones of a picture: body zones meet as on the coat sheet, fins are whole. */
export function whereOf(zones: readonly string[]): Where {
  const body = zones.flatMap(zone => BODY_ZONES.get(zone) ?? [])
  const fins = zones.filter(zone => zone.startsWith('fin:')).map(zone => zone.slice(4))
  return {
    body: body.length > 0 || fins.length === 0, zones: body, reach: 0, edge: 'fades',
    fins: fins.map(fin => ({ fin, root: 1, tip: 1, on: 'whole' as const })),
  }
}

/**
 * The row at which a new coat stands. On top means above the last coat that is no clear, and above the lifts that follow it:
 * no mask keeps paint off there. Without a coat to stand above it goes on top.
 */
export function rowFor(body: Pick<SchemeBody, 'stack'>, materials: Pick<Materials, 'paints'>, place: StackPlace, coatId: string | null): number {
  const { stack } = body
  if (place === 'above' && coatId !== null && rowOfCoat(stack, coatId) >= 0) return rowOfCoat(stack, coatId) + 1
  const colours = coatsOf(stack).filter(coat => !laysClear(coat, materials))
  const last = colours.at(-1)
  let row = last ? rowOfCoat(stack, last.id) + 1 : 0
  while (stack[row]?.act === 'lift') row++
  return row
}

function laysClear({ mix }: Coat, { paints }: Pick<Materials, 'paints'>): boolean {
  return mix.parts.length > 0 && mix.parts.every(({ paintId }) => paints.find(paint => paint.id === paintId)?.kind === 'clear')
}
