import { emptyViewSamples } from '#shared/blank/view-sample-lists'
import { filmOptics, paintOpticsFrom } from '#shared/optics/paint-optics'
import { coatTable, LEVELS, type CoatTable } from '#shared/picture/coat-table'
import type { LightAsk } from '#shared/picture/engine/picture-engine'
import { SEEN_DAYLIGHT } from '#shared/picture/engine/seen-daylight'
import { lightRig } from '#shared/picture/light-rig'
import type { LightTables, NormalTable } from '#shared/picture/light-tables'
import type { SampleForm } from '#shared/picture/paint-light'
import type { ViewKit } from '#shared/picture/view-kit'

/** Samples of the trial in each direction: as many as a picture of a few hundred pixels has. */
const SIDE = 128
const COUNT = SIDE * SIDE
/** At least as many as a table by normals has. */
const NORMALS = 64 * 64

/** A small ball under a stack of five films and a pearl, with nothing looked up that would take long to work out. */
export interface TrialStack {
  kit: ViewKit
  /** The same stack after the coat in its middle was changed for so many times; every time it is a coat no engine has seen. */
  ask: (change: number) => LightAsk
}

/** Makes the stack of a trial. */
export function trialStack(): TrialStack {
  const form = ball()
  const pearl = coatTable(paintOpticsFrom({ how: 'interference', thickness: 125, oxide: 'anatase', flakesPerPass: 0.4, sigma: 8, edge: 0.06 }), 2)
  const films = [0, 1, 2, 3].map(shift => film(shift, 1.5))
  const codes = [0, 1, 2, 3, 4, 5].map(codesOf)
  const tables = ballLight()
  return {
    // Engines know a view by its kit and look at nothing else of it.
    kit: { samples: form.samples, form, blindForm: form } as ViewKit,
    ask(change) {
      const stack = [films[0]!, films[1]!, film(4, 1 + 0.1 * change), pearl, films[2]!, films[3]!]
      return {
        groundKey: 'trial', ground: new Array<number>(16).fill(0.7), form,
        coats: stack.map((table, c) => ({ key: c === 2 ? `changed ${change}` : `${c}`, table, codes: codes[c]! })),
        lighting: { tables, finish: 'gloss', plain: false, aspecular: 45, seen: SEEN_DAYLIGHT },
      }
    },
  }
}

/** Deposits that run across the ball, each coat its own way. */
function codesOf(coat: number): Uint8Array {
  return Uint8Array.from({ length: COUNT }, (_, i) => (i % SIDE * (coat + 1) + Math.floor(i / SIDE)) % LEVELS)
}

function film(shift: number, passes: number): CoatTable {
  const wave = (place: number, least: number) => Array.from({ length: 36 }, (_, b) => least * (1.2 + Math.sin(place + b / 7)))
  return coatTable(filmOptics(wave(shift, 0.3), wave(shift + 2, 0.4)), passes)
}

function ball(): SampleForm {
  const samples = emptyViewSamples({ roll: 0, nose: 'left', width: SIDE, height: SIDE, scale: 1, centreX: 0, centreY: 0 }, COUNT)
  samples.occlusion.fill(1)
  const normal = new Float32Array(3 * COUNT)
  for (let i = 0; i < COUNT; i++) {
    const x = 1.3 * (i % SIDE / SIDE - 0.5), y = 1.3 * (Math.floor(i / SIDE) / SIDE - 0.5)
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
