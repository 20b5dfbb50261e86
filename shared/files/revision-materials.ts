import type { Materials } from '#shared/scheme/materials'
import type { FileRevision, SchemeFile } from './scheme-file'

/** What a revision of a file was made with, its optical data put back where a revision holds them. */
export function revisionMaterials(file: Pick<SchemeFile, 'optics'>, { materials }: Pick<FileRevision, 'materials'>): Materials {
  const data = new Map(file.optics.map(optics => [optics.id, optics.data]))
  return {
    paints: materials.paints.flatMap((paint) => {
      const optics = data.get(paint.opticsId)
      return optics ? [{ ...paint, optics }] : []
    }),
    blank: materials.blank,
  }
}
