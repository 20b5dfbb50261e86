import { interpolate } from 'culori'
import * as spectral from 'spectral.js'
import { labFromXyz } from '#shared/optics/colorimetry'
import { findCoatNow } from '#shared/optics/find-coat'
import { groundFromLab } from '#shared/optics/known-film'
import { xyzFromLinearRgb } from '#shared/optics/screen-colour'
import { deltaE2000 } from '#shared/optics/delta-e'
import { opticsOfKnown } from '#shared/shelf/optics-of-known'
import { simdEngine } from '#shared/picture/engine/simd-engine'
import { plainEngine } from '#shared/picture/engine/plain-engine'
import type { PictureEngine } from '#shared/picture/engine/picture-engine'
import { pictureBench } from '#shared/picture/picture-bench'
import { demoWall } from '../../tests/fixtures/demo-looks'
import { DEMO_PAINTS } from '#server/seed/paints'
import { askOf, exactPerPixel, linearTable, plainFraction, stackTask, type StackTask } from './stack-task'

/** The task every way of working out a stack is given. */
const WIDTH = 640, HEIGHT = 320, COATS = 12
/** Libraries for mixing colours are given every so many pixels of it, and their time counted as many times. */
const LIBRARY_EVERY = 64
const ROUNDS = 5

/** Milliseconds of the processor that some work takes: the least of a few goes, for the machine is shared. */
function cost(work: () => unknown, rounds: number = ROUNDS): number {
  work()
  let least = Infinity
  for (let round = 0; round < rounds; round++) {
    const before = process.cpuUsage()
    work()
    const { user, system } = process.cpuUsage(before)
    least = Math.min(least, (user + system) / 1000)
  }
  return least
}

/** A stack given to an engine anew each time: nothing of it is kept from before. */
function engineRun(engine: PictureEngine, task: StackTask): () => Float32Array {
  const { kit, ask } = askOf(task)
  let run = 0
  return () => engine.light(kit, { ...ask, groundKey: `run ${run++}` })
}

const srgb = (linear: number) => Math.min(1, Math.max(0, linear)) ** (1 / 2.2)

/** Each coat's own colour over white, for libraries that know colours only, and how much of it lies at each pixel. */
function libraryTask({ paints, codes, ...task }: StackTask) {
  const own = paints.map((_, c) => {
    const one = exactPerPixel({ ...task, ground: new Float64Array(16).fill(0.9), paints: [paints[c]!], codes: [Uint8Array.of(255)], tables: [] })
    return [...one].map(srgb)
  })
  return { own, count: codes[0]!.length, shareAt: (c: number, i: number) => (codes[c]![i]! / 255) ** 2 }
}

function culoriRun(task: StackTask): () => unknown {
  const { own, count, shareAt } = libraryTask(task)
  const colours = own.map(([r, g, b]) => ({ mode: 'rgb' as const, r: r!, g: g!, b: b! }))
  return () => {
    const out: unknown[] = []
    for (let i = 0; i < count; i += LIBRARY_EVERY) {
      let running: { mode: 'rgb', r: number, g: number, b: number } | ReturnType<ReturnType<typeof interpolate>> = { mode: 'rgb', r: 0.85, g: 0.85, b: 0.85 }
      colours.forEach((colour, c) => running = interpolate([running, colour], 'oklab')(shareAt(c, i)))
      out.push(running)
    }
    return out
  }
}

function spectralRun(task: StackTask): () => unknown {
  const { own, count, shareAt } = libraryTask(task)
  const colours = own.map(rgb => new spectral.Color(rgb.map(channel => Math.round(255 * channel))))
  return () => {
    const out: unknown[] = []
    for (let i = 0; i < count; i += LIBRARY_EVERY) {
      let running = new spectral.Color([217, 217, 217])
      colours.forEach((colour, c) => running = spectral.mix([running, 1 - shareAt(c, i)], [colour, shareAt(c, i)]))
      out.push(running.sRGB)
    }
    return out
  }
}

/** How well a straight line holds: slope, what is left at nothing, and R². */
export interface Line { per: number, rest: number, r2: number, points: readonly (readonly [number, number])[] }

function line(points: readonly (readonly [number, number])[]): Line {
  const mean = (of: 0 | 1) => points.reduce((sum, point) => sum + point[of], 0) / points.length
  const [x, y] = [mean(0), mean(1)]
  const per = points.reduce((sum, point) => sum + (point[0] - x) * (point[1] - y), 0) / points.reduce((sum, point) => sum + (point[0] - x) ** 2, 0)
  const rest = y - per * x
  const left = points.reduce((sum, point) => sum + (point[1] - rest - per * point[0]) ** 2, 0)
  return { per, rest, r2: 1 - left / points.reduce((sum, point) => sum + (point[1] - y) ** 2, 0), points }
}

/** How far two pictures are apart, CIEDE2000, at every 97th pixel. */
function furthest(a: Float32Array, b: Float32Array): number {
  const lab = (light: Float32Array, at: number) => labFromXyz(xyzFromLinearRgb([light[at]!, light[at + 1]!, light[at + 2]!]))
  let most = 0
  for (let at = 0; at < a.length; at += 3 * 97) most = Math.max(most, deltaE2000(lab(a, at), lab(b, at)))
  return most
}

/** What edits of a finish take until its first picture and its whole one, ms of the processor. */
export interface EditCosts { finish: string, first: number[], whole: number[] }

/** Times, ms of the processor, of every way to do one task. */
export interface NodeFigures {
  task: { width: number, height: number, coats: number }
  ways: { way: string, ms: number }[]
  apart: number
  byCoats: Line
  byPixels: Line
  even: { coats: number, ms: number, none: number }
  edits: { plain: EditCosts, simd: EditCosts }[]
  find: { what: string, ms: number }[]
}

/** Measures all of it; takes a minute or two. */
export function nodeFigures(): NodeFigures {
  const engine = simdEngine()
  if (!engine) throw new Error('this machine has no vectors')
  const task = stackTask(WIDTH, HEIGHT, COATS)
  const simd = engineRun(engine, task)
  const ways = [
    { way: 'exact, every pixel', ms: cost(() => exactPerPixel(task), 2) },
    { way: 'table, straight lines', ms: cost(() => linearTable(task), 3) },
    { way: 'plain TypeScript, N/D', ms: cost(() => plainFraction(task)) },
    { way: 'WebAssembly SIMD', ms: cost(simd, 12) },
    { way: 'spectral.js', ms: LIBRARY_EVERY * cost(spectralRun(task), 2) },
    { way: 'culori, Oklab', ms: LIBRARY_EVERY * cost(culoriRun(task), 2) },
  ]
  const apart = furthest(simd(), exactPerPixel(task))
  const byCoats = line([2, 4, 6, 8, 12, 16, 20, 24].map(coats => [coats, cost(engineRun(engine, stackTask(WIDTH, HEIGHT, coats)), 10)] as const))
  const byPixels = line([40, 80, 160, 240, 320, 400].map((height) => {
    const sized = stackTask(WIDTH, height, COATS)
    return [WIDTH * height / 1000, cost(engineRun(engine, sized), 10)] as const
  }))
  const even = { coats: 24, ms: cost(engineRun(engine, stackTask(WIDTH, HEIGHT, 24, true)), 10), none: cost(engineRun(engine, stackTask(WIDTH, HEIGHT, 0)), 10) }
  const edits = ['Perch, evening water', 'Roach, low sun', 'Ember'].map(finish => ({ plain: editCosts(finish, plainEngine()), simd: editCosts(finish, engine) }))
  return { task: { width: WIDTH, height: HEIGHT, coats: COATS }, ways, apart, byCoats, byPixels, even, edits, find: findFigures() }
}

/**
 * Every coat of a finish edited in turn, its passes and its place: from the edited look to the pixels of the first picture and of the
 * whole one, as the painting thread goes about it. A first round is for getting ready.
 */
function editCosts(finish: string, engine: PictureEngine): EditCosts {
  const bench = pictureBench('edits', engine)
  const look = structuredClone(demoWall.get(finish)!)
  const coats = look.body.stack.flatMap(item => item.act === 'coat' ? [item.coat] : [])
  const first: number[] = [], whole: number[] = []
  for (let round = 0; round < 5; round++) {
    for (const [c, coat] of coats.entries()) {
      if ((round + c) % 2) coat.passes = 0.8 + 0.1 * round
      else coat.where.reach = 0.4 * round
      const before = process.cpuUsage()
      for (const { stage } of bench.stages(look, { width: WIDTH, height: HEIGHT })) {
        const { user, system } = process.cpuUsage(before)
        if (round > 0 && stage !== 'refined') (stage === 'coarse' ? first : whole).push((user + system) / 1000)
      }
    }
  }
  return { finish, first, whole }
}

/** Looking for a coat over a primed ground: on a shelf of 27 film paints, and every cup of up to three of twelve paints and eight drops. */
function findFigures(): { what: string, ms: number }[] {
  const shelf = Object.entries(DEMO_PAINTS)
    .map(([id, { known }]) => ({ id, optics: opticsOfKnown(known) }))
    .filter(({ optics }) => !optics.flake && !optics.fluorescent).slice(0, 27)
  const wish = { target: [48, 20, 30] as [number, number, number], ground: groundFromLab([78, 2, 14], 'satin'), finish: 'gloss' as const }
  return [
    { what: `${shelf.length} paints, each by itself`, ms: cost(() => findCoatNow({ ...wish, shelf, partsMost: 1 })) },
    { what: '12 paints, 8 drops, 3 in a cup: every cup', ms: cost(() => findCoatNow({ ...wish, shelf: shelf.slice(0, 12), dropsMost: 8, partsMost: 3 }), 2) },
    { what: `${shelf.length} paints, 8 drops, 3 in a cup`, ms: cost(() => findCoatNow({ ...wish, shelf, dropsMost: 8, partsMost: 3 }), 2) },
  ]
}
