import { SIMD_MODULE } from './simd-module'

/** What the vector engine's module does; pointers are bytes in its memory. See lay.as and glow.as. */
export interface SimdWork {
  lay(
    count: number, steps: number, stepCount: number, ground: number, state: number, flakes: number, last: number,
    weights: number, light: number, inside: number, scale: number, out: number, stateOut: number, flakesOut: number,
  ): void
  glow(
    count: number, layers: number, layerCount: number, glowing: number, glowingCount: number, changed: number, changedCount: number,
    rows: number, room: number, inside: number, out: number,
  ): void
}

const PAGE = 65536
/** Vectors lie on their own width. */
const WIDTH = 16
/** Pointer 0 stands for nothing. */
const START = 64

/** The module, ready to be set up; undefined on a machine without vectors. */
export function simdModule(): WebAssembly.Module | undefined {
  if (typeof WebAssembly === 'undefined') return undefined
  const binary = Uint8Array.from(atob(SIMD_MODULE), char => char.charCodeAt(0))
  return WebAssembly.validate(binary) ? new WebAssembly.Module(binary) : undefined
}

/** A module at work, with its memory. Memory goes with it when nobody holds it any more. */
export class SimdMemory {
  readonly work: SimdWork
  private readonly memory = new WebAssembly.Memory({ initial: 1 })
  private next = START

  constructor(module: WebAssembly.Module) {
    this.work = new WebAssembly.Instance(module, { env: { memory: this.memory } }).exports as unknown as SimdWork // as index.as exports it
  }

  /** Bytes held. */
  get size(): number {
    return this.memory.buffer.byteLength
  }

  /** Room for some bytes; what was there before is still there. @throws {RangeError} when the machine has none left */
  room(bytes: number): number {
    const at = this.next
    this.next = Math.ceil((at + bytes) / WIDTH) * WIDTH
    const missing = this.next - this.memory.buffer.byteLength
    if (missing > 0) this.memory.grow(Math.ceil(missing / PAGE))
    return at
  }

  /** Puts numbers in room of their own. */
  put(values: Float32Array | Uint8Array | Int32Array): number {
    const at = this.room(values.byteLength)
    new Uint8Array(this.memory.buffer, at, values.byteLength).set(new Uint8Array(values.buffer, values.byteOffset, values.byteLength))
    return at
  }

  /** Numbers at a place; to be used before room is asked for again. */
  floats(at: number, length: number): Float32Array {
    return new Float32Array(this.memory.buffer, at, length)
  }

  /** Where the next room begins; giving it back with `giveBack` frees all that was asked for since. */
  mark(): number {
    return this.next
  }

  giveBack(mark: number): void {
    this.next = mark
  }
}
