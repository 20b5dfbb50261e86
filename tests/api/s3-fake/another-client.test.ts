import { execFile } from 'node:child_process'
import { existsSync } from 'node:fs'
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { promisify } from 'node:util'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { BUCKET, KEYS, openFake, photo } from './fake'

const AWSCLI = '/usr/bin/aws'
const run = promisify(execFile)

let fake: Awaited<ReturnType<typeof openFake>>
let folder: string
beforeAll(async () => {
  if (!existsSync(AWSCLI)) throw new Error('The Debian package awscli is missing: apt-get install -y awscli')
  fake = await openFake()
  folder = await mkdtemp(join(tmpdir(), 'another-client-'))
})
afterAll(async () => {
  await fake.close()
  await rm(folder, { recursive: true })
})

const aws = (...args: string[]) => run(AWSCLI, ['--endpoint-url', fake.endpoint, ...args], {
  env: {
    PATH: '/usr/bin:/bin',
    HOME: folder,
    AWS_ACCESS_KEY_ID: KEYS.accessKeyId,
    AWS_SECRET_ACCESS_KEY: KEYS.secretAccessKey,
    AWS_DEFAULT_REGION: KEYS.region,
    AWS_EC2_METADATA_DISABLED: 'true',
  },
})

describe('a client of other make (Debian\'s awscli)', () => {
  it('makes a bucket, sends in parts, lists, fetches and deletes', async () => {
    const body = photo(9 * 1024 * 1024)
    await writeFile(join(folder, 'large.bin'), body)
    await aws('s3', 'mb', 's3://second-bucket')
    await aws('s3', 'cp', '--quiet', join(folder, 'large.bin'), `s3://${BUCKET}/folder/läger & co.bin`)
    const { stdout } = await aws('s3', 'ls', '--recursive', `s3://${BUCKET}/`)
    expect(stdout).toMatch(/ 9437184 folder\/läger & co\.bin/)
    await aws('s3', 'cp', '--quiet', `s3://${BUCKET}/folder/läger & co.bin`, join(folder, 'back.bin'))
    expect((await readFile(join(folder, 'back.bin'))).equals(body)).toBe(true)
    const { stdout: url } = await aws('s3', 'presign', `s3://${BUCKET}/folder/läger & co.bin`)
    expect((await fetch(url.trim())).headers.get('content-length')).toBe('9437184')
    await aws('s3', 'rm', '--quiet', '--recursive', `s3://${BUCKET}/folder/`)
    expect((await aws('s3', 'ls', '--recursive', `s3://${BUCKET}/`).catch(() => ({ stdout: '' }))).stdout).toBe('')
  }, 120_000)
})
