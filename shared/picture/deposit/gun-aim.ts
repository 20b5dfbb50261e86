import type { Gun } from '#shared/scheme/coat'

const STEPS = 720

/** A gun beside a body: what each place of the section catches of its spray. */
export interface Aim {
  /** Direction to the gun on the near side: up, and sideways (mirrored for the far side). */
  up: number
  out: number
  /** 1/2σ² of the spray, per mm². */
  narrow: number
  /** 1 / the most any place round the fattest section catches. */
  gain: number
}

/**
 * The aim of a gun at a body whose fattest section has a mean radius `radius`, mm; both sides are sprayed alike. The best-hit
 * place of that section catches 1, so that passes mean passes there. Null when the gun goes all over.
 */
export function aimOf(gun: Gun, radius: number): Aim | null {
  if (gun.aim === 'all over') return null
  const turn = gun.angle * Math.PI / 180
  const spread = gun.footprint * radius
  const aim: Aim = { up: Math.cos(turn), out: Math.sin(turn), narrow: 1 / (2 * spread * spread), gain: 1 }
  let most = 0
  for (let k = 0; k < STEPS; k++) {
    const at = 2 * Math.PI * k / STEPS
    most = Math.max(most, caught(aim, Math.cos(at), Math.sin(at), radius * Math.cos(at), radius * Math.sin(at)))
  }
  return { ...aim, gain: 1 / most }
}

/**
 * What a place catches of one pass of the gun on both sides: cosine of incidence times the spray's bell, 1 at the best-hit place.
 * (ny, nz) outward normal in the section; (y, z) place in the section from its centre, mm.
 */
export function caught(aim: Aim, ny: number, nz: number, y: number, z: number): number {
  let sum = 0
  const facing = ny * aim.up
  const across = nz * aim.out
  const height = y * aim.out
  const depth = z * aim.up
  if (facing + across > 0) {
    const d = height - depth
    sum += (facing + across) * Math.exp(-d * d * aim.narrow)
  }
  if (facing - across > 0) {
    const d = height + depth
    sum += (facing - across) * Math.exp(-d * d * aim.narrow)
  }
  return sum * aim.gain
}
