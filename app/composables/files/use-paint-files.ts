import { api } from '~/composables/api/api'
import { SHELF_KEY } from '~/composables/shelf/shelf-keys'
import { PAINTS_FILE_MAX } from '#shared/files/paints-csv'
import { PaintsPlan } from '#shared/files/paints-plan'
import { Problem } from '#shared/errors/problem'
import { saveAs } from './save-as'

/** The shelf as a file; each verb throws when it is refused. */
export interface PaintFiles {
  /** Saves the shelf as CSV: commas with decimal points, or semicolons with decimal commas. */
  takeOut: (form: 'comma' | 'semicolon') => Promise<void>
  /** What bringing a file in would do, row by row. */
  look: (file: File) => Promise<PaintsPlan>
  /** Brings in what was not rejected. */
  bringIn: (file: File, key: string) => Promise<PaintsPlan>
}

/** Taking the shelf out and bringing paints in. */
export function usePaintFiles(): PaintFiles {
  async function textOf(file: File): Promise<string> {
    if (file.size > PAINTS_FILE_MAX) throw new Problem({ code: 'request/too-large' })
    return file.text()
  }
  return {
    async takeOut(form) {
      const csv: unknown = await api('/api/paints/file', { query: { form, bom: 'true' } })
      // Reading an answer as text drops its byte order mark, by which a spreadsheet knows UTF-8.
      const text = String(csv)
      saveAs('shelf.csv', text.startsWith('\uFEFF') ? text : `\uFEFF${text}`, 'text/csv')
    },
    async look(file) {
      return PaintsPlan.parse(await api('/api/paints/file', { method: 'POST', query: { dryRun: 'true' }, body: { csv: await textOf(file) } }))
    },
    async bringIn(file, key) {
      const plan = PaintsPlan.parse(await api('/api/paints/file', { method: 'POST', body: { csv: await textOf(file) }, headers: { 'idempotency-key': key } }))
      await refreshNuxtData(SHELF_KEY)
      return plan
    },
  }
}
