import { describe, expect, it } from 'vitest'
import { type Lab, type Rgb, xyzFromLab } from '#shared/optics/colorimetry'
import { deltaE2000 } from '#shared/optics/delta-e'
import { encodeChannel, linearFromXyz } from '#shared/optics/screen-colour'
import { GREY_CARD, photoColour, type PhotoPixels, readPlace } from '#shared/scheme/find/photo-colour'

/** A photo of a grey card on the left and a paint on the right, in light of some cast, with the grain of a sensor. */
function photo(paint: Lab, cast: Rgb): PhotoPixels {
  const width = 200, height = 100
  const data = new Uint8ClampedArray(4 * width * height)
  const paintLight = linearFromXyz(xyzFromLab(paint))
  let grain = 1
  for (let i = 0; i < width * height; i++) {
    const light = i % width < 100 ? [GREY_CARD, GREY_CARD, GREY_CARD] : paintLight
    grain = (grain * 16807) % 2147483647
    light.forEach((value, channel) => {
      data[4 * i + channel] = 255 * encodeChannel(Math.max(0, value * cast[channel]! * (1 + 0.06 * (grain / 2147483647 - 0.5))))
    })
    data[4 * i + 3] = 255
  }
  return { width, height, data }
}

const read = (shot: PhotoPixels) => photoColour(readPlace(shot, 50, 50, 14), readPlace(shot, 150, 50, 14))

describe('a colour read off a photo beside a grey card', () => {
  it.each<[string, Rgb]>([['even light', [1, 1, 1]], ['a filament lamp', [1.5, 0.95, 0.5]], ['shade, too dark', [0.38, 0.45, 0.62]]])('is the paint\'s own, whatever the light: %s', (_, cast) => {
    for (const paint of [[52, -8, 24], [38, 24, 30], [60, -20, -18]] as Lab[]) {
      const colour = read(photo(paint, cast))
      expect(colour.ok && deltaE2000(colour.lab, paint)).toBeLessThan(1)
    }
  })

  it('averages light and not its codes: a checkered place is as bright as its light', () => {
    const data = Uint8ClampedArray.from({ length: 4 * 64 }, (_, i) => (Math.floor(i / 4) + Math.floor(i / 32)) % 2 === 0 ? 40 : 220)
    const { linear } = readPlace({ width: 8, height: 8, data }, 3.5, 3.5, 20)
    // Half of each: 0.0212 and 0.7157 of light.
    expect(linear[0]).toBeCloseTo(0.3685, 3)
  })

  it('is refused with a sentence where the photo does not hold it', () => {
    const shot = photo([52, -8, 24], [1, 1, 1])
    const burnt = photo([52, -8, 24], [8, 8, 8])
    expect(read(burnt)).toMatchObject({ ok: false, because: expect.stringContaining('burnt out') as string })
    expect(photoColour({ linear: [0.004, 0.004, 0.004], clipped: 0 }, readPlace(shot, 150, 50, 9))).toMatchObject({ ok: false, because: expect.stringContaining('too dark') as string })
    expect(photoColour({ linear: [0.02, 0.02, 0.02], clipped: 0 }, { linear: [0.9, 0.9, 0.9], clipped: 0 })).toMatchObject({ ok: false, because: expect.stringContaining('same light') as string })
    expect(photoColour(readPlace(shot, 50, 50, 9), readPlace(shot, 900, 50, 9)).ok).toBe(false)
  })
})
