import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { eyeSeat } from './eye-seat'
import { addCorner, addQuad, finishMesh, meshDraft, type TurnMesh } from './mesh'

const RINGS = 14
const STEPS_ROUND = 48
/** The dome is drawn flatter than its shine tells, and stands in its socket on a collar. Shares of the radius. */
const DOME = { high: 0.5, collar: 0.4 }

/** How steeply the dome of an eye falls at a share q of its radius; and, as DOME draws it, how high it stands there. */
export function domeSlope(q: number): number {
  return 0.85 * q + 0.3 * q ** 6
}

const domeHeight = (q: number) => DOME.high * (0.425 * (1 - q * q) + 0.3 / 7 * (1 - q ** 7))

/** Both fitted eyes: domes on collars. `uv` is the place on the eye sheet: toward the tail, and from the top. */
export function eyeMesh(blank: PreparedBlank): TurnMesh {
  const mesh = meshDraft()
  for (const side of [1, -1] as const) {
    const { middle, facing, toTail, up, radius } = eyeSeat(blank, side)
    const first = mesh.kept.length
    for (let ring = 0; ring <= RINGS + 1; ring++) {
      const isCollar = ring > RINGS
      const q = Math.min(1, ring / RINGS)
      const [lean, height] = isCollar ? [20, -DOME.collar] : [domeSlope(q), domeHeight(q)]
      for (let k = 0; k <= STEPS_ROUND; k++) {
        const angle = 2 * Math.PI * k / STEPS_ROUND
        const [a, b] = [Math.cos(angle), Math.sin(angle)]
        const out = (c: 0 | 1 | 2) => a * toTail[c] + b * up[c]
        const tilt = Math.hypot(1, lean)
        const pick = (c: 0 | 1 | 2) => (facing[c] + lean * out(c)) / tilt
        const at = (c: 0 | 1 | 2) => middle[c] + radius * (q * out(c) + height * facing[c])
        addCorner(mesh, {
          at: [at(0), at(1), at(2)], normal: [pick(0), pick(1), pick(2)],
          uv: [(1 + q * a) / 2, (1 - q * b) / 2],
        })
      }
    }
    const width = STEPS_ROUND + 1
    for (let ring = 0; ring <= RINGS; ring++) {
      for (let k = 0; k < STEPS_ROUND; k++) {
        const a = first + ring * width + k
        if (side > 0) addQuad(mesh, a, a + width, a + width + 1, a + 1)
        else addQuad(mesh, a, a + 1, a + width + 1, a + width)
      }
    }
  }
  return finishMesh(mesh)
}
