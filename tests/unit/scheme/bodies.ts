import fc from 'fast-check'
import type { SchemeBody, StackItem } from '#shared/scheme/body'
import { applyEdit, type SchemeEdit } from '#shared/scheme/edits'
import type { Coat } from '#shared/scheme/coat'
import type { Mask } from '#shared/scheme/mask'
import type { PaintSnapshot } from '#shared/scheme/materials'
import { newCoat } from '#shared/scheme/new-coat'
import { newSchemeBody } from '#shared/scheme/new-scheme'

/** A readable id for each number, so that failures can be read. */
export function id(kind: 'coat' | 'mask' | 'paint' | 'blank', n: number): string {
  const letter = { coat: 'c', mask: 'a', paint: 'b', blank: 'd' }[kind]
  return `${letter.repeat(8)}-0000-4000-8000-${String(n).padStart(12, '0')}`
}

export function paint(n: number, more: Partial<PaintSnapshot> = {}): PaintSnapshot {
  return {
    id: id('paint', n), name: `Paint ${n}`, kind: 'opaque', base: 'water', reducerPer100: 25, filmPerPass: 4, volumeSolids: 25, density: 1.1, hazards: [], opticsId: id('paint', n),
    optics: { engineVersion: '1', bands: 36, kind: 'film', K: Array<number>(36).fill(0.1), S: Array<number>(36).fill(0.1), how: 'masstone-hide', clipped: false },
    ...more,
  }
}

export function coat(n: number, more: Partial<Coat> = {}): Coat {
  return { ...newCoat(id('coat', n), paint(1)), ...more }
}

export function mask(n: number, name = `Mask ${n}`): Mask {
  return { id: id('mask', n), name, seed: n, fromMaskId: null, form: { kind: 'mesh', weave: 'hexagon', pitch: 1.6, thread: 0.2, angle: 0, stretch: 1, follow: 0.7, lift: 0.15 } }
}

/** A stack in short: numbers are coats, +1 fits mask 1, -1 lifts it: `stack(1, '+1', 2, '-1', 3)`. */
export function stack(...rows: (number | string)[]): StackItem[] {
  return rows.map((row) => {
    if (typeof row === 'number') return { act: 'coat', coat: coat(row) }
    return { act: row.startsWith('+') ? 'fit' : 'lift', maskId: id('mask', Number(row.slice(1))) }
  })
}

/** A body with that stack and the masks it names. */
export function body(...rows: (number | string)[]): SchemeBody {
  const masks = [...new Set(rows.filter(row => typeof row === 'string').map(row => Number(row.slice(1))))]
  return { ...newSchemeBody(id('blank', 1)), stack: stack(...rows), masks: masks.map(n => mask(n)) }
}

/** A stack back in short. */
export function rows(of: Pick<SchemeBody, 'stack'>): (number | string)[] {
  return of.stack.map(item => item.act === 'coat' ? Number(item.coat.id.slice(-12)) : `${item.act === 'fit' ? '+' : '-'}${Number(item.maskId.slice(-12))}`)
}

const anyCoat = fc.integer({ min: 1, max: 8 }).map(n => id('coat', n))
const anyMask = fc.integer({ min: 1, max: 4 }).map(n => id('mask', n))
const anySpan = fc.record({ firstCoatId: anyCoat, lastCoatId: anyCoat })

/** Any edit a painter might try, possible or not. */
export const anyEdit: fc.Arbitrary<SchemeEdit> = fc.oneof(
  fc.record({ do: fc.constant('add-coat' as const), coat: fc.integer({ min: 1, max: 8 }).map(n => coat(n)), row: fc.integer({ min: -1, max: 12 }) }),
  fc.record({ do: fc.constant('take-out-coat' as const), coatId: anyCoat }),
  fc.record({ do: fc.constant('duplicate-coat' as const), coatId: anyCoat, newId: anyCoat }),
  fc.record({ do: fc.constant('change-coat' as const), coatId: anyCoat, change: fc.record({ name: fc.constantFrom('bars', 'glaze'), rest: fc.integer({ min: 0, max: 60 }) }) }),
  fc.record({ do: fc.constant('set-passes' as const), coatId: anyCoat, passes: fc.integer({ min: 0, max: 31 }) }),
  fc.record({ do: fc.constant('carry-coat' as const), coatId: anyCoat, way: fc.constantFrom('up' as const, 'down' as const) }),
  fc.record({ do: fc.constant('move-item' as const), from: fc.integer({ min: -1, max: 14 }), to: fc.integer({ min: -1, max: 14 }) }),
  fc.record({ do: fc.constant('add-mask' as const), mask: fc.integer({ min: 1, max: 4 }).map(n => mask(n)), over: anySpan }),
  fc.record({ do: fc.constant('change-mask' as const), maskId: anyMask, change: fc.record({ name: fc.constantFrom('Bars', 'Net') }) }),
  fc.record({ do: fc.constant('span-mask' as const), maskId: anyMask, over: anySpan }),
  fc.record({ do: fc.constant('remove-mask' as const), maskId: anyMask }),
  fc.record({ do: fc.constant('set-eyes' as const), eyes: fc.constant(null) }),
  fc.record({ do: fc.constant('answer' as const), key: fc.constantFrom('thick', 'damp', 'dark'), known: fc.boolean() }),
  fc.record({ do: fc.constant('choose-blank' as const), blankId: fc.integer({ min: 1, max: 3 }).map(n => id('blank', n)) }),
)

/** Does edits one after another, leaving out those that are refused. */
export function after(start: SchemeBody, edits: readonly SchemeEdit[]): SchemeBody {
  return edits.reduce((now, edit) => {
    const outcome = applyEdit(now, edit)
    return outcome.ok ? outcome.body : now
  }, start)
}

/** Any body that work on a scheme can lead to. */
export const anyBody: fc.Arbitrary<SchemeBody> = fc.array(anyEdit, { maxLength: 40 }).map(edits => after(body(1, 2, '+1', 3, 4, '-1', 5), edits))

/** The same value, where any change to it throws. */
export function frozen<T>(value: T): T {
  if (typeof value === 'object' && value !== null && !Object.isFrozen(value)) {
    Object.freeze(value)
    Object.values(value).forEach(frozen)
  }
  return value
}
