import { randomUUID } from 'node:crypto'
import { mkdir, readdir, readFile, rename, rm, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { md5Hex } from './checksums'
import { invalidArgument, noSuchUpload, S3Error } from './s3-error'

const PART_NUMBER_MAX = 10_000
/** Every part but the last holds at least this much, in bytes. */
const PART_BYTES_MIN = 5 * 1024 * 1024

/** What was said when an upload in parts began. */
export interface UploadStart {
  key: string
  headers: Record<string, string>
}

/** A part as the client names it when it puts the object together. */
export interface PartName {
  number: number
  etag: string
}

/** Uploads in parts that have begun and are neither finished nor given up: one folder each. */
export class UploadStore {
  constructor(private readonly root: string) {}

  async begin(start: UploadStart): Promise<string> {
    const id = randomUUID()
    await mkdir(join(this.root, id))
    await writeFile(join(this.root, id, 'start.json'), JSON.stringify(start))
    return id
  }

  /** Refuses an id that was never given out, is done with, or belongs to another key. */
  async get(id: string, key: string): Promise<UploadStart> {
    if (!/^[0-9a-f-]{36}$/.test(id)) throw noSuchUpload()
    const text = await readFile(join(this.root, id, 'start.json'), 'utf8').catch(() => undefined)
    if (text === undefined) throw noSuchUpload()
    const start = JSON.parse(text) as UploadStart
    if (start.key !== key) throw noSuchUpload()
    return start
  }

  /** Keeps a part; the same number again replaces it. Returns its ETag without quotes. */
  async putPart(id: string, key: string, number: number, body: Uint8Array): Promise<string> {
    if (!Number.isInteger(number) || number < 1 || number > PART_NUMBER_MAX) throw invalidArgument('Part number must be between 1 and 10000')
    await this.get(id, key)
    const path = join(this.root, id, `part-${number}`)
    const fresh = `${path}.${randomUUID()}`
    await writeFile(fresh, body)
    await rename(fresh, path)
    return md5Hex(body)
  }

  /** Puts the named parts together, within `most` bytes. */
  async assemble(id: string, key: string, names: readonly PartName[], most: number): Promise<{ bytes: Buffer, etag: string }> {
    await this.get(id, key)
    if (names.length === 0) throw new S3Error('MalformedXML', 'An upload is completed from at least one part', 400)
    if (names.some((name, index) => index > 0 && name.number <= (names[index - 1]?.number ?? 0))) {
      throw new S3Error('InvalidPartOrder', 'The list of parts was not in ascending order.', 400)
    }
    const parts: Buffer[] = []
    let total = 0
    for (const [index, name] of names.entries()) {
      const part = await readFile(join(this.root, id, `part-${name.number}`)).catch(() => undefined)
      if (!part || md5Hex(part) !== name.etag) throw new S3Error('InvalidPart', `Part ${name.number} could not be found or has changed.`, 400)
      const isLast = index === names.length - 1
      if (!isLast && part.length < PART_BYTES_MIN) {
        throw new S3Error('EntityTooSmall', 'Your proposed upload is smaller than the minimum allowed object size.', 400)
      }
      total += part.length
      if (total > most) throw new S3Error('EntityTooLarge', 'Your proposed upload exceeds the maximum allowed object size.', 400)
      parts.push(part)
    }
    const digests = Buffer.concat(names.map(name => Buffer.from(name.etag, 'hex')))
    return { bytes: Buffer.concat(parts), etag: `${md5Hex(digests)}-${names.length}` }
  }

  async forget(id: string): Promise<void> {
    await rm(join(this.root, id), { recursive: true, force: true })
  }

  async hasAny(): Promise<boolean> {
    return (await readdir(this.root)).length > 0
  }
}
