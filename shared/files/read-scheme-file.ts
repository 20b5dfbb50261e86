import { SCHEME_FILE_FORMAT, SCHEME_FILE_VERSION, SchemeFile } from './scheme-file'
import { unknownFields } from './unknown-fields'
import { schemeFileFaults } from './scheme-file-faults'

/** Something a file says that cannot be taken in: where it stands (`paints.2.known`) and why not, as a sentence. */
export interface FileFault { path: string, message: string }

/** What came out of reading a file. */
export type ReadFile = { ok: true, file: SchemeFile } | { ok: false, faults: FileFault[] }

/** A file that is wrong everywhere says so at this many places. */
const FAULTS_TOLD = 20

/** Reads a value as a scheme file: nothing is guessed, dropped or mended; whatever is not as the format says is told with its place. */
export function readSchemeFile(value: unknown): ReadFile {
  const kind = kindFault(value)
  if (kind) return { ok: false, faults: [kind] }
  const parsed = SchemeFile.safeParse(value)
  if (!parsed.success)
    return told(parsed.error.issues.map(issue => ({ path: issue.path.join('.'), message: sentenceOf(issue.message) })))
  const extra = unknownFields(value, parsed.data)
  if (extra.length > 0) return told(extra.map(path => ({ path, message: `A scheme file of version ${SCHEME_FILE_VERSION} has no such field.` })))
  const faults = schemeFileFaults(parsed.data)
  return faults.length > 0 ? told(faults) : { ok: true, file: parsed.data }
}

function told(faults: FileFault[]): ReadFile {
  return { ok: false, faults: faults.slice(0, FAULTS_TOLD) }
}

function kindFault(value: unknown): FileFault | null {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) return { path: '', message: 'This is no scheme file: a scheme file is one JSON object.' }
  const { format, version } = value as { format?: unknown, version?: unknown }
  if (format !== SCHEME_FILE_FORMAT) return { path: 'format', message: `This is no scheme file: its format is not “${SCHEME_FILE_FORMAT}”.` }
  if (version === SCHEME_FILE_VERSION) return null
  const newer = typeof version === 'number' && version > SCHEME_FILE_VERSION
  return {
    path: 'version',
    message: newer
      ? `This file is of version ${version}, written by a newer workshop; this one reads version ${SCHEME_FILE_VERSION}.`
      : `A scheme file names its version; this workshop reads version ${SCHEME_FILE_VERSION}.`,
  }
}

function sentenceOf(message: string): string {
  const first = message.charAt(0).toUpperCase() + message.slice(1)
  return /[.!?]$/.test(first) ? first : `${first}.`
}
