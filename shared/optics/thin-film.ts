import { type Complex, divide, multiply, squareRoot } from './complex'

/** A flat layer of one substance: index n − ik and thickness d, nm. */
export interface ThinFilm { n: number, k: number, d: number }

/** Light of one wavelength, nm, falling at an angle, degrees from upright in the first medium, on films in order from above. */
export interface ThinFilmCase {
  wavelength: number
  /** 0…89.9 degrees, in the medium of index n0. */
  angle: number
  n0: number
  films: readonly ThinFilm[]
  nExit: number
}

/** Share of the light sent back and let through, each 0…1. */
export interface ThinFilmAnswer { R: number, T: number }

/**
 * Reflectance and transmittance of a pile of thin films for unpolarised light.
 *
 * The characteristic-matrix result, worked out from the lowest boundary upwards so that thick absorbing films cannot
 * overflow. All interference is kept; the media outside do not absorb.
 *
 * @throws {RangeError} naming the value that is out of range
 * @accuracy within 1e-11 of independent field-transfer matrices over 80 cases (tests/reference/optics/thin-film.json)
 * @source F. Abelès, Ann. Phys. 12 (1950) 596; form as in H. A. Macleod, "Thin-Film Optical Filters"
 */
export function thinFilm({ wavelength, angle, n0, films, nExit }: ThinFilmCase): ThinFilmAnswer {
  assertPositive('wavelength', wavelength)
  assertPositive('n0', n0)
  assertPositive('nExit', nExit)
  if (!(angle >= 0 && angle <= 89.9)) throw new RangeError(`film: angle must be from 0 to 89.9 degrees, got ${angle}`)
  for (const { n, k, d } of films) {
    if (!(n >= 0 && k >= 0 && n + k > 0 && n + k < Infinity)) throw new RangeError(`film: n and k must be at least 0 and not both 0, got ${n} and ${k}`)
    if (!(d >= 0 && d < Infinity)) throw new RangeError(`film: d must be at least 0 nm, got ${d}`)
  }
  const along = n0 * Math.sin(angle * Math.PI / 180)
  const pile = films.map(film => ({ index: { re: film.n, im: -film.k }, d: film.d }))
  const s = onePolarisation('s', wavelength, along, n0, pile, nExit)
  const p = onePolarisation('p', wavelength, along, n0, pile, nExit)
  return { R: (s.R + p.R) / 2, T: (s.T + p.T) / 2 }
}

/** The two ways a wave can swing: across the plane of incidence, and in it. */
export type Polarisation = 's' | 'p'

interface Slab { index: Complex, d: number }

function onePolarisation(swing: Polarisation, wavelength: number, along: number, n0: number, films: readonly Slab[], nExit: number): ThinFilmAnswer {
  const media = [{ re: n0, im: 0 }, ...films.map(film => film.index), { re: nExit, im: 0 }]
  const upright = media.map(index => uprightPart(index, along))
  const eta = media.map((index, i) => admittance(swing, index, upright[i]!))

  const last = media.length - 1
  let wave = boundary(eta[last - 1]!, eta[last]!)
  for (let j = last - 1; j >= 1; j--) {
    wave = through(boundary(eta[j - 1]!, eta[j]!), phase(upright[j]!, films[j - 1]!.d, wavelength), wave)
  }
  const R = wave.r.re ** 2 + wave.r.im ** 2
  const T = eta[last]!.re / eta[0]!.re * (wave.t.re ** 2 + wave.t.im ** 2)
  return { R, T: Math.max(0, T) }
}

/** Amplitudes sent back and let through. */
export interface Wave { r: Complex, t: Complex }

/** The upright part of a wave's index, N·cosθ, on the branch that dies away downwards. */
export function uprightPart({ re, im }: Complex, along: number): Complex {
  const root = squareRoot({ re: re * re - im * im - along * along, im: 2 * re * im })
  return root.im > 0 ? { re: -root.re, im: -root.im } : root
}

/** The tilted admittance of a medium, in units of free space. */
export function admittance(swing: Polarisation, index: Complex, upright: Complex): Complex {
  return swing === 's' ? upright : divide(multiply(index, index), upright)
}

/** What one boundary does to the tangential field. */
export function boundary(from: Complex, to: Complex): Wave {
  const r = divide({ re: from.re - to.re, im: from.im - to.im }, { re: from.re + to.re, im: from.im + to.im })
  return { r, t: { re: 1 + r.re, im: r.im } }
}

/** e^(−iδ) of one crossing of a film: it turns and weakens the wave. */
export function phase(upright: Complex, d: number, wavelength: number): Complex {
  const turns = 2 * Math.PI * d / wavelength
  const size = Math.exp(turns * upright.im)
  return { re: size * Math.cos(turns * upright.re), im: -size * Math.sin(turns * upright.re) }
}

/** Puts a boundary and a film on top of everything below it. */
export function through(top: Wave, crossing: Complex, below: Wave): Wave {
  const back = multiply(below.r, multiply(crossing, crossing))
  const bounce = multiply(top.r, back)
  const loop = { re: 1 + bounce.re, im: bounce.im }
  return {
    r: divide({ re: top.r.re + back.re, im: top.r.im + back.im }, loop),
    t: divide(multiply(top.t, multiply(crossing, below.t)), loop),
  }
}

function assertPositive(what: string, value: number): void {
  if (!(value > 0 && value < Infinity)) throw new RangeError(`film: ${what} must be above 0, got ${value}`)
}
