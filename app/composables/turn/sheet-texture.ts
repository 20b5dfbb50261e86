import { ClampToEdgeWrapping, DataTexture, HalfFloatType, LinearFilter, LinearMipmapLinearFilter, RepeatWrapping, RGBAFormat } from 'three'
import type { HalfSheet } from '#shared/picture/turn/paint-sheet'

/** Sharpness kept where a surface turns away from the viewer; more costs more than it shows. */
const SLANT = 2

/** How a sheet is read. */
export interface SheetReading {
  /** It goes once round: its last row meets its first. */
  goesRound?: boolean
  /** It is also read from far away: keep smaller copies. */
  shrinks?: boolean
  /** And it is what one looks at: keep it sharp at a slant. */
  staysSharp?: boolean
}

/** A sheet of half floats as a texture. */
export function sheetTexture(data: HalfSheet, width: number, height: number, { goesRound = false, shrinks = false, staysSharp = false }: SheetReading = {}): DataTexture {
  const texture = new DataTexture(data, width, height, RGBAFormat, HalfFloatType)
  texture.wrapS = ClampToEdgeWrapping
  texture.wrapT = goesRound ? RepeatWrapping : ClampToEdgeWrapping
  texture.magFilter = LinearFilter
  texture.minFilter = shrinks ? LinearMipmapLinearFilter : LinearFilter
  texture.generateMipmaps = shrinks
  if (staysSharp) texture.anisotropy = SLANT
  texture.needsUpdate = true
  return texture
}

/** One texel of nothing, for what is not there. */
export function noTexture(): DataTexture {
  return sheetTexture(new Uint16Array(4), 1, 1)
}
