/** What was made, freed and handed over on a graphics processor since this was asked for. */
export interface GraphicsCounts {
  /** Textures that stand now. */
  textures: () => number
  /** Layers and pictures handed over since the last call. */
  uploads: () => number
}

/** Counts the calls of a context. */
export function graphicsCounts(gl: WebGL2RenderingContext): GraphicsCounts {
  const standing = new Set<WebGLTexture>()
  let uploads = 0
  const { createTexture, deleteTexture, texSubImage2D, texSubImage3D } = gl
  gl.createTexture = () => {
    const texture = createTexture.call(gl)
    standing.add(texture)
    return texture
  }
  gl.deleteTexture = (texture) => {
    if (texture) standing.delete(texture)
    deleteTexture.call(gl, texture)
  }
  gl.texSubImage2D = ((...all: Parameters<typeof texSubImage2D>) => {
    uploads++
    texSubImage2D.apply(gl, all)
  }) as typeof texSubImage2D
  gl.texSubImage3D = ((...all: Parameters<typeof texSubImage3D>) => {
    uploads++
    texSubImage3D.apply(gl, all)
  }) as typeof texSubImage3D
  return {
    textures: () => standing.size,
    uploads() {
      const since = uploads
      uploads = 0
      return since
    },
  }
}
