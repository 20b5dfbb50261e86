import { DEMO_PAINTS, type DemoPaintName } from '#server/seed/paints'
import { BUILT_IN_BLANKS } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { emptyViewSamples, PART_BODY, PART_FIN, PART_GAP } from '#shared/blank/view-sample-lists'
import { fitView } from '#shared/blank/view-samples'
import { filmOptics } from '#shared/optics/paint-optics'
import { FINISHES } from '#shared/optics/surface'
import { coatTable, LEVELS, type CoatTable } from '#shared/picture/coat-table'
import type { LightAsk } from '#shared/picture/engine/picture-engine'
import { SEEN_DAYLIGHT } from '#shared/picture/engine/seen-daylight'
import { lightTables } from '#shared/picture/light-tables'
import type { SampleForm } from '#shared/picture/paint-light'
import { viewKit, type ViewKit } from '#shared/picture/view-kit'
import { demoOptics } from '../../fixtures/demo-looks'
import { draws, type Draws } from './draws'

/** What an engine is asked. */
export interface Asked { kit: ViewKit, ask: LightAsk }

const PICTURES = 48
/** Each sample of a picture is a stack of its own, since its codes are. */
const STACKS_EACH = 32
const COATS_MOST = 24
const LIGHTS = ['bench', 'face', 'flop', { tilt: 75 }] as const

/** Pictures of stacks drawn by chance, always the same: paints of the demo shelf and films of no paint, on samples that face anywhere. */
export function* randomStacks(): Generator<Asked> {
  const draw = draws(1931)
  const blank = prepareBlank(BUILT_IN_BLANKS[0]!)
  const tents = LIGHTS.map(light => lightTables(light))
  const shelf = [...(Object.keys(DEMO_PAINTS) as DemoPaintName[]).map(demoOptics), ...Array.from({ length: 24 }, () => anyFilm(draw))]
  const tables = shelf.map((optics): CoatTable => coatTable(optics, draw.between(0.2, 5)))
  for (let picture = 0; picture < PICTURES; picture++) {
    const view = fitView(blank, { width: STACKS_EACH, height: 1, roll: 0 })
    const form = anyForm(draw, view)
    const kit: ViewKit = { ...viewKit(blank, view, form.samples), form }
    const coats = Array.from({ length: draw.whole(1, COATS_MOST) }, (_, c) => ({
      key: `${c}`, table: draw.one(tables), codes: Uint8Array.from({ length: STACKS_EACH }, () => draw.share() < 0.25 ? 0 : draw.whole(0, LEVELS - 1)),
    }))
    const lightness = draw.share()
    yield {
      kit, ask: {
        groundKey: 'ground', ground: Array.from({ length: 16 }, () => Math.min(1, lightness * draw.between(0.7, 1.3))), coats, form,
        lighting: { tables: draw.one(tents), finish: draw.one(FINISHES), plain: draw.share() < 0.25, aspecular: draw.one([15, 25, 45, 75, 110]), seen: SEEN_DAYLIGHT },
      },
    }
  }
}

/** A film of no known paint: from clear to hiding, with bands that go their own ways. */
function anyFilm(draw: Draws): ReturnType<typeof filmOptics> {
  const spectrum = (from: number, to: number) => {
    const [middle, swing, place] = [draw.between(from, to), draw.between(0, 1.5), draw.between(0, 6)]
    return Array.from({ length: 36 }, (_, b) => 10 ** (middle + swing * Math.sin(place + b / 6)))
  }
  return filmOptics(spectrum(-3, 0.5), spectrum(-3, 0.7))
}

/** Samples that face the viewer anyhow, on the body, on fins and in gaps. */
function anyForm(draw: Draws, view: SampleForm['samples']['view']): SampleForm {
  const samples = emptyViewSamples(view, STACKS_EACH)
  const normal = new Float32Array(3 * STACKS_EACH), glossNormal = new Float32Array(3 * STACKS_EACH), sparkle = new Float32Array(STACKS_EACH)
  for (let i = 0; i < STACKS_EACH; i++) {
    normal.set(facing(draw), 3 * i)
    glossNormal.set(facing(draw), 3 * i)
    sparkle[i] = draw.between(-2, 2)
    samples.occlusion[i] = draw.between(0.3, 1)
    samples.part[i] = draw.one([PART_BODY, PART_BODY, PART_BODY, PART_GAP, PART_FIN, PART_FIN + 1])
    samples.rim[i] = draw.between(0, 2)
  }
  return { samples, normal, glossNormal, sparkle }
}

/** A unit normal within the half of all directions that a viewer can see. */
function facing(draw: Draws): [number, number, number] {
  const z = draw.between(0.01, 1), round = draw.between(0, 2 * Math.PI), across = Math.sqrt(1 - z * z)
  return [across * Math.cos(round), across * Math.sin(round), z]
}
