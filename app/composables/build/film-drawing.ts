import { coverAt, type CutBlank } from './film-cover'
import { filmTexture, type FilmTexture } from './film-texture'
import type { Look } from '#shared/picture/look'
import { isClearCoat } from '#shared/picture/coat-paint'
import { filmSection } from '#shared/scheme/film'
import { laidCoats } from '#shared/scheme/laid-coats'

/** One coat in the section. Lines run from A (belly, 0) to A′ (back), heights up from the bottom, px of the drawing. */
export interface DrawnStratum {
  coatId: string
  texture: FilmTexture
  /** Film where it is laid in full, µm. */
  film: number
  base: number[]
  top: number[]
  /** Drawn thinner than it is, with a break line. */
  isShortened: boolean
  isMasked: boolean
}

/** The stack as a cut through the film, true to scale in dry film but for a thick clear. */
export interface FilmDrawing {
  height: number
  /** Width between the samples of a line is the width of the drawing over this. */
  steps: number
  groundTop: number[]
  strata: DrawnStratum[]
  /** px for each µm. */
  scale: number
}

const STEPS = 128
/** Shares of the height: the ground below, and what a thick clear may take. */
const GROUND = 0.1
const CLEAR = 0.11
const HEAD_ROOM = 0.045
const SCALE_MOST = 8
/** A coat that is hardly there still shows as a hair, µm of drawing at scale 1. */
const HAIR = 0.8

const a = (i: number) => i / STEPS
const wave = (i: number, turn: number) => Math.sin(a(i) * 7.1 + turn) * 0.6 + Math.sin(a(i) * 12.7 + turn * 2.3) * 0.4

/** Paint runs into hollows before it dries: a line, evened over its neighbours. */
function evened(line: readonly number[], reach: number): number[] {
  return line.map((_, i) => {
    const near = line.slice(Math.max(0, i - reach), i + reach + 1)
    return near.reduce((sum, each) => sum + each, 0) / near.length
  })
}

/** Draws a look's film into a height, px. */
export function filmDrawing(look: Look, blank: CutBlank, height: number): FilmDrawing {
  const film = new Map(filmSection(look.body, look.materials).map(stratum => [stratum.coatId, stratum.film]))
  const laid = laidCoats(look.body).map(one => ({
    ...one,
    film: film.get(one.coat.id) ?? 0,
    cover: Array.from({ length: STEPS + 1 }, (_, i) => coverAt(one, 1 - a(i), blank)),
    isClear: isClearCoat(one.coat, look.materials),
  }))
  const total = Array.from({ length: STEPS + 1 }, (_, i) => laid.reduce((sum, one) => one.isClear ? sum : sum + one.film * (one.cover[i] ?? 0), 0))
  const clears = laid.filter(one => one.isClear).length
  const room = height * (1 - GROUND - HEAD_ROOM - Math.min(0.3, clears * CLEAR))
  const scale = Math.min(SCALE_MOST, room / Math.max(20, ...total))
  const groundTop = Array.from({ length: STEPS + 1 }, (_, i) => height * GROUND + 2.5 * wave(i, 1.3))
  let below = groundTop
  const strata = laid.map((one, place): DrawnStratum => {
    const base = below
    const isShortened = one.isClear && one.film * scale > height * CLEAR
    const thick = isShortened ? height * CLEAR : one.film * scale
    const raised = base.map((low, i) => {
      const cover = one.cover[i] ?? 0
      return low + Math.max(cover > 0.02 ? HAIR : 0, thick * cover * (1 + 0.07 * wave(i, place + 0.4)))
    })
    const isMasked = one.masks.length > 0
    // A hair at A′ at least, so that every coat has an end to lead from.
    const level = isMasked ? raised : evened(raised, one.isClear ? 14 : 5).map((high, i) => Math.max(high, (base[i] ?? 0) + 0.45 * ((raised[i] ?? 0) - (base[i] ?? 0))))
    below = level
    return { coatId: one.coat.id, texture: filmTexture(one.coat, look.materials), film: one.film, base, top: level, isShortened, isMasked }
  })
  return { height, steps: STEPS, groundTop, strata, scale }
}

const figure = (value: number) => String(Math.round(value * 10) / 10)
const across = (i: number, steps: number, width: number) => i * width / steps

/** A line of the section as SVG path data, y down. */
export function filmLine(line: readonly number[], { height, steps }: Pick<FilmDrawing, 'height' | 'steps'>, width: number): string {
  return line.map((up, i) => `${i === 0 ? 'M' : 'L'}${figure(across(i, steps, width))} ${figure(height - up)}`).join('')
}

/** The area between two lines as closed SVG path data. */
export function filmArea(top: readonly number[], base: readonly number[], drawing: Pick<FilmDrawing, 'height' | 'steps'>, width: number): string {
  const { height, steps } = drawing
  const back = base.map((up, i) => `L${figure(across(i, steps, width))} ${figure(height - up)}`).reverse().join('')
  return `${filmLine(top, drawing, width)}${back}Z`
}

/** Height of the level at which a section is seen up to a coat, from the bottom, px: the highest the film then stands. */
export function levelOf(drawing: FilmDrawing, upTo: string): number {
  if (upTo === 'ground') return Math.max(...drawing.groundTop)
  const stratum = upTo === 'all' ? drawing.strata.at(-1) : drawing.strata.find(each => each.coatId === upTo)
  return Math.max(...stratum?.top ?? drawing.groundTop)
}

/** A round length for the scale bar, µm, that comes out at about 60 px or less. */
export function scaleBar(scale: number): number {
  return [100, 50, 20, 10, 5, 2].find(length => length * scale <= 84) ?? 1
}
