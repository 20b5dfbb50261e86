/** A place in the picture, pixels from the left and from the top. */
export type PicturePoint = readonly [px: number, py: number]
/** A direction in the view frame: X right, Y up, Z toward the viewer. */
export type ViewDirection = readonly [x: number, y: number, z: number]

/**
 * An eye: a domed disc on the flank. A picture point p lies on it where q = |inverse·(p - centre)| ≤ 1;
 * (a, b) = inverse·(p - centre) are its coordinates along `toTail` and `up`.
 * Dome normal: normalise(facing + (.85q + .3q⁶)·(a·toTail + b·up)/q).
 */
export interface DrawnEye {
  side: 1 | -1
  centre: PicturePoint
  /** 2x2, row by row, per pixel: picture offset to unit-disc coordinates. */
  inverse: readonly [number, number, number, number]
  facing: ViewDirection
  toTail: ViewDirection
  up: ViewDirection
  /** mm. */
  radius: number
}

/** A diving lip as a flat plate with four corners in the picture. */
export interface DrawnLip {
  /** Slot, slot, tip, tip, round the outline. On edge these make a bar as thick as the plate. */
  corners: readonly [PicturePoint, PicturePoint, PicturePoint, PicturePoint]
  facing: ViewDirection
  /** 0 on edge, 1 seen flat. */
  flatness: number
  /** Pixels: half the width of the bright edge. */
  edge: number
  /** True when it stands before the body in this view; otherwise the body hides its slot. */
  isInFront: boolean
}

/** A wire ring in the mid-plane of the blank, and its stem. */
export interface DrawnRing {
  /** For the line, or for a hook. */
  kind: 'tie' | 'hanger'
  centre: PicturePoint
  /** Half axes of the wire's centre line, pixels: along the picture's X and Y. */
  halfAxes: readonly [number, number]
  /** Half the thickness of the wire, pixels. */
  wire: number
  /** The stem's two ends, from inside the body out to the foot of the ring. */
  stem: readonly [PicturePoint, PicturePoint]
  /** True when it stands before the body in this view; otherwise the body hides its foot. */
  isInFront: boolean
}

/** A pin across a joint gap, as a bar in the picture. */
export interface DrawnPin {
  ends: readonly [PicturePoint, PicturePoint]
  /** Half its thickness, pixels. */
  half: number
}

/** What is drawn beside the painted samples. */
export interface DrawnParts {
  /** Those that face the viewer. */
  eyes: DrawnEye[]
  lip?: DrawnLip | undefined
  rings: DrawnRing[]
  pins: DrawnPin[]
}
