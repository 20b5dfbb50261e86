import { computed, type ComputedRef, type Ref, ref, shallowRef } from 'vue'
import { photoColour, type PhotoColour, type PhotoPixels, readPlace } from '#shared/scheme/find/photo-colour'

/** A place of a photo, in shares of its width and height. */
export interface Spot { x: number, y: number }

/** A photo a colour is read off; it stays on this device. */
export interface UsePhotoColour {
  pixels: Ref<PhotoPixels & { data: Uint8ClampedArray<ArrayBuffer> } | null>
  card: Ref<Spot | null>
  spot: Ref<Spot | null>
  isOpening: Ref<boolean>
  /** Why the photo could not be opened, as a sentence. */
  failed: Ref<string | null>
  /** The colour, once card and place are marked. */
  colour: ComputedRef<PhotoColour | null>
  /** Radius of what is averaged, as a share of the width. */
  radius: number
  open: (file: File) => Promise<void>
}

/** The photo is held no larger than this: a colour needs no more. */
const WIDTH = 1200
/** A file larger than this is not opened, bytes: what a camera makes is far below. */
const FILE_MOST = 60 * 1024 * 1024
/** A picture taller than so many widths is no photo. */
const TALLEST = 4
/** Radius of what is averaged, as a share of the width. */
const RADIUS = 0.012

/** Opens a photo on this device and reads a colour off it, corrected by a grey card. Nothing is sent anywhere. Only in a browser. */
export function usePhotoColour(): UsePhotoColour {
  const pixels = shallowRef<PhotoPixels & { data: Uint8ClampedArray<ArrayBuffer> } | null>(null)
  const card = ref<Spot | null>(null)
  const spot = ref<Spot | null>(null)
  const isOpening = ref(false)
  const failed = ref<string | null>(null)
  let newest = 0

  const at = ({ x, y }: Spot, photo: PhotoPixels) => readPlace(photo, x * photo.width, y * photo.height, RADIUS * photo.width)

  return {
    pixels, card, spot, isOpening, failed, radius: RADIUS,
    colour: computed(() => {
      const photo = pixels.value
      return photo && card.value && spot.value ? photoColour(at(card.value, photo), at(spot.value, photo)) : null
    }),
    async open(file) {
      const mine = ++newest
      isOpening.value = true
      failed.value = null
      try {
        const opened = await smallPixels(file)
        if (mine !== newest) return
        pixels.value = opened
        card.value = spot.value = null
      }
      catch (error) {
        if (mine === newest) failed.value = error instanceof RangeError ? error.message : 'This file could not be opened as a photo. Choose a JPEG, PNG or WebP, or take it again.'
      }
      finally {
        if (mine === newest) isOpening.value = false
      }
    },
  }
}

async function smallPixels(file: File) {
  if (file.size === 0) throw new RangeError('This file is empty. Choose another photo.')
  if (file.size > FILE_MOST) throw new RangeError('This file is larger than any camera\'s photo. Choose a smaller one.')
  // The browser shrinks while it decodes, so that a huge picture never stands in memory whole as pixels of ours.
  const bitmap = await createImageBitmap(file, { resizeWidth: WIDTH, resizeQuality: 'medium', imageOrientation: 'from-image', colorSpaceConversion: 'default' })
  try {
    const { width, height } = bitmap
    if (height > TALLEST * width) throw new RangeError('This picture is far taller than wide. Choose an ordinary photo.')
    const canvas = document.createElement('canvas')
    canvas.width = width
    canvas.height = height
    const pen = canvas.getContext('2d', { willReadFrequently: true, colorSpace: 'srgb' })
    if (!pen) throw new Error('no canvas')
    pen.drawImage(bitmap, 0, 0)
    const { data } = pen.getImageData(0, 0, width, height)
    return { width, height, data: new Uint8ClampedArray(data) }
  }
  finally {
    bitmap.close()
  }
}
