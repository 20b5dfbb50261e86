import { type Light, LIGHTS, isLight } from '../../shared/optics/lights'
import { type Finish, FINISHES } from '../../shared/optics/surface'

/** Fields of a JSON object, not yet read. */
export type Fields = Record<string, unknown>

/** The question as JSON. */
export function parse(text: string): unknown {
  if (text.trim() === '') throw new RangeError('no question: give one JSON object on standard input')
  try {
    return JSON.parse(text) as unknown
  }
  catch {
    throw new RangeError('the question is not JSON')
  }
}

/** An object's fields. */
export function fields(where: string, value: unknown): Fields {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) throw new RangeError(`${where} must be a JSON object`)
  return { ...value }
}

/** A list. */
export function list(where: string, value: unknown): unknown[] {
  if (!Array.isArray(value)) throw new RangeError(`"${where}" must be a list`)
  return value
}

/** A finite number. */
export function number(where: string, value: unknown): number {
  if (typeof value !== 'number' || !Number.isFinite(value)) throw new RangeError(`"${where}" must be a finite number`)
  return value
}

/** A list of so many finite numbers. */
export function numbers(where: string, value: unknown, count: number): number[] {
  const values = list(where, value)
  if (values.length !== count) throw new RangeError(`"${where}" must hold ${count} numbers, got ${values.length}`)
  return values.map((one, i) => number(`${where}[${i}]`, one))
}

/** Refuses values outside a range. */
export function within(where: string, values: number[], low: number, high: number): void {
  for (const value of values) {
    if (!(value >= low && value <= high)) {
      throw new RangeError(`${where} must be ${high === Number.MAX_VALUE ? `at least ${low}` : `from ${low} to ${high}`}, got ${value}`)
    }
  }
}

/** A light by name; daylight when none is named. */
export function lightOf(value: unknown): Light {
  if (value === undefined) return 'D65'
  if (!isLight(value)) throw new RangeError(`"light" must be one of ${LIGHTS.join(', ')}, got ${JSON.stringify(value)}`)
  return value
}

/** A finish by name. */
export function finishOf(value: unknown): Finish {
  const finish = FINISHES.find(name => name === value)
  if (!finish) throw new RangeError(`"finish" must be one of ${FINISHES.join(', ')}, got ${JSON.stringify(value) ?? 'nothing'}`)
  return finish
}
