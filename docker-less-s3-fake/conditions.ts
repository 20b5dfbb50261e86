import { noSuchKey, preconditionFailed, S3Error } from './s3-error'
import type { ObjectRecord } from './bucket'

const names = (header: string) => header.split(',').map(tag => tag.trim().replace(/^W\//, '').replace(/^"|"$/g, ''))
const matches = (header: string, etag: string) => header.trim() === '*' || names(header).includes(etag)

/** Times travel in whole seconds. */
const seconds = (time: number) => Math.floor(time / 1000)

/** Holds a read against its conditions (RFC 9110, section 13.2.2); returns true when the reader has the object already. */
export function isNotModified(headers: Record<string, string>, record: ObjectRecord): boolean {
  const { 'if-match': match, 'if-none-match': noneMatch, 'if-modified-since': since, 'if-unmodified-since': until } = headers
  const modified = seconds(record.modifiedAt)
  if (match !== undefined) {
    if (!matches(match, record.etag)) throw preconditionFailed()
  }
  else if (until !== undefined && modified > seconds(Date.parse(until))) throw preconditionFailed()
  if (noneMatch !== undefined) return matches(noneMatch, record.etag)
  return since !== undefined && modified <= seconds(Date.parse(since))
}

/** The check a conditional write makes against the version it would replace. */
export function writeCondition(headers: Record<string, string>): (present: ObjectRecord | undefined) => void {
  const { 'if-match': match, 'if-none-match': noneMatch } = headers
  return (present) => {
    if (noneMatch !== undefined && present && matches(noneMatch, present.etag)) throw preconditionFailed()
    if (match === undefined) return
    if (!present) throw noSuchKey()
    if (!matches(match, present.etag)) throw preconditionFailed()
  }
}

/** The stretch of an object a Range header asks for, ends included; undefined stands for all of it. */
export function readRange(header: string | undefined, bytes: number): { start: number, end: number } | undefined {
  const match = /^bytes=(\d*)-(\d*)$/.exec(header?.trim() ?? '')
  const [, first = '', last = ''] = match ?? []
  if (first === '' && last === '') return undefined
  const start = first === '' ? Math.max(0, bytes - Number(last)) : Number(first)
  const end = first === '' || last === '' ? bytes - 1 : Math.min(Number(last), bytes - 1)
  if (first !== '' && last !== '' && Number(last) < Number(first)) return undefined
  if (start >= bytes || (first === '' && Number(last) === 0)) {
    throw new S3Error('InvalidRange', 'The requested range is not satisfiable', 416, { 'content-range': `bytes */${bytes}` })
  }
  return { start, end }
}
