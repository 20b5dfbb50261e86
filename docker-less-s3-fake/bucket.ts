import { randomUUID } from 'node:crypto'
import { mkdir, readdir, readFile, rename, rm, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { sha256Hex } from './checksums'
import { UploadStore } from './upload-store'

/** Everything known about an object except its bytes. */
export interface ObjectRecord {
  key: string
  /** Name of the file that holds the bytes; every version has its own, so a reader never sees half of two. */
  file: string
  bytes: number
  etag: string
  modifiedAt: number
  /** Headers S3 gives back as they came: Content-Type and its like, and `x-amz-meta-…`. */
  headers: Record<string, string>
  /** Sums by algorithm, base64. */
  checksums: Record<string, string>
}

/** What a writer knows of a new object. */
export type NewObject = Omit<ObjectRecord, 'file' | 'modifiedAt'>

/**
 * One bucket on disk: `records/<hash of key>.json` beside `data/<file>`. A new version writes its own data file, and
 * the rename of its record is the moment it becomes true. This process is the only writer, so the index in memory holds.
 */
export class Bucket {
  private readonly index = new Map<string, ObjectRecord>()
  private sorted: ObjectRecord[] | undefined
  private turn: Promise<unknown> = Promise.resolve()
  readonly uploads: UploadStore

  private constructor(readonly name: string, private readonly root: string) {
    this.uploads = new UploadStore(join(root, 'uploads'))
  }

  /** Opens a bucket's folder, making it when it is new, and forgets data that no record names. */
  static async open(name: string, root: string): Promise<Bucket> {
    const bucket = new Bucket(name, root)
    for (const part of ['records', 'data', 'uploads']) await mkdir(join(root, part), { recursive: true })
    for (const file of await readdir(join(root, 'records'))) {
      if (!file.endsWith('.json')) await rm(join(root, 'records', file))
      else bucket.remember(JSON.parse(await readFile(join(root, 'records', file), 'utf8')) as ObjectRecord)
    }
    const named = new Set([...bucket.index.values()].map(record => record.file))
    for (const file of await readdir(join(root, 'data'))) {
      if (!named.has(file)) await rm(bucket.dataPath(file))
    }
    return bucket
  }

  find(key: string): ObjectRecord | undefined {
    return this.index.get(key)
  }

  /** All records in the order of their keys' bytes, as S3 lists them. */
  list(): readonly ObjectRecord[] {
    this.sorted ??= [...this.index.values()]
      .map(record => ({ record, order: Buffer.from(record.key) }))
      .sort((a, b) => Buffer.compare(a.order, b.order))
      .map(({ record }) => record)
    return this.sorted
  }

  /** Where an object's bytes lie. */
  dataPath(file: string): string {
    return join(this.root, 'data', file)
  }

  /** Keeps an object; `allow` sees the version it would replace and may throw, with no other writer in between. */
  async put(object: NewObject, body: Uint8Array, allow: (present: ObjectRecord | undefined) => void): Promise<ObjectRecord> {
    const record: ObjectRecord = { ...object, file: randomUUID(), modifiedAt: Date.now() }
    await writeFile(this.dataPath(record.file), body, { flush: true })
    return this.inTurn(async () => {
      const present = this.index.get(object.key)
      try {
        allow(present)
        const path = this.recordPath(object.key)
        await writeFile(`${path}.new`, JSON.stringify(record), { flush: true })
        await rename(`${path}.new`, path)
      }
      catch (error) {
        await rm(this.dataPath(record.file), { force: true })
        throw error
      }
      this.remember(record)
      if (present) await rm(this.dataPath(present.file), { force: true })
      return record
    })
  }

  /** Forgets an object; one that is not there is no error. */
  async remove(key: string): Promise<void> {
    await this.inTurn(async () => {
      const present = this.index.get(key)
      if (!present) return
      await rm(this.recordPath(key), { force: true })
      this.index.delete(key)
      this.sorted = undefined
      await rm(this.dataPath(present.file), { force: true })
    })
  }

  private remember(record: ObjectRecord): void {
    this.index.set(record.key, record)
    this.sorted = undefined
  }

  /** Keys may hold anything, so a file is named by the key's hash and can lie nowhere else. */
  private recordPath(key: string): string {
    return join(this.root, 'records', `${sha256Hex(key)}.json`)
  }

  private inTurn<T>(work: () => Promise<T>): Promise<T> {
    const done = this.turn.then(work, work)
    this.turn = done.catch(() => undefined)
    return done
  }
}
