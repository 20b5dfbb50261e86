// Lays coats as a fraction N/D, all sixteen bands of a sample in registers, and reads the light it sends back.
import { across, both, plus, ROW } from './bands'

/** One coat on the way up: where its codes, its table and its flakes begin. Written by pack-steps.ts in this order. */
@unmanaged
class Step {
  codes: usize
  /** Rows of a level: R, T² - R² and what a ray keeps; a joined coat has four rows and what a ray keeps. */
  table: usize
  /** Codes up to this one change nothing; -1 where even they do. */
  empty: i32
  joined: i32
  /** Flakes: six rows a level of what they mirror, one of what they sent to all sides; 0 without flakes. */
  mirrored: usize
  diffuse: usize
  /** How strongly they mirror at a sample, and where between the six rows. */
  strength: usize
  place: usize
}

const PLAIN_LEVEL: usize = 3 * ROW
const JOINED_LEVEL: usize = 5 * ROW
const FLAKE_ROWS: usize = 6
/** Steps after which N/D is brought back to D = 1: sixty whites over one another would leave the range of the numbers. */
const LONG: i32 = 8

/**
 * @param steps       coats that vary, from the ground up
 * @param state       reflectance under them at every sample, or 0: then `ground` lies under all
 * @param flakes      what flakes under them mirror, or 0 for nothing
 * @param last        what uniform coats on top do: rows a, b of N' = aN + bD, c, d of D' = cN + dD, and what a ray keeps
 * @param weights     three rows: linear red, green and blue
 * @param light       irradiance of every sample
 * @param out         linear light, three a sample; or 0: then the stack goes to `stateOut` and `flakesOut`
 */
export function lay(
  count: i32, steps: usize, stepCount: i32, ground: usize, state: usize, flakes: usize, last: usize,
  weights: usize, light: usize, inside: f32, scale: f32, out: usize, stateOut: usize, flakesOut: usize,
): void {
  const one = f32x4.splat(1)
  const within = f32x4.splat(inside)
  const end = steps + stepCount * offsetof<Step>()
  for (let i: usize = 0; i < <usize>count; i++) {
    const from = state ? state + i * ROW : ground
    let n0 = v128.load(from), n1 = v128.load(from, 16), n2 = v128.load(from, 32), n3 = v128.load(from, 48)
    let d0 = one, d1 = one, d2 = one, d3 = one
    let f0 = f32x4.splat(0), f1 = f0, f2 = f0, f3 = f0
    if (flakes) {
      const kept = flakes + i * ROW
      f0 = v128.load(kept); f1 = v128.load(kept, 16); f2 = v128.load(kept, 32); f3 = v128.load(kept, 48)
    }
    const lit = load<f32>(light + (i << 2))
    let run: i32 = 0
    for (let at = steps; at < end; at += offsetof<Step>()) {
      const step = changetype<Step>(at)
      const code = <i32>load<u8>(step.codes + i)
      if (code <= step.empty) continue
      let t: usize
      if (step.joined) {
        const row = step.table + <usize>code * JOINED_LEVEL
        const m0 = both(v128.load(row), n0, v128.load(row, 64), d0), m1 = both(v128.load(row, 16), n1, v128.load(row, 80), d1)
        const m2 = both(v128.load(row, 32), n2, v128.load(row, 96), d2), m3 = both(v128.load(row, 48), n3, v128.load(row, 112), d3)
        d0 = both(v128.load(row, 128), n0, v128.load(row, 192), d0); d1 = both(v128.load(row, 144), n1, v128.load(row, 208), d1)
        d2 = both(v128.load(row, 160), n2, v128.load(row, 224), d2); d3 = both(v128.load(row, 176), n3, v128.load(row, 240), d3)
        n0 = m0; n1 = m1; n2 = m2; n3 = m3
        t = row + 4 * ROW
      } else {
        const row = step.table + <usize>code * PLAIN_LEVEL
        const r0 = v128.load(row), r1 = v128.load(row, 16), r2 = v128.load(row, 32), r3 = v128.load(row, 48)
        const m0 = both(r0, d0, v128.load(row, 64), n0), m1 = both(r1, d1, v128.load(row, 80), n1)
        const m2 = both(r2, d2, v128.load(row, 96), n2), m3 = both(r3, d3, v128.load(row, 112), n3)
        d0 = f32x4.sub(d0, f32x4.mul(r0, n0)); d1 = f32x4.sub(d1, f32x4.mul(r1, n1))
        d2 = f32x4.sub(d2, f32x4.mul(r2, n2)); d3 = f32x4.sub(d3, f32x4.mul(r3, n3))
        n0 = m0; n1 = m1; n2 = m2; n3 = m3
        t = row + 2 * ROW
      }
      f0 = f32x4.mul(f0, v128.load(t)); f1 = f32x4.mul(f1, v128.load(t, 16))
      f2 = f32x4.mul(f2, v128.load(t, 32)); f3 = f32x4.mul(f3, v128.load(t, 48))
      if (step.mirrored) {
        const place = load<f32>(step.place + (i << 2))
        const lower = Mathf.floor(place)
        const share = f32x4.splat(place - lower)
        const gain = f32x4.splat(load<f32>(step.strength + (i << 2)))
        const less = f32x4.splat(-lit)
        const near = step.mirrored + (<usize>code * FLAKE_ROWS + <usize>lower) * ROW
        const even = step.diffuse + <usize>code * ROW
        let a = v128.load(near)
        f0 = f32x4.add(f0, both(gain, plus(share, f32x4.sub(v128.load(near, 64), a), a), less, v128.load(even)))
        a = v128.load(near, 16)
        f1 = f32x4.add(f1, both(gain, plus(share, f32x4.sub(v128.load(near, 80), a), a), less, v128.load(even, 16)))
        a = v128.load(near, 32)
        f2 = f32x4.add(f2, both(gain, plus(share, f32x4.sub(v128.load(near, 96), a), a), less, v128.load(even, 32)))
        a = v128.load(near, 48)
        f3 = f32x4.add(f3, both(gain, plus(share, f32x4.sub(v128.load(near, 112), a), a), less, v128.load(even, 48)))
      }
      if (++run == LONG) {
        run = 0
        n0 = f32x4.div(n0, d0); n1 = f32x4.div(n1, d1); n2 = f32x4.div(n2, d2); n3 = f32x4.div(n3, d3)
        d0 = one; d1 = one; d2 = one; d3 = one
      }
    }
    const m0 = both(v128.load(last), n0, v128.load(last, 64), d0), m1 = both(v128.load(last, 16), n1, v128.load(last, 80), d1)
    const m2 = both(v128.load(last, 32), n2, v128.load(last, 96), d2), m3 = both(v128.load(last, 48), n3, v128.load(last, 112), d3)
    d0 = both(v128.load(last, 128), n0, v128.load(last, 192), d0); d1 = both(v128.load(last, 144), n1, v128.load(last, 208), d1)
    d2 = both(v128.load(last, 160), n2, v128.load(last, 224), d2); d3 = both(v128.load(last, 176), n3, v128.load(last, 240), d3)
    f0 = f32x4.mul(f0, v128.load(last, 256)); f1 = f32x4.mul(f1, v128.load(last, 272))
    f2 = f32x4.mul(f2, v128.load(last, 288)); f3 = f32x4.mul(f3, v128.load(last, 304))
    if (out) {
      // What is seen of a reflectance N/D through the surface, N/D / (1 - inside·N/D), in one division.
      const by = f32x4.splat(scale * lit)
      const s0 = plus(by, f32x4.div(m0, f32x4.sub(d0, f32x4.mul(within, m0))), f0)
      const s1 = plus(by, f32x4.div(m1, f32x4.sub(d1, f32x4.mul(within, m1))), f1)
      const s2 = plus(by, f32x4.div(m2, f32x4.sub(d2, f32x4.mul(within, m2))), f2)
      const s3 = plus(by, f32x4.div(m3, f32x4.sub(d3, f32x4.mul(within, m3))), f3)
      for (let c: usize = 0; c < 3; c++) {
        const row = weights + c * ROW
        const sum = f32x4.add(both(v128.load(row), s0, v128.load(row, 16), s1), both(v128.load(row, 32), s2, v128.load(row, 48), s3))
        store<f32>(out + (i * 3 + c) * 4, across(sum))
      }
    } else {
      const to = stateOut + i * ROW
      v128.store(to, f32x4.div(m0, d0)); v128.store(to, f32x4.div(m1, d1), 16)
      v128.store(to, f32x4.div(m2, d2), 32); v128.store(to, f32x4.div(m3, d3), 48)
      const kept = flakesOut + i * ROW
      v128.store(kept, f0); v128.store(kept, f1, 16); v128.store(kept, f2, 32); v128.store(kept, f3, 48)
    }
  }
}
