import type { PictureOptions } from './picture-options'

/** The four sides of a blank, each as it is held up to be looked at: flanks and belly upright, the back toward the viewer. */
export const PICTURE_SIDES = {
  'left flank': { roll: 0, nose: 'left' },
  'right flank': { roll: 180, nose: 'right' },
  'back': { roll: 90, nose: 'left' },
  'belly': { roll: 270, nose: 'left' },
} as const satisfies Record<string, Pick<PictureOptions, 'roll' | 'nose'>>

export type PictureSide = keyof typeof PICTURE_SIDES

/** The side that a turn shows upright; undefined between two sides, and for a flank that lies on its back. */
export function sideShown({ roll, nose }: Pick<PictureOptions, 'roll' | 'nose'>): PictureSide | undefined {
  const turned = ((roll % 360) + 360) % 360
  return (Object.keys(PICTURE_SIDES) as PictureSide[]).find(side => PICTURE_SIDES[side].roll === turned && PICTURE_SIDES[side].nose === nose)
}
