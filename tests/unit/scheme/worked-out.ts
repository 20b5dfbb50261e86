import { unitOf, type UnitChoices } from '#shared/quantities/quantities'
import type { Figure } from '#shared/scheme/amounts/figure'

type Token = { kind: 'number', value: number } | { kind: 'sign', sign: string }

function tokens(formula: string, values: ReadonlyMap<string, number>): Token[] {
  const names = [...values.keys()].sort((a, b) => b.length - a.length)
  const found: Token[] = []
  let rest = formula.trim()
  while (rest) {
    const name = names.find(each => rest.startsWith(each))
    const number = /^\d+(?:\.\d+)?/.exec(rest)?.[0]
    if (name !== undefined) found.push({ kind: 'number', value: values.get(name)! })
    else if (number !== undefined) found.push({ kind: 'number', value: Number(number) })
    else if ('+−·/^()'.includes(rest[0]!)) found.push({ kind: 'sign', sign: rest[0]! })
    else throw new Error(`"${formula}" names something that is not among its inputs: ${rest}`)
    rest = rest.slice(name?.length ?? number?.length ?? 1).trim()
  }
  return found
}

const BY_STRENGTH: readonly Readonly<Record<string, (a: number, b: number) => number>>[] = [
  { '+': (a, b) => a + b, '−': (a, b) => a - b },
  { '·': (a, b) => a * b, '/': (a, b) => a / b },
  { '^': (a, b) => a ** b },
]

/** A figure worked out again by somebody who sees only its formula and its inputs, in the units they are shown in; in that unit. */
export function workedOut({ formula, inputs }: Figure, choices: UnitChoices): number {
  const left = tokens(formula.split(',')[0]!, new Map(inputs.map(({ symbol, value, quantity }) => [symbol, unitOf(quantity, choices).fromKept(value)])))
  const isSign = (sign: string) => left[0]?.kind === 'sign' && left[0].sign === sign
  const one = (): number => {
    const token = left.shift()
    if (token?.kind === 'number') return token.value
    const inside = level(0)
    left.shift()
    return inside
  }
  const level = (strength: number): number => {
    const signs = BY_STRENGTH[strength]
    if (!signs) return one()
    let value = level(strength + 1)
    for (let sign = Object.keys(signs).find(isSign); sign !== undefined; sign = Object.keys(signs).find(isSign)) {
      left.shift()
      value = signs[sign]!(value, level(strength + 1))
    }
    return value
  }
  return level(0)
}
