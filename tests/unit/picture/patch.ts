import type { DemoPaintName } from '#server/seed/paints'
import { emptyViewSamples } from '#shared/blank/view-sample-lists'
import { labFromXyz, type Lab } from '#shared/optics/colorimetry'
import { groundFromLab } from '#shared/optics/known-film'
import { xyzFromLinearRgb } from '#shared/optics/screen-colour'
import type { SeenLight } from '#shared/optics/seen-light'
import { type Finish, measuredSpectrum } from '#shared/optics/surface'
import type { Coat } from '#shared/optics/stack'
import { PICTURE_LINEAR_WEIGHTS, toPictureBands } from '#shared/optics/to-picture-bands'
import { coatTable } from '#shared/picture/coat-table'
import { bareGround, layCoats } from '#shared/picture/compose'
import { SEEN_DAYLIGHT } from '#shared/picture/engine/seen-daylight'
import { glowLight } from '#shared/picture/glow-light'
import type { LightTables } from '#shared/picture/light-tables'
import { paintLight } from '#shared/picture/paint-light'
import { demoOptics } from '../../fixtures/demo-looks'

/** A primed ground, and coats of the demo shelf's paints or of one of a test's own. */
export const GROUND = groundFromLab([78, 2, 14], 'satin')
export const coats = (...laid: [DemoPaintName | Coat['optics'], number][]): Coat[] =>
  laid.map(([paint, passes]) => ({ optics: typeof paint === 'string' ? demoOptics(paint) : paint, passes }))

/** The coats of a stack where they lie in full, over one sample. */
const onePatch = (stack: readonly Coat[], { surface }: SeenLight = SEEN_DAYLIGHT) =>
  stack.map(({ optics, passes }) => ({ codes: Uint8Array.of(255), table: coatTable(optics, passes, surface) }))

/** Linear light of one flat patch of a stack, as the picture draws it. */
export function patchLight(
  stack: readonly Coat[], tables: LightTables,
  { finish = 'gloss', plain = false, aspecular = 45, normal = [0, 0, 1], ground = GROUND, seen = SEEN_DAYLIGHT }:
  { finish?: Finish, plain?: boolean, aspecular?: number, normal?: [number, number, number], ground?: ArrayLike<number>, seen?: SeenLight } = {},
): [number, number, number] {
  const samples = emptyViewSamples({ roll: 0, nose: 'left', width: 1, height: 1, scale: 1, centreX: 0, centreY: 0 }, 1)
  samples.occlusion.fill(1)
  const laid = onePatch(stack, seen)
  const reflectance = layCoats(laid, bareGround(1, toPictureBands(ground)))
  const direction = Float32Array.from(normal)
  const light = paintLight(
    { samples, normal: direction, glossNormal: direction, sparkle: new Float32Array(1) },
    { reflectance, glow: glowLight(laid, toPictureBands(ground), 1, seen), coats: laid },
    { tables, finish, plain, aspecular, seen },
  )
  return [light[0]!, light[1]!, light[2]!]
}

/** The same as a colour. */
export function patchLab(...ask: Parameters<typeof patchLight>): Lab {
  return labFromXyz(xyzFromLinearRgb(patchLight(...ask)))
}

/** The same for a glossy, evenly lit patch before a screen's limits bend it: for paint that outshines any screen. */
export function untonedLab(stack: readonly Coat[]): Lab {
  const laid = onePatch(stack)
  const seen = measuredSpectrum(layCoats(laid, bareGround(1, toPictureBands(GROUND))), 'gloss')
  const light = glowOfPatch(stack)
  seen.forEach((value, b) => light.forEach((_, c) => light[c]! += PICTURE_LINEAR_WEIGHTS[16 * c + b]! * value))
  return labFromXyz(xyzFromLinearRgb(light))
}

/** Linear light that the coats of a patch give off. */
export function glowOfPatch(stack: readonly Coat[]): [number, number, number] {
  const laid = onePatch(stack)
  const light = glowLight(laid, toPictureBands(GROUND), 1)
  return light ? [light[0]!, light[1]!, light[2]!] : [0, 0, 0]
}
