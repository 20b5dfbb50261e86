import type { Lab, PaintDraft } from '#shared/shelf/paint'
import { readColour } from '#shared/shelf/read-colour'
import { guarded, type Separator, unguarded } from './csv'

/** How a cell is written: words, one of some words, a figure, a colour as three figures of CIELAB, codes with spaces between, yes or nothing. */
type Is = 'words' | 'word' | 'figure' | 'colour' | 'codes' | 'yes'

/** One column of the file of a shelf, and the field of a paint it stands for. */
export interface PaintColumn { name: string, at: readonly [string] | readonly [string, string] | readonly [string, string, string], is: Is }

const column = (name: string, is: Is, ...at: [string] | [string, string] | [string, string, string]): PaintColumn => ({ name, at, is })
const known = (name: string, is: Is, ...at: [string] | [string, string]): PaintColumn => ({ name, at: ['known', ...at], is })

/** Every column, in the order in which they are written. */
export const PAINT_COLUMNS: readonly PaintColumn[] = [
  column('id', 'word', 'id'),
  column('name', 'words', 'name'),
  column('kind', 'word', 'kind'),
  column('base', 'word', 'base'),
  column('reducer_per_100', 'figure', 'reducerPer100'),
  column('film_per_pass_um', 'figure', 'filmPerPass'),
  column('volume_solids_percent', 'figure', 'volumeSolids'),
  column('density_g_per_ml', 'figure', 'density'),
  column('rest_minutes', 'figure', 'restMinutes'),
  column('pot_life_minutes', 'figure', 'potLifeMinutes'),
  column('two_part_by', 'word', 'twoPart', 'by'),
  column('resin_parts', 'figure', 'twoPart', 'resin'),
  column('hardener_parts', 'figure', 'twoPart', 'hardener'),
  column('resin_density_g_per_ml', 'figure', 'twoPart', 'resinDensity'),
  column('hardener_density_g_per_ml', 'figure', 'twoPart', 'hardenerDensity'),
  column('hazards', 'codes', 'hazards'),
  column('left_ml', 'figure', 'volumeLeft'),
  column('price_per_ml', 'figure', 'pricePerMl'),
  column('retired', 'yes', 'retired'),
  known('known_by', 'word', 'how'),
  known('masstone', 'colour', 'masstone'),
  known('passes_to_hide', 'figure', 'passesToHide'),
  known('over_black', 'colour', 'overBlack'),
  known('over_white', 'colour', 'overWhite'),
  known('passes', 'figure', 'passes'),
  known('black_ground', 'colour', 'blackGround'),
  known('white_ground', 'colour', 'whiteGround'),
  known('haze', 'figure', 'haze'),
  known('yellowing', 'figure', 'yellowing'),
  known('oxide', 'word', 'oxide'),
  known('oxide_nm', 'figure', 'thickness'),
  known('face', 'colour', 'wanted'),
  known('flakes_per_pass', 'figure', 'flakesPerPass'),
  known('tilt_degrees', 'figure', 'sigma'),
  known('edge', 'figure', 'edge'),
  known('tint_over_white', 'colour', 'tint', 'overWhite'),
  known('tint_passes', 'figure', 'tint', 'passes'),
  known('emission_peak_nm', 'figure', 'emissionPeak'),
  known('emission_width_nm', 'figure', 'emissionWidth'),
  known('quantum_yield', 'figure', 'quantumYield'),
  column('note', 'words', 'note'),
]

/** A paint as it is written: what one types of it, which one it is and whether it is put away. */
export type PaintLine = PaintDraft & { id?: string, retired?: boolean }

/** A cell's value, or what is wrong with it as a sentence. */
export type CellRead = { ok: true, value: unknown } | { ok: false, because: string }

/** Whether figures are written with a decimal comma, which only another separator leaves room for. */
const commaIsDecimal = (separator: Separator) => separator !== ','

/** The text of a paint's cell; empty for what is not said. */
export function paintCell(paint: PaintLine, { at, is }: PaintColumn, separator: Separator): string {
  const value = valueAt(paint, at)
  if (value === undefined || value === null) return ''
  const figure = (number: number) => commaIsDecimal(separator) ? String(number).replace('.', ',') : String(number)
  switch (is) {
    case 'words': return guarded(String(value))
    case 'word': return String(value)
    case 'figure': return figure(Number(value))
    case 'colour': return (value as Lab).map(figure).join(' ')
    case 'codes': return (value as readonly string[]).join(' ')
    case 'yes': return value === true ? 'yes' : ''
  }
}

/** Reads a cell that is not empty. */
export function readPaintCell(cell: string, { is }: PaintColumn, separator: Separator): CellRead {
  switch (is) {
    case 'words': return { ok: true, value: unguarded(cell) }
    case 'word': return { ok: true, value: cell.trim().toLowerCase() }
    case 'codes': return { ok: true, value: cell.trim().toUpperCase().split(/[\s,;]+/) }
    case 'figure': return readFigure(cell, separator)
    case 'colour': return readLab(cell, separator)
    case 'yes': {
      const word = cell.trim().toLowerCase()
      return word === 'yes' || word === 'no' ? { ok: true, value: word === 'yes' } : { ok: false, because: 'is yes or no.' }
    }
  }
}

const FIGURE = /^[+-]?\d+(?:\.\d+)?(?:e[+-]?\d+)?$/i

function figureOf(text: string, separator: Separator): number | null {
  const pointed = commaIsDecimal(separator) ? text.replace(',', '.') : text
  return FIGURE.test(pointed) ? Number(pointed) : null
}

function readFigure(cell: string, separator: Separator): CellRead {
  const value = figureOf(cell.trim(), separator)
  if (value !== null) return { ok: true, value }
  return { ok: false, because: !commaIsDecimal(separator) && cell.includes(',') ? 'is written with a decimal point where commas stand between the cells.' : 'is a figure.' }
}

function readLab(cell: string, separator: Separator): CellRead {
  const figures = cell.trim().split(/\s+/).map(part => figureOf(part, separator))
  const value = figures.length === 3 && figures.every(figure => figure !== null) ? figures : readColour(cell)
  return value ? { ok: true, value } : { ok: false, because: 'is a colour: three figures of CIELAB with spaces between, or a CSS colour.' }
}

function valueAt(paint: PaintLine, at: readonly string[]): unknown {
  return at.reduce<unknown>((value, key) => typeof value === 'object' && value !== null ? (value as Record<string, unknown>)[key] : undefined, paint)
}
