import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { guarded, readCsv, unguarded, writeCsv } from '#shared/files/csv'
import { FilePaint } from '#shared/files/scheme-file'
import { PAINT_COLUMNS } from '#shared/files/paint-columns'
import { paintOfRow, readPaintsCsv, writePaintsCsv } from '#shared/files/paints-csv'
import { PaintDraft, PaintKnown } from '#shared/shelf/paint'

const Words = fc.oneof(fc.string(), fc.constantFrom('a "b" c', 'two\nlines', '\r\n', ';,\t', ' edge ', 'é=ß', '\'=x'))

describe('rows as text', () => {
  it('come back as they were, whatever stands in them', () => {
    fc.assert(fc.property(fc.array(fc.array(Words, { minLength: 2, maxLength: 4 }), { minLength: 1, maxLength: 5 }), fc.constantFrom(',' as const, ';' as const), (rows, separator) => {
      const headed = [['a', 'b', 'c', 'd'], ...rows]
      const read = readCsv(writeCsv(headed, separator))
      const kept = headed.map((cells, i) => ({ row: i + 1, cells })).filter(({ cells }) => cells.some(cell => cell !== ''))
      expect(read).toEqual({ ok: true, separator, rows: kept })
    }))
  })

  it('are read as other programs write them: a byte order mark, plain line feeds, no last line end, an empty last cell', () => {
    expect(readCsv('\uFEFFname;note\nTan;\nBone;"a ""b"""')).toEqual({ ok: true, separator: ';', rows: [
      { row: 1, cells: ['name', 'note'] }, { row: 2, cells: ['Tan', ''] }, { row: 3, cells: ['Bone', 'a "b"'] },
    ] })
    expect(readCsv('a,b\r\n1,')).toMatchObject({ rows: [{}, { cells: ['1', ''] }] })
  })

  it('that are cut off or muddled say in which row', () => {
    expect(readCsv('a,b\n1,"2')).toEqual({ ok: false, row: 2, because: 'A quoted cell is not closed.' })
    expect(readCsv('a,b\n"1"x,2')).toMatchObject({ ok: false, row: 2 })
  })
})

describe('words that a spreadsheet would run', () => {
  it.each(['=1+1', '+1', '-1', '@SUM(A1)', '\tx', '\rx', '\'=x', '\'\'=x'])('are stopped by an apostrophe: %j', (words) => {
    expect(guarded(words)).toBe(`'${words}`)
  })

  it('come back as they were, and other words are left alone', () => {
    fc.assert(fc.property(Words, words => unguarded(guarded(words)) === words))
    expect(guarded('Tan, water-based')).toBe('Tan, water-based')
    expect(unguarded('\'60s green')).toBe('\'60s green')
  })
})

const L = fc.double({ min: 0, max: 100, noNaN: true }).map(Math.abs)
const AB = fc.double({ min: -100, max: 100, noNaN: true }).map(value => value + 0)
const Lab = fc.tuple(L, AB, AB)
const Known: fc.Arbitrary<PaintKnown> = fc.oneof(
  fc.record({ how: fc.constant('two-swatches' as const), overBlack: Lab, overWhite: Lab, passes: fc.constant(2), blackGround: Lab }),
  fc.record({ how: fc.constant('masstone-hide' as const), masstone: Lab, passesToHide: fc.double({ min: 1, max: 9, noNaN: true }) }),
  fc.record({ how: fc.constant('dye-over-white' as const), overWhite: Lab, passes: fc.constant(3), haze: fc.double({ min: 0, max: 0.5, noNaN: true }).map(Math.abs) }),
  fc.record({ how: fc.constant('flake' as const), oxide: fc.constantFrom('anatase' as const, 'rutile' as const), thickness: fc.constant(92.5), flakesPerPass: fc.constant(0.4), sigma: fc.constant(9), edge: fc.constant(0.1), tint: fc.record({ overWhite: Lab, passes: fc.constant(2) }) }),
  fc.record({ how: fc.constant('fluorescent' as const), overWhite: Lab, passes: fc.constant(3), haze: fc.constant(0), emissionPeak: fc.constant(515), emissionWidth: fc.constant(40), quantumYield: fc.constant(0.6) }),
  fc.record({ how: fc.constant('clear' as const), yellowing: fc.constant(0.1) }),
)
const Draft = fc.record({
  name: fc.constantFrom('Tan', '=cmd|x', '-5 tan', 'Grün; "matt"'), kind: fc.constant('opaque' as const), base: fc.constant('water' as const), known: Known,
  density: fc.double({ min: 0.5, max: 3, noNaN: true }), potLifeMinutes: fc.constant(45), twoPart: fc.option(fc.constant({ by: 'volume' as const, resin: 2, hardener: 1, resinDensity: 1.16 }), { nil: undefined }), hazards: fc.constantFrom([], ['H317', 'H334']), note: fc.constantFrom('', 'two\nlines', '\'=x'), pricePerMl: fc.constant(0.125),
}).map(draft => PaintDraft.parse(draft))

describe('a paint as a line', () => {
  it('reads back as the same paint, to the last digit, with points and with commas', () => {
    fc.assert(fc.property(Draft, fc.constantFrom(',' as const, ';' as const), fc.boolean(), (draft, separator, bom) => {
      const read = readPaintsCsv(writePaintsCsv([draft], { separator, bom, priced: true }))
      if (!read.ok) throw new Error(read.because)
      expect(paintOfRow(read.rows[0]!, null)).toEqual({ ok: true, draft })
    }))
  })

  it('has a column for every field a paint has, and a file has every field too', () => {
    const own = [...Object.keys(PaintDraft.shape), 'id', 'retired']
    expect([...new Set(PAINT_COLUMNS.map(({ at }) => at[0]))].sort()).toEqual([...own].sort())
    const known = PaintKnown.options.flatMap(option => Object.keys(option.shape))
    expect([...new Set(PAINT_COLUMNS.flatMap(({ at }) => at[0] === 'known' ? at[1] : []))].sort()).toEqual([...new Set(known)].sort())
    expect(Object.keys(FilePaint.shape).sort()).toEqual([...own.filter(field => !['volumeLeft', 'pricePerMl', 'retired'].includes(field)), 'opticsId'].sort())
  })

  const reasons = (line: string) => {
    const read = readPaintsCsv(`name,kind,base,known_by,masstone,passes_to_hide,yellowing,density_g_per_ml\n${line}`)
    const row = read.ok ? read.rows[0] : undefined
    const paint = row && paintOfRow(row, null)
    return paint?.ok === false ? paint.reasons : []
  }
  it.each([
    ['Tan,opaque,water,masstone-hide,66 8 30,,,', /passes_to_hide is missing/],
    ['Tan,opaque,water,masstone-hide,66 8,4,,', /masstone is a colour/],
    ['Tan,shiny,water,masstone-hide,66 8 30,4,,', /^kind: /],
    ['Tan,opaque,water,,,,,', /known_by/],
    ['Tan,opaque,water,masstone-hide,66 8 30,4,0.1,', /yellowing is not used/],
    ['Tan,opaque,water,masstone-hide,66 8 30,4,,"1,05"', /density_g_per_ml is written with a decimal point/],
    ['Tan,opaque,water,masstone-hide,66 8 30,4,,9', /^density_g_per_ml: /],
    ['Tan,opaque,water,masstone-hide,66 8 30,4,,1,9', /9 cells, the header 8/],
    ['T\uFFFDn,opaque,water,masstone-hide,66 8 30,4,,1', /UTF-8/],
  ])('that is wrong says where and why: %s', (line, reason) => {
    expect(reasons(line).join('\n')).toMatch(reason)
  })

  it('may give its colour as people write colours', () => {
    const read = readPaintsCsv('name,kind,base,known_by,masstone,passes_to_hide\nTan,opaque,water,masstone-hide,#c8a070,4')
    const paint = read.ok ? paintOfRow(read.rows[0]!, null) : null
    expect(paint).toMatchObject({ ok: true, draft: { known: { masstone: [expect.closeTo(68.6, 0), expect.any(Number), expect.any(Number)] } } })
  })
})
