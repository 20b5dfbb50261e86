/** Samples lie in rows of this many, since a picture's samples are a list and not a raster. */
export const ROW = 2048

/** Rows that so many samples take. */
export function rowsOf(count: number): number {
  return Math.max(1, Math.ceil(count / ROW))
}

/** How numbers of a sample are stored and handed over. */
export interface SampleFormat {
  internal: GLenum
  format: GLenum
  type: GLenum
  /** Numbers of one sample. */
  each: number
}

/** A texture for so many rows of samples, read one by one. */
export function sampleTexture(gl: WebGL2RenderingContext, { internal }: SampleFormat, rows: number): WebGLTexture {
  const texture = gl.createTexture()
  gl.bindTexture(gl.TEXTURE_2D, texture)
  gl.texStorage2D(gl.TEXTURE_2D, 1, internal, ROW, rows)
  gl.texParameteri(gl.TEXTURE_2D, gl.TEXTURE_MIN_FILTER, gl.NEAREST)
  gl.texParameteri(gl.TEXTURE_2D, gl.TEXTURE_MAG_FILTER, gl.NEAREST)
  return texture
}

/** Hands the numbers of all samples over to the bound texture, or to one layer of it: whole rows first, then what is left. */
export function putSamples(gl: WebGL2RenderingContext, { format, type, each }: SampleFormat, values: Float32Array | Uint8Array, layer?: number): void {
  const count = values.length / each
  const whole = Math.floor(count / ROW)
  if (whole > 0) put(0, ROW, whole, values.subarray(0, whole * ROW * each))
  if (count > whole * ROW) put(whole, count - whole * ROW, 1, values.subarray(whole * ROW * each))

  function put(row: number, width: number, height: number, part: Float32Array | Uint8Array): void {
    if (layer === undefined) gl.texSubImage2D(gl.TEXTURE_2D, 0, 0, row, width, height, format, type, part)
    else gl.texSubImage3D(gl.TEXTURE_2D_ARRAY, 0, 0, row, layer, width, height, 1, format, type, part)
  }
}
