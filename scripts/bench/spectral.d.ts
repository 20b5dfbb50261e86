declare module 'spectral.js' {
  export class Color {
    constructor(rgb: readonly number[])
    readonly sRGB: readonly number[]
  }
  export function mix(...parts: readonly (readonly [Color, number])[]): Color
}
