import { PICTURE_BAND_WIDTHS } from '#shared/optics/to-picture-bands'
import { BANDS, type CoatTable } from './coat-table'
import type { LaidTable } from './compose'
import { SEEN_DAYLIGHT, type SeenLight } from './engine/seen-daylight'
import type { GlowLevels } from './glow-levels'

/** Light so weak that dividing by it would say nothing. */
const NONE = 1e-12

/** A coat that glows, where it lies at a sample: 16 values each. */
interface GlowingHere {
  /** Where its level begins in its table, and the table. */
  level: number
  table: CoatTable
  /** G/(1 - RG): of a photon that leaves it downwards, how many come back to it from what lies under it, going back and forth. */
  returns: Float64Array
  /** The stack's denominator when it was laid. */
  after: Float64Array
  /** Of a photon at the top of the film, what comes to this coat; and as much of one that leaves it upwards comes to the top. */
  gain: Float64Array
  /** Photons it takes again of one given off onward, and of one given off backward, when they come back from below. */
  onwardAgain: number
  backAgain: number
  /** Photons it takes of light from above and from below. */
  above: number
  below: number
}

/** A place where coats glow. */
interface GlowPlace {
  /** As many as may lie anywhere; the first `count` lie here, from the ground up. */
  coats: GlowingHere[]
  count: number
  /** Reflectance of the whole stack, and one over its denominator. */
  whole: Float64Array
  perLast: Float64Array
  /** Room to work in. */
  top: Float64Array
  bottom: Float64Array
}

/** A glow worked out before, and every coat that has come, gone or changed since: where none of them lies, nothing has. */
export interface LastGlow { light: Float32Array, changed: readonly LaidTable[] }

/**
 * Light that coats give off where irradiance is 1, linear sRGB, three per sample; undefined when none glows.
 *
 * A coat's table says what it gives off by itself. Here it lies over a ground and under coats, of which each takes its part of
 * the light on the way in and on the way out; what is given off can feed another coat, or come back from the surface and feed
 * its own. Through a coat light is dimmed by T/(1 - RG), which over a chain is the product of T times a ratio of denominators.
 *
 * @param ground reflectance under the lowest coat, 16
 * @param seen   the light it is seen by
 * @param last   a glow of the same samples, seen alike, to start from
 * @accuracy on random stacks half within CIEDE2000 0.12 of the promise, 95 in 100 within 0.35; four fluorescents in one place up to 0.8
 */
export function glowLight(
  coats: readonly LaidTable[], ground: ArrayLike<number>, count: number, seen: SeenLight = SEEN_DAYLIGHT, last?: LastGlow,
): Float32Array | undefined {
  const { photons, surface: { outside, inside } } = seen
  const glowing = coats.filter(({ table }) => table.glow)
  const [first] = glowing
  if (!first) return undefined
  const out = last ? last.light.slice() : new Float32Array(3 * count)
  const place = emptyPlace(glowing.length, first.table)
  const entering = new Float64Array(BANDS), risen = new Float64Array(BANDS), again = new Float64Array(BANDS)
  for (let i = 0; i < count; i++) {
    if (last && !liesAt(last.changed, i)) continue
    if (!liesAt(glowing, i)) {
      out.fill(0, 3 * i, 3 * i + 3)
      continue
    }
    findPlace(coats, ground, i, place)
    for (let b = 0; b < BANDS; b++) entering[b] = (1 - outside) * photons[b]! / (1 - inside * place.whole[b]!)
    sendThrough(place, entering, risen)
    for (let b = 0; b < BANDS; b++) entering[b] = inside * risen[b]! / (1 - inside * place.whole[b]!)
    sendThrough(place, entering, again)
    putRisen(risen, again, place.whole, seen, out, 3 * i)
  }
  return out
}

function liesAt(coats: readonly LaidTable[], sample: number): boolean {
  return coats.some(({ codes, table }) => codes[sample]! > table.empty)
}

function emptyPlace(most: number, table: CoatTable): GlowPlace {
  const row = () => new Float64Array(BANDS)
  const coats = Array.from({ length: most }, (): GlowingHere => ({
    level: 0, table, returns: row(), after: row(), gain: row(), onwardAgain: 0, backAgain: 0, above: 0, below: 0,
  }))
  return { coats, count: 0, whole: row(), perLast: row(), top: row(), bottom: row() }
}

/** What lies at a sample: from the ground up for reflectances, then from the top down for what reaches each coat that glows. */
function findPlace(coats: readonly LaidTable[], ground: ArrayLike<number>, sample: number, place: GlowPlace): void {
  const { top: N, bottom: D } = place
  for (let b = 0; b < BANDS; b++) {
    N[b] = ground[b]!
    D[b] = 1
  }
  place.count = 0
  for (const { codes, table } of coats) {
    const code = codes[sample]!
    if (code <= table.empty) continue
    const level = code * BANDS
    if (table.glow) keepUnder(place.coats[place.count++]!, table, level, N)
    layInto(table, level, N, D)
    if (table.glow) findReturns(place.coats[place.count - 1]!, table.glow, D)
  }
  for (let b = 0; b < BANDS; b++) {
    place.whole[b] = N[b]! / D[b]!
    place.perLast[b] = 1 / D[b]!
  }
  const reaching = N.fill(1)
  for (let c = coats.length - 1, left = place.count; left > 0; c--) {
    const { codes, table: { T, glow, empty } } = coats[c]!
    const code = codes[sample]!
    if (code <= empty) continue
    if (glow) {
      const { gain, after } = place.coats[--left]!
      for (let b = 0; b < BANDS; b++) gain[b] = reaching[b]! * after[b]! * place.perLast[b]!
    }
    for (let b = 0; b < BANDS; b++) reaching[b]! *= T[code * BANDS + b]!
  }
}

function layInto({ R, Q }: CoatTable, level: number, N: Float64Array, D: Float64Array): void {
  for (let b = 0; b < BANDS; b++) {
    const n = N[b]!, d = D[b]!, r = R[level + b]!
    N[b] = r * d + Q[level + b]! * n
    D[b] = d - r * n
  }
}

/** Notes a coat that glows before it is laid: `returns` holds the numerator of the ground until the denominator is known. */
function keepUnder(here: GlowingHere, table: CoatTable, level: number, N: Float64Array): void {
  here.table = table
  here.level = level
  here.returns.set(N)
}

function findReturns(here: GlowingHere, { takes, back, onward }: GlowLevels, D: Float64Array): void {
  const { level, returns, after } = here
  let onwardAgain = 0, backAgain = 0
  for (let b = 0; b < BANDS; b++) {
    const d = D[b]!
    const again = returns[b]! / d
    after[b] = d
    returns[b] = again
    onwardAgain += onward[level + b]! * again * takes[level + b]!
    backAgain += back[level + b]! * again * takes[level + b]!
  }
  here.onwardAgain = onwardAgain
  here.backAgain = backAgain
}

/**
 * Photons that rise to the top of the film, per 10 nm, when some enter it from above.
 * First from the top down: what enters, and what higher coats give off; then from the ground up: what lower coats give off.
 */
function sendThrough({ coats, count, top: sinking }: GlowPlace, entering: Float64Array, risen: Float64Array): void {
  // Both are counted as if they came in at, or rose to, the top: on the way they are dimmed by `gain`.
  sinking.set(entering)
  for (let c = count - 1; c >= 0; c--) {
    const here = coats[c]!
    takeSinking(here, sinking)
    if (c > 0) giveDown(here, sinking)
  }
  risen.fill(0)
  for (let c = 0; c < count; c++) {
    const here = coats[c]!
    if (c > 0) takeRising(here, risen)
    giveUp(here, risen)
  }
}

function takeSinking(here: GlowingHere, sinking: Float64Array): void {
  const { level, table: { T, glow }, returns, gain, onwardAgain, backAgain } = here
  const { takes, taking } = glow!
  let above = 0, below = 0
  for (let b = taking.from; b < taking.to; b++) {
    const taken = sinking[b]! * gain[b]! * takes[level + b]!
    above += taken
    below += taken * T[level + b]! * returns[b]!
  }
  here.above = above
  here.below = (below + above * onwardAgain) / (1 - backAgain)
}

function giveDown({ level, table: { T, glow }, gain, above, below }: GlowingHere, sinking: Float64Array): void {
  const { back, onward, giving } = glow!
  for (let b = giving.from; b < giving.to; b++) {
    // Counted at the top as so many that as many would be left below this coat; going back and forth is alike for both.
    const dimmed = gain[b]! * T[level + b]!
    if (dimmed > NONE) sinking[b]! += (above * onward[level + b]! + below * back[level + b]!) / dimmed
  }
}

function takeRising(here: GlowingHere, risen: Float64Array): void {
  const { level, table: { T, glow }, gain, backAgain } = here
  const { takes, taking } = glow!
  let fed = 0
  for (let b = taking.from; b < taking.to; b++) {
    const dimmed = gain[b]! * T[level + b]!
    if (dimmed > NONE) fed += risen[b]! / dimmed * takes[level + b]!
  }
  here.below += fed / (1 - backAgain)
}

function giveUp({ level, table: { T, glow }, returns, gain, above, below }: GlowingHere, risen: Float64Array): void {
  const { back, onward, giving } = glow!
  for (let b = giving.from; b < giving.to; b++) {
    const near = back[level + b]!, far = onward[level + b]!
    const returned = T[level + b]! * returns[b]!
    risen[b]! += (above * near + below * far + (above * far + below * near) * returned) * gain[b]!
  }
}

/** What rose the first time, and all that rises again and again after the surface sent it back, in a falling row. */
function putRisen(
  risen: Float64Array, again: Float64Array, whole: Float64Array, { given, surface: { inside } }: SeenLight, out: Float32Array, at: number,
): void {
  let first = 0, second = 0
  for (let b = 0; b < BANDS; b++) {
    first += PICTURE_BAND_WIDTHS[b]! * risen[b]!
    second += PICTURE_BAND_WIDTHS[b]! * again[b]!
  }
  const row = first > second ? first / (first - second) : 1
  let red = 0, green = 0, blue = 0
  for (let b = 0; b < BANDS; b++) {
    const photons = (risen[b]! + row * again[b]!) * (1 - inside) / (1 - inside * whole[b]!)
    red += given[b]! * photons
    green += given[BANDS + b]! * photons
    blue += given[2 * BANDS + b]! * photons
  }
  out[at] = red
  out[at + 1] = green
  out[at + 2] = blue
}
