import { emptyViewSamples } from '#shared/blank/view-sample-lists'
import { filmOptics } from '#shared/optics/paint-optics'
import { coatTable, LEVELS, type CoatTable } from '#shared/picture/coat-table'
import type { LightAsk } from '#shared/picture/engine/picture-engine'
import { FLAKE_ROWS } from '#shared/picture/engine/sample-light'
import { SEEN_DAYLIGHT } from '#shared/picture/engine/seen-daylight'
import { BANDS } from '#shared/picture/level-table'
import { lightRig } from '#shared/picture/light-rig'
import type { LightTables, NormalTable } from '#shared/picture/light-tables'
import type { SampleForm } from '#shared/picture/paint-light'
import type { ViewKit } from '#shared/picture/view-kit'

/** Samples of the trial across and down: about as many as a picture of a blank on a bench has. */
const WIDTH = 256, HEIGHT = 192
const COUNT = WIDTH * HEIGHT
const COATS = 10
/** Which coats have flakes, which one glows, and which one is changed. */
const FLAKES = 7, GLOWS = 2, CHANGED = 5
/** At least as many as a table by normals has. */
const NORMALS = 64 * 64

/** Part of a ball under ten coats, one with flakes and one that glows, with nothing in it that would take long to work out. */
export interface TrialStack {
  kit: ViewKit
  /** The same stack after the coat in its middle was changed for so many times; every time it is a coat no engine has seen. */
  ask: (change: number) => LightAsk
}

/** Makes the stack of a trial. */
export function trialStack(): TrialStack {
  const form = ball()
  const tables = Array.from({ length: COATS }, (_, c) => {
    const table = film(c, 1.5)
    return c === FLAKES ? withFlakes(table) : c === GLOWS ? withGlow(table) : table
  })
  const codes = tables.map((_, c) => codesOf(c))
  const lighting = { tables: ballLight(), finish: 'gloss', plain: false, aspecular: 45, seen: SEEN_DAYLIGHT } as const
  return {
    // Engines know a view by its kit and look at nothing else of it.
    kit: { samples: form.samples, form, blindForm: form } as ViewKit,
    ask: change => ({
      groundKey: 'trial', ground: new Array<number>(BANDS).fill(0.7), form, lighting,
      coats: tables.map((table, c) => c === CHANGED
        ? { key: `changed ${change}`, table: film(c, 1 + 0.1 * change), codes: codes[c]! }
        : { key: `${c}`, table, codes: codes[c]! }),
    }),
  }
}

/** Deposits that run across the ball, each coat its own way. */
function codesOf(coat: number): Uint8Array {
  return Uint8Array.from({ length: COUNT }, (_, i) => (i % WIDTH * (coat + 1) + Math.floor(i / WIDTH)) % LEVELS)
}

function film(shift: number, passes: number): CoatTable {
  const wave = (place: number, least: number) => Array.from({ length: 36 }, (_, b) => least * (1.2 + Math.sin(place + b / 7)))
  return coatTable(filmOptics(wave(shift, 0.2), wave(shift + 2, 0.15)), passes)
}

/** The film as if half of what it reflects were mirrored, redder at a slant. */
function withFlakes(table: CoatTable): CoatTable {
  const mirrored = Float32Array.from({ length: LEVELS * FLAKE_ROWS * BANDS }, (_, i) => {
    const band = i % BANDS, row = Math.floor(i / BANDS) % FLAKE_ROWS, level = Math.floor(i / BANDS / FLAKE_ROWS)
    return table.R[level * BANDS + band]! * (0.5 + 0.4 * row * band / FLAKE_ROWS / BANDS)
  })
  return { ...table, flake: { sigma: 9, sparkle: 0.1, mirrored, diffuse: table.R.map(R => 0.38 * R) } }
}

/** The film as if it gave off in its redder half a third of what it takes. */
function withGlow(table: CoatTable): CoatTable {
  const given = (share: number) => table.R.map((_, i) => i % BANDS < BANDS / 2 ? 0 : share / BANDS)
  const takes = table.R.map((R, i) => 0.6 * (1 - R - table.T[i]!))
  return { ...table, glow: { takes, back: given(0.4), onward: given(0.3), taking: { from: 0, to: BANDS }, giving: { from: BANDS / 2, to: BANDS } } }
}

function ball(): SampleForm {
  const samples = emptyViewSamples({ roll: 0, nose: 'left', width: WIDTH, height: HEIGHT, scale: 1, centreX: 0, centreY: 0 }, COUNT)
  samples.occlusion.fill(1)
  const normal = new Float32Array(3 * COUNT)
  for (let i = 0; i < COUNT; i++) {
    const x = 1.3 * (i % WIDTH / WIDTH - 0.5), y = 1.3 * (Math.floor(i / WIDTH) / HEIGHT - 0.5)
    normal.set([x, y, Math.sqrt(1 - x * x - y * y)], 3 * i)
  }
  return { samples, normal, glossNormal: normal, sparkle: new Float32Array(COUNT) }
}

/** The lamps of the bench for the gloss; everything else is lit alike whatever its normal. */
function ballLight(): LightTables {
  const evenly = (value: number): NormalTable => new Float32Array(NORMALS).fill(value)
  const irradiance = evenly(0.9), matt = evenly(0.1), flakes = { strength: evenly(0.7), local: evenly(0.9) }
  return { rig: lightRig('bench'), gain: 0.7, irradiance, matt: () => matt, flakes: () => flakes }
}
