import { LEVELS, type CoatTable, type FlakeLevels } from '#shared/picture/coat-table'
import type { GlowLevels } from '#shared/picture/glow-levels'
import { GLOW_COLUMNS } from './glow-source'
import { layerShelf, type LayerShelf } from './layer-shelf'
import { FILM_COLUMNS, FLAKE_COLUMNS } from './stack-source'

/** Tables of coats on the graphics processor; all views share them. */
export interface CoatShelves {
  films: LayerShelf<CoatTable>
  flakes: LayerShelf<FlakeLevels>
  glows: LayerShelf<GlowLevels>
}

/** Puts up empty shelves. */
export function coatShelves(gl: WebGL2RenderingContext): CoatShelves {
  const put = (layer: number, column: number, width: number, values: Float32Array) =>
    gl.texSubImage3D(gl.TEXTURE_2D_ARRAY, 0, column, 0, layer, width, LEVELS, 1, gl.RGBA, gl.FLOAT, values)
  return {
    films: layerShelf(gl, {
      format: gl.RGBA32F, width: FILM_COLUMNS.width, height: LEVELS, least: 32,
      fill({ R, Q, through, T }, layer) {
        put(layer, FILM_COLUMNS.R, 4, R)
        put(layer, FILM_COLUMNS.Q, 4, Q)
        put(layer, FILM_COLUMNS.through, 4, through)
        put(layer, FILM_COLUMNS.T, 4, T)
      },
    }),
    flakes: layerShelf(gl, {
      format: gl.RGBA32F, width: FLAKE_COLUMNS.width, height: LEVELS, least: 8,
      fill({ diffuse, mirrored }, layer) {
        put(layer, FLAKE_COLUMNS.diffuse, 4, diffuse)
        put(layer, FLAKE_COLUMNS.mirrored, FLAKE_COLUMNS.width - FLAKE_COLUMNS.mirrored, mirrored)
      },
    }),
    glows: layerShelf(gl, {
      format: gl.RGBA32F, width: GLOW_COLUMNS.width, height: LEVELS, least: 8,
      fill({ takes, back, onward }, layer) {
        put(layer, GLOW_COLUMNS.takes, 4, takes)
        put(layer, GLOW_COLUMNS.back, 4, back)
        put(layer, GLOW_COLUMNS.onward, 4, onward)
      },
    }),
  }
}
