import { filmLayer } from './film'
import type { Flake } from './flake'
import { glowOf } from './fluorescence'
import { internalFromMeasured, measuredFromInternal } from './surface'
import type { PaintOptics } from './paint-optics'
import type { Coat, Stack } from './stack'

/** What can be other than it was told. */
export type DoubtAbout = 'film' | 'paint data' | 'pearl estimate' | 'glow estimate' | 'yellowing' | 'ground'

/** One thing that can be other than it was told, independent of all others. */
export interface Doubt {
  about: DoubtAbout
  /** The coats it bears on, by their place from the ground up; none for the ground. */
  coats: readonly number[]
  /** The stack with this one thing off by so many standard deviations. */
  apply: (stack: Stack, deviations: number) => Stack
}

/** Film of a pass by hand against the film it was told, standard deviation. Common practice: ±15 %. */
export const FILM_DOUBT = 0.15

/**
 * Standard deviations of what a paint's data can be off by. Set so that single coats come out as measured pigments did (see
 * docs/optics.md); of flakes, glow and age nobody has measured them: our estimates.
 */
const DOUBT = {
  /** Two swatches: their own film, absorption against scattering, and a lean of absorption from one end of the spectrum to the other. */
  swatches: { strength: 0.25, K: 0.06, lean: 0.1 },
  /** Masstone and hiding: strength, scattering that is not the same in every band, and how the masstone was read; thick paint is sure. */
  masstone: { opaque: { strength: 0.4, lean: 0.6 }, transparent: { strength: 0.8, lean: 1.2 }, K: 0.04 },
  /** Colour over white: strength and lean, and a haze that was not told, as a share of the mean absorption. */
  dye: { K: 0.08, lean: 0.08, haze: 0.04 },
  flake: { flakesPerPass: 0.3, sigma: 0.2, edge: 0.5, thickness: 0.03 },
  glow: { quantumYield: 0.15 },
  clear: { yellowing: 0.5 },
  ground: 0.5,
} as const
/** Readings that contradict each other are worth half. */
const CLIPPED = 2

/** Everything that can be off in a stack: every coat's film, every paint's data once however many coats it is in, and the ground. */
export function doubtsOf({ coats }: Stack): Doubt[] {
  const paints = new Map<PaintOptics, number[]>()
  coats.forEach(({ optics, passes }, i) => {
    if (passes > 0) paints.set(optics, [...paints.get(optics) ?? [], i])
  })
  return [
    groundDoubt(),
    ...coats.flatMap(({ passes }, i) => passes > 0 ? [filmDoubt(i)] : []),
    ...[...paints].flatMap(([optics, places]) => paintDoubts(optics, places)),
  ]
}

function filmDoubt(at: number): Doubt {
  return { about: 'film', coats: [at], apply: (stack, by) => changed(stack, [at], coat => ({ ...coat, passes: coat.passes * factor(FILM_DOUBT * by) })) }
}

/** A ground's colour is read as any swatch is, half an L* off as a rule. */
function groundDoubt(): Doubt {
  return {
    about: 'ground', coats: [],
    apply: (stack, by) => ({
      ...stack,
      ground: Float64Array.from(stack.ground, (R) => {
        const seen = measuredFromInternal(R, 'gloss')
        // dY/dL* = 3·(L* + 16)²/116³; a grey shift of as much in every band.
        const lightness = 116 * Math.cbrt(Math.max(seen, 0.0089)) - 16
        return unit(internalFromMeasured(seen + by * DOUBT.ground * 3 * (lightness + 16) ** 2 / 116 ** 3, 'gloss'))
      }),
    }),
  }
}

function paintDoubts(optics: PaintOptics, coats: readonly number[]): Doubt[] {
  const worse = optics.clipped ? CLIPPED : 1
  const doubt = (about: DoubtAbout, change: (paint: PaintOptics, by: number) => PaintOptics): Doubt => ({
    about, coats, apply: (stack, by) => changed(stack, coats, coat => ({ ...coat, optics: change(coat.optics, by) })),
  })
  const film = filmDoubts(optics, worse).map(change => doubt(optics.kind === 'clear' ? 'yellowing' : 'paint data', change))
  const flakes = optics.flake ? flakeDoubts().map(change => doubt('pearl estimate', (paint, by) => paint.flake ? { ...paint, flake: change(paint.flake, by) } : paint)) : []
  const glow = glowOf(optics) ? [doubt('glow estimate', withYield)] : []
  return [...film, ...flakes, ...glow]
}

type Change = (paint: PaintOptics, by: number) => PaintOptics

function filmDoubts(optics: PaintOptics, worse: number): Change[] {
  const { swatches, dye, clear } = DOUBT
  switch (optics.how) {
    case 'two-swatches': return [
      strengthened(worse * swatches.strength), scaled(['K'], worse * swatches.K), leaning(['K'], worse * swatches.lean),
    ]
    case 'masstone-hide': return masstoneDoubts(optics, worse)
    case 'dye-over-white': return dyeDoubts(worse, dye)
    // The carrier of flakes, when it is dyed at all.
    case 'interference':
    case 'metallic': return Math.max(...optics.K) > 0 ? dyeDoubts(worse, dye) : []
    case 'clear': return Math.max(...optics.K) > 0 ? [scaled(['K'], clear.yellowing)] : []
  }
}

/** One pass that lets through less than the first share of light is opaque, more than the second transparent. */
const OPAQUE = 0.3, TRANSPARENT = 0.7

/** Hiding tells the strength of an opaque paint well enough, and next to nothing of a transparent one. */
function masstoneDoubts({ K, S }: PaintOptics, worse: number): Change[] {
  const { opaque, transparent, K: read } = DOUBT.masstone
  const through = filmLayer(K, S, 1).T.reduce((sum, T) => sum + T, 0) / K.length
  const share = unit((through - OPAQUE) / (TRANSPARENT - OPAQUE))
  const between = (what: 'strength' | 'lean') => worse * (opaque[what] + share * (transparent[what] - opaque[what]))
  return [strengthened(between('strength')), scaled(['K'], worse * read), leaning(['K', 'S'], between('lean'))]
}

function dyeDoubts(worse: number, { K, lean, haze }: typeof DOUBT.dye): Change[] {
  return [scaled(['K'], worse * K), leaning(['K'], worse * lean), hazed(worse * haze)]
}

type Coefficients = readonly ('K' | 'S')[]

/** As much more of all that is in the paint. */
function strengthened(share: number): Change {
  return scaled(['K', 'S'], share)
}

function scaled(which: Coefficients, share: number): Change {
  return (paint, by) => weighed(paint, which, () => factor(share * by))
}

/** More at one end of the spectrum and less at the other. */
function leaning(which: Coefficients, share: number): Change {
  return (paint, by) => weighed(paint, which, i => factor(share * by * (2 * i / 35 - 1)))
}

/** What feeds a glow goes with the absorption it is a part of. */
function weighed(paint: PaintOptics, which: Coefficients, weight: (band: number) => number): PaintOptics {
  const times = (values: number[]) => values.map((value, i) => value * weight(i))
  const { fluorescent } = paint
  return {
    ...paint,
    ...(which.includes('S') ? { S: times(paint.S) } : {}),
    ...(which.includes('K') ? { K: times(paint.K) } : {}),
    ...(which.includes('K') && fluorescent?.Kf ? { fluorescent: { ...fluorescent, Kf: times(fluorescent.Kf) } } : {}),
  }
}

/** A haze can only be there or not: it is the size of the deviation that counts. */
function hazed(share: number): Change {
  return (paint, by) => {
    const mean = paint.K.reduce((sum, value) => sum + value, 0) / paint.K.length
    return { ...paint, S: paint.S.map(value => value + share * Math.abs(by) * mean) }
  }
}

function flakeDoubts(): ((flake: Flake, by: number) => Flake)[] {
  const { flakesPerPass, sigma, edge, thickness } = DOUBT.flake
  return [
    (flake, by) => ({ ...flake, flakesPerPass: flake.flakesPerPass * factor(flakesPerPass * by) }),
    (flake, by) => ({ ...flake, sigma: flake.sigma * factor(sigma * by) }),
    (flake, by) => ({ ...flake, edge: Math.min(1, flake.edge * factor(edge * by)) }),
    (flake, by) => ({
      ...flake,
      thickness: flake.thickness * factor(thickness * by),
      ...(flake.kinds ? { kinds: flake.kinds.map(kind => ({ ...kind, thickness: kind.thickness * factor(thickness * by) })) } : {}),
    }),
  ]
}

function withYield(paint: PaintOptics, by: number): PaintOptics {
  const { fluorescent } = paint
  return fluorescent ? { ...paint, fluorescent: { ...fluorescent, quantumYield: unit(fluorescent.quantumYield * factor(DOUBT.glow.quantumYield * by)) } } : paint
}

/** One standard deviation up or down is the same ratio, so that nothing falls below nothing. */
function factor(deviation: number): number {
  return Math.exp(deviation)
}

function changed(stack: Stack, at: readonly number[], change: (coat: Coat) => Coat): Stack {
  return { ...stack, coats: stack.coats.map((coat, i) => at.includes(i) ? change(coat) : coat) }
}

function unit(value: number): number {
  return Math.min(1, Math.max(0, value))
}
