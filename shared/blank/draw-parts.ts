import type { Eye, Joint, Lip, RingPlace } from './blank-shape'
import type { DrawnEye, DrawnLip, DrawnParts, DrawnPin, DrawnRing, PicturePoint, ViewDirection } from './drawn-parts'
import type { PreparedBlank } from './prepared-blank'
import { contourAt } from './profile'
import { ringRadius } from './ring'
import { placeInSideView, type Side } from './surface-coordinates'
import { projectPoint, turnToView, viewTurn, type View, type ViewTurn } from './view'

export type { DrawnEye, DrawnLip, DrawnParts, DrawnPin, DrawnRing, PicturePoint, ViewDirection } from './drawn-parts'

/** Thickness of the wire of a ring, share of its radius. */
const WIRE = 0.34
/** Eyes turned farther from the viewer than this are left out. */
const EYE_EDGE_ON = 0.06
const radians = (degrees: number) => degrees * Math.PI / 180

interface Scene {
  blank: PreparedBlank
  view: View
  turn: ViewTurn
  at: (x: number, y: number, z: number) => PicturePoint
}

function drawnEye(scene: Scene, eye: Eye, side: Side): DrawnEye | undefined {
  const place = placeInSideView(scene.blank, eye.x, eye.y, side)
  const [nx, ny, nz] = place.normal
  const [tx, ty, tz] = place.toTail
  // Round eyes look forward whatever the meridian does: their long way is the axis, laid into the skin.
  const lean = nx
  const size = Math.sqrt(Math.max(1e-9, 1 - lean * lean))
  const tail: [number, number, number] = size > 0.2
    ? [(1 - lean * nx) / size, -lean * ny / size, -lean * nz / size]
    : [tx, ty, tz]
  const facing = turnToView(scene.turn, nx, ny, nz)
  if (facing[2] < EYE_EDGE_ON) return undefined
  const up: [number, number, number] = [
    side * (ny * tail[2] - nz * tail[1]),
    side * (nz * tail[0] - nx * tail[2]),
    side * (nx * tail[1] - ny * tail[0]),
  ]
  const toTail = turnToView(scene.turn, ...tail)
  const upward = turnToView(scene.turn, ...up)
  const reach = eye.radius * scene.view.scale
  const [a, b, c, d] = [toTail[0] * reach, upward[0] * reach, -toTail[1] * reach, -upward[1] * reach]
  const det = a * d - b * c
  return {
    side, facing, toTail, up: upward, radius: eye.radius,
    centre: scene.at(...place.position),
    inverse: [d / det, -b / det, -c / det, a / det],
  }
}

function drawnLip(scene: Scene, lip: Lip): DrawnLip {
  const angle = radians(lip.angle)
  const tip = [lip.x - lip.length * Math.cos(angle), lip.y - lip.length * Math.sin(angle)] as const
  const facing = turnToView(scene.turn, Math.sin(angle), -Math.cos(angle), 0)
  const across = turnToView(scene.turn, 0, 0, lip.width / 2)
  const through: ViewDirection = [facing[0] * lip.thickness / 2, facing[1] * lip.thickness / 2, 0]
  // Width and thickness both show between the two quarter turns; they add up on the same side.
  const sign = across[0] * through[0] + across[1] * through[1] >= 0 ? 1 : -1
  const { scale } = scene.view
  const offset = [scale * (across[0] + sign * through[0]), -scale * (across[1] + sign * through[1])] as const
  const corner = ([px, py]: PicturePoint, way: 1 | -1): PicturePoint => [px + way * offset[0], py + way * offset[1]]
  const slotAt = scene.at(lip.x, lip.y, 0)
  const tipAt = scene.at(tip[0], tip[1], 0)
  return {
    corners: [corner(slotAt, 1), corner(slotAt, -1), corner(tipAt, -1), corner(tipAt, 1)],
    facing,
    flatness: Math.abs(facing[2]),
    edge: Math.max(0.5, 0.18 * lip.thickness * scale),
    isInFront: turnToView(scene.turn, 0, lip.y, 0)[2] > 0.5 * lip.thickness,
  }
}

function drawnRing(scene: Scene, kind: DrawnRing['kind'], ring: RingPlace): DrawnRing {
  const radius = ringRadius(scene.blank.shape.length)
  const [dx, dy] = [Math.cos(radians(ring.angle)), Math.sin(radians(ring.angle))]
  const [x, y] = [ring.x + radius * dx, ring.y + radius * dy]
  const { scale } = scene.view
  const contour = contourAt(scene.blank.profile, Math.min(scene.blank.shape.length, Math.max(0, x)))
  const depth = turnToView(scene.turn, 0, y - contour.centre, 0)[2]
  return {
    kind,
    centre: scene.at(x, y, 0),
    halfAxes: [radius * scale, radius * scale * Math.abs(scene.turn.cos)],
    wire: WIRE * radius * scale / 2,
    stem: [scene.at(ring.x - radius * dx, ring.y - radius * dy, 0), scene.at(ring.x, ring.y, 0)],
    isInFront: depth > 0.3 * (contour.back - contour.belly) / 2 && depth > 0.5,
  }
}

function drawnPins(scene: Scene, joint: Joint): DrawnPin[] {
  const contour = contourAt(scene.blank.profile, joint.x)
  const half = (contour.back - contour.belly) / 2
  return [half / 2, -half / 2].map((off): DrawnPin => {
    const y = contour.centre + off
    const x = joint.x + y * (joint.lean + joint.bow * y)
    const reach = joint.gap / 2 + 0.3
    return {
      ends: [scene.at(x - reach, y, 0), scene.at(x + reach, y, 0)],
      half: 0.4 * joint.gap * scene.view.scale,
    }
  })
}

/**
 * Eyes, lip, rings and pins as they stand in a view.
 * Order of drawing, from behind: lip, fins, rings, body with its gaps, pins, eyes; then whatever is `isInFront`.
 */
export function drawnParts(blank: PreparedBlank, view: View): DrawnParts {
  const scene: Scene = {
    blank, view, turn: viewTurn(view),
    at: (x, y, z) => projectPoint(view, blank.shape.length, x, y, z),
  }
  const { eye, lip, tie, hangers, joints } = blank.shape
  const eyes = ([1, -1] as const).map(side => drawnEye(scene, eye, side)).filter(one => one !== undefined)
  return {
    eyes,
    lip: lip && drawnLip(scene, lip),
    rings: [drawnRing(scene, 'tie', tie), ...hangers.map(ring => drawnRing(scene, 'hanger', ring))],
    pins: joints.flatMap(joint => drawnPins(scene, joint)),
  }
}
