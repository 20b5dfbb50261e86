import { TILT_MAX, TILT_MIN } from './option-defaults'
import type { PictureLight } from './picture-options'

const DEGREE = Math.PI / 180

/** A lit strip of the tent: degrees of elevation above the view axis and of azimuth toward the tail. */
export interface Strip {
  elevation: number
  azimuth: number
  halfHeight: number
  halfWidth: number
  edge: number
  radiance: number
}

/** A tent of cloth round the bench with its lamps; radiances are relative until the gain is set. */
export interface LightRig {
  /** The cloth's own radiance overhead, at the horizon and from the floor. */
  overhead: number
  horizon: number
  floor: number
  strips: readonly Strip[]
  /** Light that is left where the camera looks in, as a share of the cloth round it. */
  hole: number
}

/**
 * Centre, radius and softness of the open front the camera looks through, degrees; and the light it leaves. A flank that faces the
 * viewer mirrors it: the room is dark there, so its colours stay deep. Radius and softness together stay below 25.8°.
 */
export const HOLE = { elevation: 8, radius: 17, edge: 8, left: 0.25 }

// Light from behind is a breath along the back: a second hard line beside the key's would look ruled.
const RIM = { elevation: 108, azimuth: 0, halfHeight: 6, halfWidth: 40, edge: 6 }
const CARD: Strip = { elevation: -40, azimuth: 0, halfHeight: 11, halfWidth: 60, edge: 11, radiance: 0.55 }
/** A lamp behind cloth is seen with a soft glow round it, at this share of its radiance. Chosen by eye. */
const GLOW = { halfHeight: 12, edge: 10, share: 0.055 }
/**
 * The lit cloth is brightest before the tube itself: share of the key's radiance that lies in this core, how much smaller it is
 * across and along, and how far above the middle it hangs, as a share of the key's own height. Chosen by eye.
 */
const CORE = { share: 0.5, across: 0.4, along: 0.8, edge: 1.3, up: 0.18 }

interface Setting { overhead: number, horizon: number, floor: number, key: Strip, glow: number, rim: number, card: number }

// Narrow and bright looks like epoxy; twice as high and half as bright looked like a drawing.
const BENCH: Setting = {
  overhead: 0.36, horizon: 0.26, floor: 0.62, glow: 1, rim: 3.4, card: 1,
  key: { elevation: 47, azimuth: -8, halfHeight: 3.4, halfWidth: 50, edge: 1.7, radiance: 19 },
}
const FACE: Setting = {
  overhead: 0.20, horizon: 0.15, floor: 0.30, glow: 0, rim: 2.4, card: 0,
  key: { elevation: 20, azimuth: -8, halfHeight: 5, halfWidth: 40, edge: 1.7, radiance: 15 },
}
const FLOP: Setting = {
  overhead: 0.13, horizon: 0.10, floor: 0.10, glow: 0, rim: 2.4, card: 0,
  key: { elevation: 34, azimuth: 70, halfHeight: 40, halfWidth: 6.5, edge: 1.7, radiance: 17 },
}
/** The tilt at which the arc passes the bench lamp, degrees. */
const BENCH_TILT = 45
/** A pearl's face is read between the two angles nearest its gloss, 15° and 25°. */
const FACE_ANGLE = 20

/** The tent for a light: one of the three settings, or a lamp anywhere on the arc from face to flop. */
export function lightRig(light: PictureLight): LightRig {
  switch (light) {
    case 'bench': return rigOf(BENCH)
    case 'face': return rigOf(FACE)
    case 'flop': return rigOf(FLOP)
    default: return rigOf(settingAt(light.tilt))
  }
}

/** Names a light for caches. */
export function lightKey(light: PictureLight): string {
  return typeof light === 'string' ? light : `tilt-${light.tilt}`
}

/** Angle from the gloss at which a light shows flakes on a flank that faces the viewer, degrees. */
export function aspecularOf(light: PictureLight): number {
  if (typeof light === 'object') return light.tilt
  return light === 'bench' ? BENCH_TILT : light === 'face' ? FACE_ANGLE : TILT_MAX
}

function settingAt(tilt: number): Setting {
  const at = Math.min(TILT_MAX, Math.max(TILT_MIN, tilt))
  if (at <= BENCH_TILT) {
    const face = { ...FACE, key: { ...FACE.key, elevation: TILT_MIN + 2 } }
    return between(face, BENCH, (at - TILT_MIN) / (BENCH_TILT - TILT_MIN))
  }
  return between(BENCH, FLOP, (at - BENCH_TILT) / (TILT_MAX - BENCH_TILT))
}

/** Sizes and radiances are mixed by ratio, so that a strip that turns upright keeps its area. */
function between(a: Setting, b: Setting, share: number): Setting {
  const straight = (from: number, to: number) => from + (to - from) * share
  const ratio = (from: number, to: number) => from * (to / from) ** share
  return {
    overhead: straight(a.overhead, b.overhead),
    horizon: straight(a.horizon, b.horizon),
    floor: straight(a.floor, b.floor),
    glow: straight(a.glow, b.glow),
    rim: straight(a.rim, b.rim),
    card: straight(a.card, b.card),
    key: {
      elevation: straight(a.key.elevation, b.key.elevation),
      azimuth: straight(a.key.azimuth, b.key.azimuth),
      halfHeight: ratio(a.key.halfHeight, b.key.halfHeight),
      halfWidth: ratio(a.key.halfWidth, b.key.halfWidth),
      edge: a.key.edge,
      radiance: ratio(a.key.radiance, b.key.radiance),
    },
  }
}

function rigOf({ overhead, horizon, floor, key, glow, rim, card }: Setting): LightRig {
  const strips = [...keyStrips(key), { ...RIM, radiance: rim }]
  if (glow > 0) strips.push({ ...key, halfHeight: GLOW.halfHeight, edge: GLOW.edge, radiance: GLOW.share * glow * key.radiance })
  if (card > 0) strips.push({ ...CARD, radiance: CARD.radiance * card })
  return { overhead, horizon, floor, strips, hole: HOLE.left }
}

/** The key as it is seen: its cloth, and the brighter core in it. Together they send what the key's radiance says. */
function keyStrips(key: Strip): Strip[] {
  // A strip that turns upright is narrow the other way.
  const lying = key.halfWidth / (key.halfWidth + key.halfHeight)
  const shrunk = (isAcross: number) => CORE.along + (CORE.across - CORE.along) * isAcross
  const [high, wide] = [shrunk(lying), shrunk(1 - lying)]
  const core: Strip = {
    ...key, edge: CORE.edge, halfHeight: key.halfHeight * high, halfWidth: key.halfWidth * wide,
    elevation: key.elevation + CORE.up * key.halfHeight * lying, radiance: CORE.share * key.radiance / (high * wide),
  }
  return [{ ...key, radiance: (1 - CORE.share) * key.radiance }, core]
}

function smooth(from: number, to: number, x: number): number {
  const t = Math.min(1, Math.max(0, (x - from) / (to - from)))
  return t * t * (3 - 2 * t)
}

/** How far inside a strip a direction lies, 0 outside to 1; elevation and azimuth in degrees. */
export function stripShare(strip: Strip, elevation: number, azimuth: number): number {
  let up = Math.abs(elevation - strip.elevation)
  if (up > 180) up = 360 - up
  const along = Math.abs(azimuth - strip.azimuth)
  if (up >= strip.halfHeight + strip.edge || along >= strip.halfWidth + strip.edge) return 0
  return (1 - smooth(strip.halfHeight - strip.edge, strip.halfHeight + strip.edge, up))
    * (1 - smooth(strip.halfWidth - strip.edge, strip.halfWidth + strip.edge, along))
}

/** The cloth's radiance in a direction, without its lamps. */
export function clothRadiance(rig: LightRig, x: number, y: number, z: number): number {
  // Away from the horizon the cloth soon takes the tone of what it hangs over.
  const away = 1 - (1 - Math.abs(y)) ** 2
  const cloth = rig.horizon + ((y >= 0 ? rig.overhead : rig.floor) - rig.horizon) * away
  const toHole = y * Math.sin(HOLE.elevation * DEGREE) + z * Math.cos(HOLE.elevation * DEGREE)
  if (toHole < 0.9) return cloth
  const off = Math.acos(Math.min(1, toHole)) / DEGREE
  return cloth * (rig.hole + (1 - rig.hole) * smooth(HOLE.radius - HOLE.edge, HOLE.radius + HOLE.edge, off))
}

/** Radiance of the tent in a unit direction of the view frame, before the gain. */
export function tentRadiance(rig: LightRig, x: number, y: number, z: number): number {
  const elevation = Math.atan2(y, z) / DEGREE
  const azimuth = Math.asin(Math.min(1, Math.max(-1, x))) / DEGREE
  let light = clothRadiance(rig, x, y, z)
  for (const strip of rig.strips) light += strip.radiance * stripShare(strip, elevation, azimuth)
  return light
}
