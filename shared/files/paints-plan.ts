import { z } from 'zod'
import { PAINTS_FILE_MAX } from './paints-csv'

/** How the file of a shelf is wanted. */
export const PaintsFileQuery = z.object({
  /** With semicolons, figures have decimal commas. */
  form: z.enum(['comma', 'semicolon']).default('comma'),
  /** A byte order mark first, by which spreadsheets know UTF-8. */
  bom: z.stringbool().default(true),
})
export type PaintsFileQuery = z.output<typeof PaintsFileQuery>

/** A file of paints to be taken in, as text. */
export const PaintsFile = z.object({ csv: z.string().min(1, 'The file is empty.').max(PAINTS_FILE_MAX, 'A file of paints weighs at most 2 MB.') })
export type PaintsFile = z.output<typeof PaintsFile>

/** What taking a file of paints in will do, or did, row by row as a spreadsheet counts them. */
export const PaintsPlan = z.object({
  dryRun: z.boolean(),
  rows: z.array(z.object({
    row: z.number().int(),
    name: z.string(),
    does: z.enum(['adds', 'changes', 'stays', 'rejected']),
    /** Why it is rejected, or which fields change; sentences and names of columns. */
    reasons: z.array(z.string()),
  })),
  /** Columns that are not read. */
  unread: z.array(z.string()),
})
export type PaintsPlan = z.output<typeof PaintsPlan>
