import type { z } from 'zod'
import { PaintDraft } from '#shared/shelf/paint'
import { type CsvRow, readCsv, type Separator, writeCsv } from './csv'
import { PAINT_COLUMNS, paintCell, type PaintColumn, type PaintLine, readPaintCell } from './paint-columns'
import { unknownFields } from './unknown-fields'

/** Largest file of paints that is taken in, bytes, and the most rows of it. */
export const PAINTS_FILE_MAX = 2 * 1024 * 1024
export const PAINT_ROWS_MAX = 500

/** What a row says, by the fields of a paint; nothing for its empty cells. */
export interface SaidRow { row: number, id: string | null, said: Record<string, unknown>, retired: boolean | undefined, reasons: string[] }

/** A file of paints as it reads, or why it does not. */
export type PaintsRead = { ok: true, separator: Separator, unread: string[], rows: SaidRow[] } | { ok: false, row: number, because: string }

/** The file of a shelf. With a byte order mark spreadsheets know that it is UTF-8. The price is written where there is one to see. */
export function writePaintsCsv(paints: readonly PaintLine[], { separator, bom, priced }: { separator: Separator, bom: boolean, priced: boolean }): string {
  const columns = PAINT_COLUMNS.filter(column => priced || column.name !== 'price_per_ml')
  const rows = [columns.map(column => column.name), ...paints.map(paint => columns.map(column => paintCell(paint, column, separator)))]
  return `${bom ? '\uFEFF' : ''}${writeCsv(rows, separator)}`
}

/** Reads a file of paints cell by cell; whether a row makes a paint is for `paintOfRow` to say. */
export function readPaintsCsv(text: string): PaintsRead {
  const read = readCsv(text)
  if (!read.ok) return read
  const [header, ...rows] = read.rows
  if (!header) return { ok: false, row: 1, because: 'The file is empty.' }
  const names = header.cells.map(cell => cell.trim().toLowerCase().replace(/[\s-]+/g, '_'))
  const twice = names.find((name, i) => name !== '' && names.indexOf(name) < i)
  if (twice) return { ok: false, row: header.row, because: `Column “${twice}” is there twice.` }
  if (!names.includes('name') && !names.includes('id')) return { ok: false, row: header.row, because: 'There is no column “name”. The first row names the columns.' }
  if (rows.length > PAINT_ROWS_MAX) return { ok: false, row: rows[PAINT_ROWS_MAX]!.row, because: `A file has at most ${PAINT_ROWS_MAX} paints; cut it in two.` }
  const columns = names.map(name => PAINT_COLUMNS.find(column => column.name === name) ?? null)
  return {
    ok: true,
    separator: read.separator,
    unread: names.filter((name, i) => name !== '' && !columns[i]),
    rows: rows.map(row => saidBy(row, columns, read.separator)),
  }
}

function saidBy({ row, cells }: CsvRow, columns: readonly (PaintColumn | null)[], separator: Separator): SaidRow {
  const said: Record<string, unknown> = {}
  const reasons: string[] = []
  if (cells.length > columns.length) reasons.push(`The row has ${cells.length} cells, the header ${columns.length}.`)
  columns.forEach((column, i) => {
    const cell = cells[i] ?? ''
    if (!column || cell.trim() === '') return
    if (cell.includes('\uFFFD')) reasons.push(`${column.name} holds letters that are not UTF-8. Save the file as CSV UTF-8.`)
    const value = readPaintCell(cell, column, separator)
    if (value.ok) put(said, column.at, value.value)
    else reasons.push(`${column.name} ${value.because}`)
  })
  const { id, retired, ...paint } = said
  return { row, id: typeof id === 'string' ? id : null, said: paint, retired: typeof retired === 'boolean' ? retired : undefined, reasons }
}

function put(said: Record<string, unknown>, at: readonly string[], value: unknown): void {
  const [key, ...rest] = at
  if (key === undefined) return
  if (rest.length === 0) {
    said[key] = value
    return
  }
  const inner = typeof said[key] === 'object' && said[key] !== null ? said[key] as Record<string, unknown> : {}
  said[key] = inner
  put(inner, rest, value)
}

/** The paint a row makes: a new one, or another state of `now`, of which all that the row does not say stays. */
export function paintOfRow({ said, reasons }: SaidRow, now: PaintDraft | null): { ok: true, draft: PaintDraft } | { ok: false, reasons: string[] } {
  if (reasons.length > 0) return { ok: false, reasons }
  const given = { ...now, ...said }
  const parsed = PaintDraft.safeParse(given)
  if (!parsed.success) return { ok: false, reasons: [...new Set(parsed.error.issues.map(reasonOf))] }
  const unused = unknownFields(given, parsed.data).map(path => `${columnAt(path.split('.'))} is not used by a paint that is known by “${parsed.data.known.how}”.`)
  return unused.length > 0 ? { ok: false, reasons: unused } : { ok: true, draft: parsed.data }
}

function columnAt(path: readonly PropertyKey[]): string {
  const column = PAINT_COLUMNS.find(({ at }) => at.length <= path.length && at.every((key, i) => key === path[i]))
  return column?.name ?? (path[0] === 'known' ? 'known_by' : path[0] === 'twoPart' ? 'two_part_by' : path.join('.'))
}

function reasonOf({ path, message, code, ...issue }: z.core.$ZodIssue): string {
  const name = columnAt(path)
  const isMissing = code === 'invalid_type' && 'input' in issue ? issue.input === undefined : message.includes('received undefined')
  return isMissing ? `${name} is missing.` : `${name}: ${message}${/[.!?]$/.test(message) ? '' : '.'}`
}
