// The services an application needs beside itself: PostgreSQL, a photo store, a mail server.
import { mkdirSync } from 'node:fs'
import { join } from 'node:path'
import { startCluster } from './postgres.mjs'
import { say } from './say.mjs'
import { importTypeScript } from './type-script.mjs'

export const STORE = { accessKeyId: 'countershade', region: 'us-east-1', bucket: 'countershade' }

/** @typedef {import('./until-stopped.mjs').Closing} Closing */
/** @typedef {typeof import('../../docker-less-s3-fake/server.ts')} StoreModule */
/** @typedef {typeof import('../mail-sink.ts')} MailModule */

/**
 * Starts the database cluster of a data folder.
 * @param {{ dataDir: string, isHasty?: boolean }} options
 * @param {Closing} closing
 */
export async function openPostgres(options, closing) {
  const cluster = await startCluster(options)
  await closing.add('PostgreSQL', cluster.stop)
  return cluster.adminUrl
}

/**
 * Starts the photo store of a data folder and returns where it is.
 * @param {{ dataDir: string, secret: string, buckets: string[] }} options
 * @param {Closing} closing
 */
export async function openPhotoStore({ dataDir, secret, buckets }, closing) {
  const { startObjectServer } = /** @type {StoreModule} */ (await importTypeScript('docker-less-s3-fake/server.ts'))
  const root = join(dataDir, 'objects')
  mkdirSync(root, { recursive: true, mode: 0o700 })
  const server = await startObjectServer({
    root,
    accessKeyId: STORE.accessKeyId,
    secretAccessKey: secret,
    region: STORE.region,
    buckets,
    onError: error => say(`photo store: ${error instanceof Error ? error.message : error}`),
  })
  await closing.add('The photo store', server.close)
  return server.endpoint
}

/**
 * Starts the mail sink of a data folder and returns where it is.
 * @param {{ dataDir: string, isQuiet?: boolean }} options
 * @param {Closing} closing
 */
export async function openMailSink({ dataDir, isQuiet = false }, closing) {
  const { startMailSink } = /** @type {MailModule} */ (await importTypeScript('scripts/mail-sink.ts'))
  const folder = join(dataDir, 'mail')
  const sink = await startMailSink(folder, (mail) => {
    if (!isQuiet) say(`✉ to ${mail.to.join(', ')}: ${mail.subject} (${join(folder, mail.file)})`)
  })
  await closing.add('The mail sink', sink.close)
  return { url: sink.url, folder }
}
