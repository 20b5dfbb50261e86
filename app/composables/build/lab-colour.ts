import { type Lab, xyzFromLab } from '#shared/optics/colorimetry'
import { hexFromSrgb, screenFromXyz } from '#shared/optics/screen-colour'

/** A CIELAB colour (D65) as a screen shows it, for `fill`. */
export function hexFromLab(lab: Lab): string {
  return hexFromSrgb(screenFromXyz(xyzFromLab(lab)).srgb)
}
