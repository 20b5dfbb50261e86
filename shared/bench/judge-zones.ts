import type { ZoneJudged, ZoneMeasure } from './run-measure'
import { distanceWords } from '#shared/optics/colour-words'
import { deltaE2000 } from '#shared/optics/delta-e'

/** What is said beside every figure that comes out of a photo. */
export const PHOTO_IS_A_GUIDE = 'A photo is only a guide: camera, lamp and gloss move its colours. Judge the piece itself beside the sample, under the same lamp.'

/** What is said beside paint that no photo shows rightly. */
export const EFFECT_IS_NOT_JUDGED = 'pearl, candy or glow here: not to be judged from a photo'

/** Zones of a piece against what was promised and against the sample's, CIEDE2000. Where paint depends on the angle, no word judges it. */
export function judgeZones(zones: readonly ZoneMeasure[], sample: readonly ZoneMeasure[]): ZoneJudged[] {
  return zones.map((zone) => {
    const held = sample.find(each => each.zone === zone.zone)?.measured ?? null
    const toPredicted = zone.predicted && deltaE2000(zone.measured, zone.predicted)
    const toSample = held && deltaE2000(zone.measured, held)
    const distance = toSample ?? toPredicted
    return { ...zone, sample: held, toPredicted, toSample, words: zone.isEffect ? EFFECT_IS_NOT_JUDGED : distance === null ? 'nothing to hold it against' : distanceWords(distance) }
  })
}
