import { randomBytes } from 'node:crypto'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { S3Client, S3ServiceException } from '@aws-sdk/client-s3'
import type { S3ClientConfig } from '@aws-sdk/client-s3'
import { startObjectServer } from '../../../docker-less-s3-fake/server'

export const KEYS = { accessKeyId: 'AKIAWORKSHOP', secretAccessKey: 'kept between the two of us', region: 'us-east-1' }
export const BUCKET = 'workshop-photos'

/** Starts an object server on a folder of its own, with the SDK's client as its only customer. */
export async function openFake(bodyBytesMax?: number) {
  const root = await mkdtemp(join(tmpdir(), 'objects-'))
  const server = await startObjectServer({ root, ...KEYS, buckets: [BUCKET], ...(bodyBytesMax ? { bodyBytesMax } : {}) })
  const clients: S3Client[] = []
  const client = (more: Partial<S3ClientConfig> = {}) => {
    const made = new S3Client({ endpoint: server.endpoint, region: KEYS.region, forcePathStyle: true, credentials: KEYS, maxAttempts: 1, ...more })
    clients.push(made)
    return made
  }
  const close = async () => {
    for (const made of clients) made.destroy()
    await server.close()
    await rm(root, { recursive: true })
  }
  return { root, endpoint: server.endpoint, client, close }
}

/** What the SDK was refused with: the error's name and the HTTP status. */
export async function refusalOf(asked: Promise<unknown>): Promise<string> {
  try {
    await asked
    return 'let in'
  }
  catch (error) {
    if (!(error instanceof S3ServiceException)) throw error
    return `${error.name} ${error.$metadata.httpStatusCode}`
  }
}

export const photo = (bytes: number) => new Uint8Array(randomBytes(bytes))
