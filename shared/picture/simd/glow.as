// What coats give off at a sample: each takes light on the way down, gives off its own, and feeds the others. See glow-light.ts.
import { across, both, plus, ROW } from './bands'

/** A coat as glow meets it. Written by pack-glow.ts in this order. */
@unmanaged
class Layer {
  codes: usize
  /** Rows of a level: R and T. */
  table: usize
  empty: i32
  /** Rows of a level: photons taken, given back, given onward; 0 for a coat that gives off nothing. */
  glow: usize
}

/** A coat that lies at a sample. */
@unmanaged
class Place {
  glow: usize
  /** The T of its level. */
  through: usize
  onwardAgain: f32
  backAgain: f32
  above: f32
  below: f32
}

const TABLE_LEVEL: usize = 2 * ROW
const GLOW_LEVEL: usize = 3 * ROW
/** After a place: of a photon from above what leaves it below; what comes back from under it; what comes to it from the top. */
const DIM: usize = 64
const RETURNS: usize = DIM + ROW
const GAIN: usize = RETURNS + ROW
const PLACE: usize = GAIN + ROW
/** Bands a coat is dimmed in by more than this say nothing. */
const NONE: f32 = 1e-12

function liesAt(layers: usize, count: i32, i: usize): bool {
  const end = layers + count * offsetof<Layer>()
  for (let at = layers; at < end; at += offsetof<Layer>()) {
    const layer = changetype<Layer>(at)
    if (<i32>load<u8>(layer.codes + i) > layer.empty) return true
  }
  return false
}

/** Notes what lies at a sample from the lowest coat that glows up, and writes the reflectance of all to `whole`. @returns places */
function findPlaces(layers: usize, count: i32, i: usize, ground: usize, places: usize, whole: usize): i32 {
  const one = f32x4.splat(1)
  memory.copy(whole, ground, ROW)
  const end = layers + count * offsetof<Layer>()
  let found: i32 = 0
  for (let at = layers; at < end; at += offsetof<Layer>()) {
    const layer = changetype<Layer>(at)
    const code = <i32>load<u8>(layer.codes + i)
    if (code <= layer.empty) continue
    const row = layer.table + <usize>code * TABLE_LEVEL
    const isNoted = layer.glow != 0 || found > 0
    const at0 = places + <usize>found * PLACE
    const glow = layer.glow ? layer.glow + <usize>code * GLOW_LEVEL : 0
    let onward = f32x4.splat(0), back = onward
    for (let b: usize = 0; b < ROW; b += 16) {
      const R = v128.load(row + b), T = v128.load(row + b, 64), G = v128.load(whole + b)
      const bounce = f32x4.div(one, f32x4.sub(one, f32x4.mul(R, G)))
      const dim = f32x4.mul(T, bounce)
      v128.store(whole + b, plus(f32x4.mul(T, G), dim, R))
      if (!isNoted) continue
      v128.store(at0 + DIM + b, dim)
      if (!glow) continue
      const again = f32x4.mul(G, bounce)
      v128.store(at0 + RETURNS + b, again)
      const taken = f32x4.mul(again, v128.load(glow + b))
      back = plus(taken, v128.load(glow + b, 64), back)
      onward = plus(taken, v128.load(glow + b, 128), onward)
    }
    if (!isNoted) continue
    const place = changetype<Place>(at0)
    place.glow = glow
    place.through = row + ROW
    place.onwardAgain = across(onward)
    place.backAgain = across(back)
    found++
  }
  return found
}

/** From the top down: what comes to each place that glows. */
function findGains(places: usize, count: i32): void {
  let g0 = f32x4.splat(1), g1 = g0, g2 = g0, g3 = g0
  for (let at = places + <usize>count * PLACE; at > places;) {
    at -= PLACE
    if (changetype<Place>(at).glow) {
      v128.store(at, g0, GAIN); v128.store(at, g1, GAIN + 16); v128.store(at, g2, GAIN + 32); v128.store(at, g3, GAIN + 48)
    }
    g0 = f32x4.mul(g0, v128.load(at, DIM)); g1 = f32x4.mul(g1, v128.load(at, DIM + 16))
    g2 = f32x4.mul(g2, v128.load(at, DIM + 32)); g3 = f32x4.mul(g3, v128.load(at, DIM + 48))
  }
}

/** Counts light as it is at the top; where next to none of it would be left down here, there is none. */
// @ts-ignore: decorator
@inline
function countedAtTop(light: v128, dimmed: v128): v128 {
  return v128.and(f32x4.div(light, dimmed), f32x4.gt(dimmed, f32x4.splat(NONE)))
}

/** Photons that rise to the top for some that enter there: first from the top down, then from the ground up. */
function sendThrough(places: usize, count: i32, sinking: usize, risen: usize): void {
  for (let at = places + <usize>count * PLACE; at > places;) {
    at -= PLACE
    const place = changetype<Place>(at)
    const glow = place.glow
    if (!glow) continue
    let above = f32x4.splat(0), below = above
    for (let b: usize = 0; b < ROW; b += 16) {
      const taken = f32x4.mul(f32x4.mul(v128.load(sinking + b), v128.load(at + b, GAIN)), v128.load(glow + b))
      above = f32x4.add(above, taken)
      below = plus(taken, f32x4.mul(v128.load(place.through + b), v128.load(at + b, RETURNS)), below)
    }
    place.above = across(above)
    place.below = (across(below) + place.above * place.onwardAgain) / (1 - place.backAgain)
    if (at == places) continue
    const up = f32x4.splat(place.above), down = f32x4.splat(place.below)
    for (let b: usize = 0; b < ROW; b += 16) {
      const given = both(up, v128.load(glow + b, 128), down, v128.load(glow + b, 64))
      const dimmed = f32x4.mul(v128.load(at + b, GAIN), v128.load(place.through + b))
      v128.store(sinking + b, f32x4.add(v128.load(sinking + b), countedAtTop(given, dimmed)))
    }
  }
  memory.fill(risen, 0, ROW)
  const end = places + <usize>count * PLACE
  for (let at = places; at < end; at += PLACE) {
    const place = changetype<Place>(at)
    const glow = place.glow
    if (!glow) continue
    if (at > places) {
      let fed = f32x4.splat(0)
      for (let b: usize = 0; b < ROW; b += 16) {
        const dimmed = f32x4.mul(v128.load(at + b, GAIN), v128.load(place.through + b))
        fed = plus(countedAtTop(v128.load(risen + b), dimmed), v128.load(glow + b), fed)
      }
      place.below += across(fed) / (1 - place.backAgain)
    }
    const up = f32x4.splat(place.above), down = f32x4.splat(place.below)
    for (let b: usize = 0; b < ROW; b += 16) {
      const near = v128.load(glow + b, 64), far = v128.load(glow + b, 128)
      const returned = f32x4.mul(v128.load(place.through + b), v128.load(at + b, RETURNS))
      const given = plus(both(up, far, down, near), returned, both(up, near, down, far))
      v128.store(risen + b, plus(given, v128.load(at + b, GAIN), v128.load(risen + b)))
    }
  }
}

/**
 * @param layers   all coats from the ground up; `glowing` those of them that glow
 * @param changed  coats that came, went or changed since `out` was worked out; changedCount -1: all of it is worked out
 * @param rows     seven rows: photons that cross the surface downwards, widths of the bands, linear red, green and blue of a photon
 *                 that leaves, reflectance of the ground, and one that is free
 * @param room     places, and three rows before them
 * @param out      linear light, three a sample
 */
export function glow(
  count: i32, layers: usize, layerCount: i32, glowing: usize, glowingCount: i32, changed: usize, changedCount: i32,
  rows: usize, room: usize, inside: f32, out: usize,
): void {
  const one = f32x4.splat(1), within = f32x4.splat(inside), outward = f32x4.splat(1 - inside)
  const whole = room, sinking = room + ROW, risen = room + 2 * ROW, again = room + 3 * ROW, places = room + 4 * ROW
  const widths = rows + ROW, ground = rows + 5 * ROW
  for (let i: usize = 0; i < <usize>count; i++) {
    if (changedCount >= 0 && !liesAt(changed, changedCount, i)) continue
    const to = out + i * 12
    if (!liesAt(glowing, glowingCount, i)) {
      memory.fill(to, 0, 12)
      continue
    }
    const found = findPlaces(layers, layerCount, i, ground, places, whole)
    findGains(places, found)
    for (let b: usize = 0; b < ROW; b += 16) {
      v128.store(sinking + b, f32x4.div(v128.load(rows + b), f32x4.sub(one, f32x4.mul(within, v128.load(whole + b)))))
    }
    sendThrough(places, found, sinking, risen)
    for (let b: usize = 0; b < ROW; b += 16) {
      v128.store(sinking + b, f32x4.div(f32x4.mul(within, v128.load(risen + b)), f32x4.sub(one, f32x4.mul(within, v128.load(whole + b)))))
    }
    sendThrough(places, found, sinking, again)
    // What rose the first time, and all that rises again and again after the surface sent it back, in a falling row.
    let firstSum = f32x4.splat(0), secondSum = firstSum
    for (let b: usize = 0; b < ROW; b += 16) {
      firstSum = plus(v128.load(widths + b), v128.load(risen + b), firstSum)
      secondSum = plus(v128.load(widths + b), v128.load(again + b), secondSum)
    }
    const first = across(firstSum), second = across(secondSum)
    const row = f32x4.splat(first > second ? first / (first - second) : 1)
    let red = f32x4.splat(0), green = red, blue = red
    for (let b: usize = 0; b < ROW; b += 16) {
      const all = plus(row, v128.load(again + b), v128.load(risen + b))
      const photons = f32x4.div(f32x4.mul(all, outward), f32x4.sub(one, f32x4.mul(within, v128.load(whole + b))))
      red = plus(photons, v128.load(rows + 2 * ROW + b), red)
      green = plus(photons, v128.load(rows + 3 * ROW + b), green)
      blue = plus(photons, v128.load(rows + 4 * ROW + b), blue)
    }
    store<f32>(to, across(red))
    store<f32>(to, across(green), 4)
    store<f32>(to, across(blue), 8)
  }
}
