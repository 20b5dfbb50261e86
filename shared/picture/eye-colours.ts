import { type Lab, xyzFromLab } from '#shared/optics/colorimetry'
import { linearFromXyz } from '#shared/optics/screen-colour'
import type { SeenLight, SeenWish } from '#shared/optics/seen-light'
import { spectrumFromLab } from '#shared/optics/spectrum-from-colour'
import { toPictureBands } from '#shared/optics/to-picture-bands'
import type { Eyes } from '#shared/scheme/body'

/** Linear light of the parts of a fitted eye against a white of 1, 1, 1. */
export type EyeColours = Record<'iris' | 'pupil' | 'rim', readonly number[]>

/**
 * The colours of fitted eyes as an eye used to the light sees them, which is as in daylight; on the map of a bass's two cones, what
 * the cones take of them.
 */
export function eyeColours({ iris, pupil, rim }: Eyes, wish: Pick<SeenWish, 'eye'>, seen: SeenLight): EyeColours {
  const of = wish.eye === 'bass' ? (lab: Lab) => takenOf(lab, seen) : inDaylight
  return { iris: of(iris), pupil: of(pupil), rim: of(rim) }
}

function inDaylight(lab: Lab): readonly number[] {
  return linearFromXyz(xyzFromLab(lab)).map(value => Math.max(0, value))
}

/** A calm spectrum of the colour: what eyes are made of is told by no other. */
function takenOf(lab: Lab, { reflected, white }: SeenLight): readonly number[] {
  const bands = toPictureBands(spectrumFromLab(lab).reflectance)
  return white.map((most, channel) => bands.reduce((sum, R, b) => sum + reflected[16 * channel + b]! * R, 0) / most)
}
