import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { addPaint } from '#server/services/shelf/add-paint'
import { changePaint } from '#server/services/shelf/change-paint'
import { deriveOptics } from '#server/services/shelf/derive-optics'
import { Problem } from '#shared/errors/problem'
import { changedColumns } from '#shared/files/changed-columns'
import { paintOfRow, readPaintsCsv, type SaidRow } from '#shared/files/paints-csv'
import type { PaintsPlan } from '#shared/files/paints-plan'
import { isSameKnown } from '#shared/shelf/same-known'
import type { PaintDraft } from '#shared/shelf/paint'
import { othersFirst } from './others-first'
import { type ShelfLine, shelfLines } from './shelf-lines'

/** A row that was weighed: what the file says of it, and what is to be done. */
interface Weighed { told: PaintsPlan['rows'][number], draft: PaintDraft | null, now: ShelfLine | null, retired: boolean | undefined }

/**
 * Takes a file of paints in, or only tells what it would do. A row with the id of a paint of this shelf changes that paint;
 * any other adds one. Rows that cannot be taken are named with their reasons and left out; the others are taken in together, or none.
 */
export async function takeInPaints(ctx: Ctx, csv: string, dryRun: boolean): Promise<PaintsPlan> {
  assertMay(ctx, 'shelf:change')
  return inTransaction(ctx, async (tx) => {
    const read = readPaintsCsv(csv)
    if (!read.ok) throw new Problem({ code: 'input/invalid', fields: [{ path: 'csv', message: `Row ${read.row}: ${read.because}` }] })
    const shelf = await shelfLines(tx)
    const weighed: Weighed[] = []
    for (const row of read.rows) {
      weighed.push(weigh(row, shelf, weighed))
      await othersFirst()
    }
    if (!dryRun) for (const each of weighed) await takeIn(tx, each)
    return { dryRun, rows: weighed.map(each => each.told), unread: read.unread }
  })
}

function weigh(row: SaidRow, shelf: readonly ShelfLine[], before: readonly Weighed[]): Weighed {
  const now = shelf.find(({ line }) => line.id === row.id) ?? null
  const { id: _id, retired: _retired, ...standing } = now?.line ?? { id: '', retired: false }
  const paint = paintOfRow(row, now ? standing as PaintDraft : null)
  const name = paint.ok ? paint.draft.name : typeof row.said.name === 'string' ? row.said.name : now?.line.name ?? ''
  const rejected = (...reasons: string[]): Weighed => ({ told: { row: row.row, name, does: 'rejected', reasons }, draft: null, now, retired: undefined })
  if (!paint.ok) return rejected(...paint.reasons)

  const { draft } = paint
  const twin = before.find(each => each.draft && (now ? each.now === now : !each.now && each.draft.name === draft.name))
  if (twin) return rejected(`Row ${twin.told.row} is the same paint.`)
  if (!now && shelf.some(({ line }) => line.name === draft.name)) return rejected('A paint of that name is on the shelf. Give its id to change it, or another name to add one.')
  if (!now || !isSameKnown(now.line.known, draft.known)) {
    const fault = colourFault(draft)
    if (fault) return rejected(`known_by gives no colour to calculate with: ${fault}`)
  }
  const retired = row.retired
  const taken = (does: 'adds' | 'changes' | 'stays', reasons: string[]): Weighed => ({ told: { row: row.row, name, does, reasons }, draft, now, retired })
  if (!now) return taken('adds', row.id ? ['No paint of this shelf has that id; it gets a new one.'] : [])
  const changed = changedColumns(now.line, { ...draft, retired: retired ?? now.line.retired })
  return taken(changed.length > 0 ? 'changes' : 'stays', changed)
}

function colourFault(draft: PaintDraft): string | null {
  try {
    deriveOptics(draft.known)
    return null
  }
  catch (error) {
    if (error instanceof Problem && error.data.code === 'paint/unknown-colour') return error.data.reason
    throw error
  }
}

async function takeIn(tx: Ctx, { told, draft, now, retired }: Weighed): Promise<void> {
  if (!draft) return
  switch (told.does) {
    case 'adds': {
      const { id, version } = await addPaint(tx, draft)
      if (retired) await changePaint(tx, id, version, { ...draft, retired })
      return
    }
    case 'changes':
      if (now) await changePaint(tx, now.line.id, now.version, { ...draft, ...retired === undefined ? {} : { retired } })
      return
    case 'stays':
    case 'rejected':
  }
}
