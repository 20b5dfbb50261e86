import { z } from 'zod'
import { BlankShape, LENGTH_MAX_MM, LENGTH_MIN_MM, type Fin, type Lip } from './blank-shape'
import { bodyMeasures } from './body-measures'
import { builtInBlank } from './built-in-blanks'
import { profileOf } from './profile'

/** What a maker measures with calipers on a blank of their own, and the built-in form it comes nearest to. */
export const BlankDimensions = z.object({
  name: BlankShape.shape.name,
  label: BlankShape.shape.label,
  /** Name of a built-in blank. */
  form: z.string(),
  /** Nose to tail, back to belly and side to side at the fullest, mm, without fins and lip. */
  length: z.number().min(LENGTH_MIN_MM, `a blank is at least ${LENGTH_MIN_MM} mm long`).max(LENGTH_MAX_MM, `a blank is at most ${LENGTH_MAX_MM} mm long`),
  height: z.number().min(3, 'a blank is at least 3 mm high').max(200, 'a blank is at most 200 mm high'),
  width: z.number().min(2, 'a blank is at least 2 mm wide').max(200, 'a blank is at most 200 mm wide'),
  hasLip: z.boolean().default(true),
  hasFins: z.boolean().default(true),
  hasJoints: z.boolean().default(true),
})
export type BlankDimensions = z.output<typeof BlankDimensions>

interface Stretch {
  x: number
  y: number
  z: number
  /** Of things that stay round in the side view. */
  round: number
}

function stretchedLip(lip: Lip, by: Stretch): Lip {
  const angle = lip.angle * Math.PI / 180
  const [dx, dy] = [Math.cos(angle) * by.x, Math.sin(angle) * by.y]
  return {
    x: lip.x * by.x,
    y: lip.y * by.y,
    length: lip.length * Math.hypot(dx, dy),
    angle: Math.atan2(dy, dx) * 180 / Math.PI,
    thickness: Math.min(8, Math.max(0.3, lip.thickness * by.round)),
    width: lip.width * by.z,
  }
}

function stretchedAngle(angle: number, by: Stretch): number {
  const radians = angle * Math.PI / 180
  const turned = Math.atan2(Math.sin(radians) * by.y, Math.cos(radians) * by.x) * 180 / Math.PI
  // Stay on the same turn as the angle came in, so that fans keep their order.
  return turned + 360 * Math.round((angle - turned) / 360)
}

function stretchedFin(fin: Fin, by: Stretch): Fin {
  return {
    ...fin,
    x: fin.x * by.x,
    y: fin.y * by.y,
    outline: fin.outline.map(([x, y]): [number, number] => [x * by.x, y * by.y]),
    ...(fin.rays && {
      rays: {
        count: fin.rays.count,
        originX: fin.rays.originX * by.x,
        originY: fin.rays.originY * by.y,
        fromAngle: stretchedAngle(fin.rays.fromAngle, by),
        toAngle: stretchedAngle(fin.rays.toAngle, by),
      },
    }),
  }
}

/**
 * A blank of a built-in form stretched to measured length, height and width. Fins, lip, joints and wire go along;
 * the eye stays round.
 * @throws RangeError when there is no such form; ZodError when the result is out of the limits of a blank
 */
export function blankFromDimensions(wish: BlankDimensions): BlankShape {
  const form = builtInBlank(wish.form)
  const size = bodyMeasures(profileOf(form))
  const [x, y, z] = [wish.length / size.length, wish.height / size.height, wish.width / size.width]
  const by: Stretch = { x, y, z, round: Math.sqrt(x * y) }
  const ring = (one: BlankShape['tie']) => ({ x: one.x * x, y: one.y * y, angle: stretchedAngle(one.angle, by) })
  return BlankShape.parse({
    name: wish.name,
    label: wish.label,
    length: wish.length,
    stations: form.stations.map(one => ({
      ...one, top: one.top * y, bottom: one.bottom * y, halfWidth: one.halfWidth * z,
    })),
    gill: form.gill,
    eye: { x: form.eye.x * x, y: form.eye.y * y, radius: form.eye.radius * Math.min(x, y) },
    mouth: form.mouth.map(([mx, my]) => [mx * x, my * y]),
    ...(wish.hasLip && form.lip && { lip: stretchedLip(form.lip, by) }),
    tie: ring(form.tie),
    hangers: form.hangers.map(ring),
    joints: wish.hasJoints
      ? form.joints.map(one => ({
          x: one.x * x, lean: one.lean * x / y, bow: one.bow * x / (y * y), gap: one.gap * x, round: one.round * x,
        }))
      : [],
    fins: wish.hasFins ? form.fins.map(fin => stretchedFin(fin, by)) : [],
  })
}
