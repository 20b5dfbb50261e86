/** What stands between two cells. A semicolon or a tab leaves the comma free for decimals. */
export type Separator = ',' | ';' | '\t'

/** One row with its place: the header is row 1, as a spreadsheet counts, whatever lines its cells run over. */
export interface CsvRow { row: number, cells: string[] }

/** A text cut into rows, or why it cannot be. */
export type CsvRead = { ok: true, separator: Separator, rows: CsvRow[] } | { ok: false, row: number, because: string }

const BOM = '\uFEFF'

/** Rows as text: cells quoted where they must be, lines ended by CR LF. @source RFC 4180 */
export function writeCsv(rows: readonly (readonly string[])[], separator: Separator): string {
  const cell = (text: string) => /["\r\n;,\t]/.test(text) || text.trim() !== text ? `"${text.replaceAll('"', '""')}"` : text
  return rows.map(cells => `${cells.map(cell).join(separator)}\r\n`).join('')
}

/**
 * Cuts a text into rows and cells. A byte order mark is passed over; lines may end in CR LF, LF or CR; empty lines are left out but counted.
 * What stands between cells is told from the header.
 *
 * @source RFC 4180
 */
export function readCsv(given: string): CsvRead {
  const text = given.startsWith(BOM) ? given.slice(1) : given
  const separator = separatorOf(text)
  const rows: CsvRow[] = []
  let cells: string[] = []
  let row = 1
  let at = 0
  const endRow = () => {
    if (cells.some(cell => cell !== '')) rows.push({ row, cells })
    cells = []
    row++
  }
  while (at < text.length) {
    let cell: string
    if (text[at] === '"') {
      const end = endOfQuoted(text, at)
      if (end < 0) return { ok: false, row, because: 'A quoted cell is not closed.' }
      cell = text.slice(at + 1, end).replaceAll('""', '"')
      at = end + 1
      if (at < text.length && text[at] !== separator && text[at] !== '\r' && text[at] !== '\n') return { ok: false, row, because: 'Something follows the closing quote of a cell.' }
    }
    else {
      const from = at
      while (at < text.length && text[at] !== separator && text[at] !== '\r' && text[at] !== '\n') at++
      cell = text.slice(from, at)
    }
    cells.push(cell)
    if (text[at] === separator) {
      at++
      if (at < text.length) continue
      cells.push('')
    }
    if (text[at] === '\r' && text[at + 1] === '\n') at++
    at++
    endRow()
  }
  return { ok: true, separator, rows }
}

function endOfQuoted(text: string, from: number): number {
  let at = text.indexOf('"', from + 1)
  while (at >= 0 && text[at + 1] === '"') at = text.indexOf('"', at + 2)
  return at
}

function separatorOf(text: string): Separator {
  const header = text.split(/[\r\n]/, 1)[0] ?? ''
  const count = (separator: Separator) => header.split(separator).length
  return (['\t', ';'] as const).find(separator => count(separator) > count(',')) ?? ','
}

/** What a spreadsheet would take for a formula when a cell begins with it, also behind apostrophes that were put before it. */
const FORMULA = /^'*[=+\-@\t\r\n]/

/** Words as a cell that no spreadsheet runs: an apostrophe stands before what looks like a formula. */
export function guarded(words: string): string {
  return FORMULA.test(words) ? `'${words}` : words
}

/** The words of a guarded cell. */
export function unguarded(cell: string): string {
  return cell.startsWith('\'') && FORMULA.test(cell) ? cell.slice(1) : cell
}
