import { z } from 'zod'

export const LENGTH_MIN_MM = 20
export const LENGTH_MAX_MM = 400
export const STATIONS_MIN = 5
export const STATIONS_MAX = 25
export const FINS_MAX = 12
export const JOINTS_MAX = 6
export const HANGERS_MAX = 6

const millimetres = (what: string, from: number, to: number) =>
  z.number().min(from, `${what} is at least ${from} mm`).max(to, `${what} is at most ${to} mm`)
const share = (what: string) =>
  z.number().min(0, `${what} is a share between 0 and 1`).max(1, `${what} is a share between 0 and 1`)
const degrees = z.number().min(-360, 'an angle is at least -360°').max(360, 'an angle is at most 360°')
const onBody = z.number().min(-400, 'a place on the blank lies within 400 mm').max(500, 'a place on the blank lies within 500 mm')

/** A place seen from the left side, mm: x from the nose toward the tail, y up. */
export const SidePoint = z.tuple([onBody, onBody])
export type SidePoint = z.output<typeof SidePoint>

/** One cross-section of the body. */
export const Station = z.object({
  /** Share of the length from the nose, 0 to 1. */
  s: share('a station'),
  /** Height of the back above the axis, mm. */
  top: z.number().min(-150).max(150),
  /** Height of the belly above the axis, mm: mostly negative. */
  bottom: z.number().min(-150).max(150),
  /** Half the width at the widest line, mm. */
  halfWidth: millimetres('a half width', 0, 120),
  /** Roundness of the section: 2 is an ellipse, more is boxier. */
  exponent: z.number().min(1.5, 'a section exponent is at least 1.5').max(8, 'a section exponent is at most 8'),
  /** How far the widest line is lifted, as a share of half the height; below ½ the section stays convex. */
  egg: z.number().gt(-0.5, 'egg is more than -0.5').lt(0.5, 'egg is less than 0.5'),
}).refine(station => station.top >= station.bottom, 'the back lies above the belly at every station')
export type Station = z.output<typeof Station>

/** Back edge of the gill cover in surface shares. */
export const Gill = z.object({
  /** Where the edge stands, as a share of the length on the widest line. */
  along: share('the gill edge'),
  /** How far the edge bulges toward the tail, share of the length. */
  bulge: z.number().min(0).max(0.2),
  /** Upper end of the edge, share of the half girth from the back. */
  top: share('the top of the gill edge'),
  /** Lower end of the edge, share of the half girth from the back. */
  bottom: share('the bottom of the gill edge'),
}).refine(gill => gill.top < gill.bottom, 'the gill edge runs from its top down to its bottom')
export type Gill = z.output<typeof Gill>

/** Eye, alike on both sides: centre in the side view and radius, mm. */
export const Eye = z.object({ x: onBody, y: onBody, radius: millimetres('an eye radius', 0.2, 30) })
export type Eye = z.output<typeof Eye>

/** Diving lip: a plate from a slot at (x, y), mm; `angle` degrees below the axis toward the nose. */
export const Lip = z.object({
  x: onBody,
  y: onBody,
  length: millimetres('a lip', 1, 150),
  angle: degrees,
  thickness: millimetres('a lip\'s thickness', 0.3, 8),
  width: millimetres('a lip\'s width', 1, 120),
})
export type Lip = z.output<typeof Lip>

/** A wire ring for line, split ring or hook: its foot, mm, and the way it stands out, degrees (0 tail, 90 up). */
export const RingPlace = z.object({ x: onBody, y: onBody, angle: degrees })
export type RingPlace = z.output<typeof RingPlace>

/** A cut through the body: x = `x` + lean·y + bow·y². */
export const Joint = z.object({
  /** Where the cut crosses the axis, mm from the nose. */
  x: onBody,
  /** mm along the body for each mm of height. */
  lean: z.number().min(-1).max(1),
  /** mm along the body for each mm² of height. */
  bow: z.number().min(-0.05).max(0.05),
  /** Width of the open gap, mm. */
  gap: millimetres('a joint gap', 0.1, 20),
  /** Radius of the rounded edges on both sides, mm. */
  round: millimetres('a joint edge', 0.1, 20),
})
export type Joint = z.output<typeof Joint>

/** How the rays of a fin fan out, from an origin in the fin's own mm, between two angles in degrees (0 tail, 90 up). */
export const Rays = z.object({
  count: z.int().min(0).max(60),
  originX: onBody,
  originY: onBody,
  fromAngle: degrees,
  toAngle: degrees,
})
export type Rays = z.output<typeof Rays>

/** A flat fin in the mid-plane of the body. First and last outline points are sharp and sit inside the body. */
export const Fin = z.object({
  /** Short name, unique on the blank: "dorsal". */
  id: z.string().regex(/^[a-z][a-z0-9-]{0,23}$/, 'a fin\'s id is lower-case letters, digits and dashes'),
  /** Where the fin's own x = 0 stands, mm from the nose. */
  x: onBody,
  /** Height of the fin's own y = 0; only counts when the fin is not measured from the back or belly. */
  y: onBody,
  /** What heights are measured from: the line of the back, the line of the belly, or the point (x, y). */
  measuredFrom: z.enum(['back', 'belly', 'point']),
  /** Outline from root to root, mm. */
  outline: z.array(SidePoint).min(3, 'a fin outline has at least 3 points').max(60, 'a fin outline has at most 60 points'),
  /** Absent on a smooth fin. */
  rays: Rays.optional(),
})
export type Fin = z.output<typeof Fin>

const stationsInOrder = (stations: Station[]) => stations.every((station, i) => i === 0 || station.s > (stations[i - 1]?.s ?? 1))
const isClosed = (station: Station) => station.top === station.bottom && station.halfWidth === 0
const isOpen = (station: Station) => station.top > station.bottom && station.halfWidth > 0

const Stations = z.array(Station)
  .min(STATIONS_MIN, `a blank has at least ${STATIONS_MIN} stations`)
  .max(STATIONS_MAX, `a blank has at most ${STATIONS_MAX} stations`)
  .refine(stations => stations[0]?.s === 0 && stations.at(-1)?.s === 1, 'the first station is at 0 (nose), the last at 1 (tail)')
  .refine(stationsInOrder, 'stations run from nose to tail, each farther than the one before')
  .refine(stations => stations.slice(1, -1).every(isOpen), 'every station between the ends has height and width')
  .refine(
    stations => [stations[0], stations.at(-1)].every(end => end !== undefined && (isClosed(end) || isOpen(end))),
    'an end is either closed (no height and no width) or cut (both)',
  )

/**
 * A lure blank: the body before paint, its fins, lip, eyes and wire. Millimetres and degrees;
 * x from the nose to the tail, y up, z toward the viewer of the left flank.
 */
export const BlankShape = z.object({
  /** Short lasting name: "minnow-90". */
  name: z.string().regex(/^[a-z0-9][a-z0-9-]{0,59}$/, 'a blank\'s name is lower-case letters, digits and dashes'),
  /** What people call it: "Minnow 90". */
  label: z.string().trim().min(1, 'a blank needs a label').max(80, 'a label is at most 80 characters'),
  /** Nose to tail without fins, lip and wire, mm. */
  length: millimetres('a blank', LENGTH_MIN_MM, LENGTH_MAX_MM),
  stations: Stations,
  gill: Gill,
  eye: Eye,
  /** Carved line of the mouth from the nose back. */
  mouth: z.array(SidePoint).min(2, 'a mouth line has at least 2 points').max(12, 'a mouth line has at most 12 points'),
  lip: Lip.optional(),
  /** Where the line is tied on. */
  tie: RingPlace,
  /** Where hooks hang. */
  hangers: z.array(RingPlace).max(HANGERS_MAX, `a blank has at most ${HANGERS_MAX} hangers`),
  joints: z.array(Joint).max(JOINTS_MAX, `a blank has at most ${JOINTS_MAX} joints`),
  fins: z.array(Fin).max(FINS_MAX, `a blank has at most ${FINS_MAX} fins`)
    .refine(fins => new Set(fins.map(fin => fin.id)).size === fins.length, 'every fin has its own id'),
}).superRefine((shape, context) => {
  shape.joints.forEach((joint, i) => {
    if (joint.x <= 0 || joint.x >= shape.length) {
      context.addIssue({ code: 'custom', path: ['joints', i, 'x'], message: 'a joint cuts the body between nose and tail' })
    }
  })
  if (shape.eye.x <= 0 || shape.eye.x >= shape.length) {
    context.addIssue({ code: 'custom', path: ['eye', 'x'], message: 'the eye lies between nose and tail' })
  }
})
export type BlankShape = z.output<typeof BlankShape>
