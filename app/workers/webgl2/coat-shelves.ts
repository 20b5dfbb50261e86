import { LEVELS, type CoatTable, type FlakeLevels } from '#shared/picture/coat-table'
import type { FlakeTable, NormalTable } from '#shared/picture/light-tables'
import { layerShelf, type LayerShelf } from './layer-shelf'
import { FILM_COLUMNS, FLAKE_COLUMNS } from './stack-source'

/** Tables on the graphics processor that all views share. */
export interface CoatShelves {
  films: LayerShelf<CoatTable>
  flakes: LayerShelf<FlakeLevels>
  /** Tables by normal: irradiance or matt light alone, or strength and cosine of flakes. */
  lobes: (size: number) => LayerShelf<NormalTable | FlakeTable>
  free: () => void
}

/** Puts up empty shelves. */
export function coatShelves(gl: WebGL2RenderingContext): CoatShelves {
  const put = (layer: number, column: number, width: number, values: Float32Array) =>
    gl.texSubImage3D(gl.TEXTURE_2D_ARRAY, 0, column, 0, layer, width, LEVELS, 1, gl.RGBA, gl.FLOAT, values)
  const films = layerShelf<CoatTable>(gl, {
    format: gl.RGBA32F, width: FILM_COLUMNS.width, height: LEVELS,
    fill({ R, Q, through }, layer) {
      put(layer, FILM_COLUMNS.R, 4, R)
      put(layer, FILM_COLUMNS.Q, 4, Q)
      put(layer, FILM_COLUMNS.through, 4, through)
    },
  })
  const flakes = layerShelf<FlakeLevels>(gl, {
    format: gl.RGBA32F, width: FLAKE_COLUMNS.width, height: LEVELS,
    fill({ diffuse, mirrored }, layer) {
      put(layer, FLAKE_COLUMNS.diffuse, 4, diffuse)
      put(layer, FLAKE_COLUMNS.mirrored, FLAKE_COLUMNS.width - FLAKE_COLUMNS.mirrored, mirrored)
    },
  })
  const lobes = new Map<number, LayerShelf<NormalTable | FlakeTable>>()
  return {
    films, flakes,
    lobes(size) {
      const found = lobes.get(size)
      if (found) return found
      const made = layerShelf<NormalTable | FlakeTable>(gl, {
        format: gl.RG32F, width: size, height: size,
        fill: (table, layer) => gl.texSubImage3D(gl.TEXTURE_2D_ARRAY, 0, 0, 0, layer, size, size, 1, gl.RG, gl.FLOAT, pairsOf(table)),
      })
      lobes.set(size, made)
      return made
    },
    free() {
      for (const shelf of [films, flakes, ...lobes.values()]) shelf.free()
    },
  }
}

function pairsOf(table: NormalTable | FlakeTable): Float32Array {
  const [first, second] = table instanceof Float32Array ? [table, undefined] : [table.strength, table.local]
  const out = new Float32Array(2 * first.length)
  for (let i = 0; i < first.length; i++) {
    out[2 * i] = first[i]!
    out[2 * i + 1] = second ? second[i]! : 0
  }
  return out
}
