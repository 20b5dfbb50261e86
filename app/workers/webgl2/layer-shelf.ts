/** Tables or codes on the graphics processor, one layer of a texture each, known by the object they were made from. */
export interface LayerShelf<Item extends object> {
  texture: () => WebGLTexture
  /**
   * Layers that hold these items all at once; only what is not there yet is handed over.
   *
   * @throws {RangeError} when there are more than a texture has layers
   */
  layersOf: (items: readonly Item[]) => number[]
  free: () => void
}

/** How a shelf makes its texture and fills one layer of it; the texture is bound then. */
export interface ShelfWay<Item> {
  format: GLenum
  width: number
  height: number
  /** Layers it begins with. */
  least: number
  fill: (item: Item, layer: number) => void
}

/** Puts up an empty shelf. When it is full, what was not used for longest makes room. */
export function layerShelf<Item extends object>(gl: WebGL2RenderingContext, { format, width, height, least, fill }: ShelfWay<Item>): LayerShelf<Item> {
  const most = Number(gl.getParameter(gl.MAX_ARRAY_TEXTURE_LAYERS))
  let room = 0
  let texture: WebGLTexture | undefined
  /** Where an item was put, and the number of that putting; it is still there while its layer has the same number. */
  let places = new WeakMap<Item, { layer: number, put: number }>()
  let puts: number[] = [], lastUsed: number[] = []
  let count = 0, now = 0

  function grow(wanted: number): void {
    if (wanted > most) throw new RangeError(`${wanted} layers are more than the ${most} a texture has here`)
    gl.deleteTexture(texture ?? null)
    room = Math.min(most, Math.max(least, 2 ** Math.ceil(Math.log2(1.25 * wanted))))
    texture = gl.createTexture()
    gl.bindTexture(gl.TEXTURE_2D_ARRAY, texture)
    gl.texStorage3D(gl.TEXTURE_2D_ARRAY, 1, format, width, height, room)
    gl.texParameteri(gl.TEXTURE_2D_ARRAY, gl.TEXTURE_MIN_FILTER, gl.NEAREST)
    gl.texParameteri(gl.TEXTURE_2D_ARRAY, gl.TEXTURE_MAG_FILTER, gl.NEAREST)
    places = new WeakMap()
    puts = new Array<number>(room).fill(-1)
    lastUsed = new Array<number>(room).fill(-1)
  }

  function layerOf(item: Item): number | undefined {
    const place = places.get(item)
    return place && puts[place.layer] === place.put ? place.layer : undefined
  }

  return {
    texture() {
      if (!texture) grow(1)
      return texture!
    },
    layersOf(items) {
      now++
      const different = new Set(items)
      if (different.size > room) grow(different.size)
      for (const item of different) {
        const layer = layerOf(item)
        if (layer !== undefined) lastUsed[layer] = now
      }
      for (const item of different) {
        if (layerOf(item) !== undefined) continue
        const layer = lastUsed.indexOf(Math.min(...lastUsed))
        places.set(item, { layer, put: ++count })
        puts[layer] = count
        lastUsed[layer] = now
        gl.bindTexture(gl.TEXTURE_2D_ARRAY, texture!)
        fill(item, layer)
      }
      return items.map(item => layerOf(item)!)
    },
    free() {
      gl.deleteTexture(texture ?? null)
      texture = undefined
      room = 0
    },
  }
}
