import { Problem } from '#shared/errors/problem'
import { readSchemeFile } from '#shared/files/read-scheme-file'
import type { SchemeFile } from '#shared/files/scheme-file'

/** A value as a scheme file, or input/invalid with every place where it is none. */
export function checkedSchemeFile(value: unknown): SchemeFile {
  const read = readSchemeFile(value)
  if (!read.ok) throw new Problem({ code: 'input/invalid', fields: read.faults })
  return read.file
}
