import { mkdir, readdir, rm } from 'node:fs/promises'
import { join } from 'node:path'
import { Bucket } from './bucket'
import { S3Error } from './s3-error'

const BUCKET_NAME = /^(?!.*\.\.)[a-z0-9][a-z0-9.-]{1,61}[a-z0-9]$/

/** All buckets below one folder. */
export class Store {
  private readonly buckets = new Map<string, Bucket>()
  private constructor(private readonly root: string) {}

  /** Opens whatever lies in `root`, making the folder when it is new. */
  static async open(root: string): Promise<Store> {
    const store = new Store(root)
    await mkdir(root, { recursive: true })
    for (const entry of await readdir(root, { withFileTypes: true })) {
      if (entry.isDirectory() && BUCKET_NAME.test(entry.name)) store.buckets.set(entry.name, await Bucket.open(entry.name, join(root, entry.name)))
    }
    return store
  }

  names(): string[] {
    return [...this.buckets.keys()].sort()
  }

  find(name: string): Bucket {
    const bucket = this.buckets.get(name)
    if (!bucket) throw new S3Error('NoSuchBucket', 'The specified bucket does not exist', 404)
    return bucket
  }

  async create(name: string): Promise<void> {
    if (!BUCKET_NAME.test(name)) throw new S3Error('InvalidBucketName', 'The specified bucket is not valid.', 400)
    if (this.buckets.has(name)) {
      throw new S3Error('BucketAlreadyOwnedByYou', 'Your previous request to create the named bucket succeeded and you already own it.', 409)
    }
    this.buckets.set(name, await Bucket.open(name, join(this.root, name)))
  }

  async remove(name: string): Promise<void> {
    const bucket = this.find(name)
    if (bucket.list().length > 0 || await bucket.uploads.hasAny()) {
      throw new S3Error('BucketNotEmpty', 'The bucket you tried to delete is not empty', 409)
    }
    this.buckets.delete(name)
    await rm(join(this.root, name), { recursive: true })
  }
}
