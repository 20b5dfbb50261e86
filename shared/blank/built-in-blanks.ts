import { BlankShape, type Eye, type Fin, type Gill, type Joint, type Lip, type SidePoint } from './blank-shape'
import { BUILT_IN_NUMBERS } from './built-in-numbers'

/** A built-in body in short: stations and rings as bare numbers. */
export interface BlankNumbers {
  name: string
  label: string
  length: number
  /** s, top, bottom, half width, exponent, egg. */
  stations: readonly (readonly [number, number, number, number, number, number])[]
  gill: Gill
  eye: Eye
  mouth: SidePoint[]
  lip?: Lip
  /** x, y, angle. */
  tie: readonly [number, number, number]
  hangers: readonly (readonly [number, number, number])[]
  joints?: Joint[]
  fins?: Fin[]
}

const ring = ([x, y, angle]: readonly [number, number, number]) => ({ x, y, angle })

function spelledOut(numbers: BlankNumbers): BlankShape {
  return BlankShape.parse({
    ...numbers,
    stations: numbers.stations.map(([s, top, bottom, halfWidth, exponent, egg]) => ({ s, top, bottom, halfWidth, exponent, egg })),
    tie: ring(numbers.tie),
    hangers: numbers.hangers.map(ring),
    joints: numbers.joints ?? [],
    fins: numbers.fins ?? [],
  })
}

/** The bodies every workshop starts with. */
export const BUILT_IN_BLANKS: readonly BlankShape[] = BUILT_IN_NUMBERS.map(spelledOut)

/**
 * A built-in body by its name.
 * @throws RangeError when there is none of that name
 */
export function builtInBlank(name: string): BlankShape {
  const found = BUILT_IN_BLANKS.find(shape => shape.name === name)
  if (!found) throw new RangeError(`there is no built-in blank called ${name}`)
  return found
}
