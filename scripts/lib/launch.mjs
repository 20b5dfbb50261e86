// From a bare machine to a running application; what `npm start` and `npm run dev` have in common.
import { mkdirSync } from 'node:fs'
import { ensureBuild, BUILT_SERVER, developmentServer, serve } from './application.mjs'
import { ensureDebianPackages, POSTGRESQL } from './debian-packages.mjs'
import { assertNode, processEnvironment, readPlace } from './environment.mjs'
import { openMailSink, openPhotoStore, openPostgres, STORE } from './local-services.mjs'
import { ensureNpmPackages } from './npm-packages.mjs'
import { takeDataDir } from './one-at-a-time.mjs'
import { assertPortIsFree } from './ports.mjs'
import { Halt, say, secondsSince, step } from './say.mjs'
import { localSecrets } from './secrets.mjs'
import { demoSignIns, migrateOutsideDatabase, openDemoDatabase } from './workshop-data.mjs'

/** @typedef {import('./environment.mjs').Place} Place */
/** @typedef {import('./until-stopped.mjs').Closing} Closing */

/** @param {Place} place */
function openDataDir({ dataDir }) {
  try {
    mkdirSync(dataDir, { recursive: true })
    return takeDataDir(dataDir)
  }
  catch (error) {
    if (error instanceof Halt) throw error
    throw new Halt(`The data folder ${dataDir} cannot be used: ${error instanceof Error ? error.message : error}`, 'Set DATA_DIR to a folder this user may write to.')
  }
}

/**
 * The whole environment of the server: what was set from outside, and what the local services answer to.
 * @param {Place} place
 * @param {{ sessionPassword: string, storeSecret: string }} secrets
 * @param {{ storeUrl: string | undefined, mailUrl: string | undefined }} services
 * @returns {NodeJS.ProcessEnv}
 */
function serverEnvironment({ port, host, dataDir, publicUrl, env }, secrets, { storeUrl, mailUrl }) {
  // The key to the tables stays here: the server has no use for it.
  const rest = { ...env }
  delete rest.DATABASE_OWNER_URL
  const sessionPassword = env.SESSION_PASSWORD || secrets.sessionPassword
  return {
    ...rest,
    PORT: String(port),
    HOST: host,
    DATA_DIR: dataDir,
    PUBLIC_URL: publicUrl,
    SESSION_PASSWORD: sessionPassword,
    NUXT_SESSION_PASSWORD: sessionPassword,
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
    ...(storeUrl && {
      S3_ENDPOINT: storeUrl,
      S3_BUCKET: STORE.bucket,
      S3_REGION: STORE.region,
      S3_ACCESS_KEY_ID: STORE.accessKeyId,
      S3_SECRET_ACCESS_KEY: secrets.storeSecret,
    }),
    ...(mailUrl && { SMTP_URL: mailUrl, MAIL_FROM: env.MAIL_FROM || 'Countershade <workshop@countershade.invalid>' }),
  }
}

/**
 * Starts the services that were not given from outside, and the database with its tables.
 * @param {Place} place
 * @param {Closing} closing
 */
async function openServices(place, closing) {
  const { dataDir, outside, env } = place
  const secrets = localSecrets(dataDir)
  const storeUrl = outside.photos ? undefined : await openPhotoStore({ dataDir, secret: secrets.storeSecret, buckets: [STORE.bucket] }, closing)
  const mail = outside.mail ? undefined : await openMailSink({ dataDir }, closing)
  const base = serverEnvironment(place, secrets, { storeUrl, mailUrl: mail?.url })
  closing.assertOpen()
  if (outside.database) {
    await migrateOutsideDatabase(env.DATABASE_OWNER_URL ?? '')
    return { env: base, mailFolder: mail?.folder }
  }
  const adminUrl = await step('Starting PostgreSQL', () => openPostgres({ dataDir }, closing))
  closing.assertOpen()
  const withDatabase = (/** @type {string} */ databaseUrl) => ({ ...base, DATABASE_URL: databaseUrl })
  const { databaseUrl } = await openDemoDatabase(adminUrl, dataDir, addresses => withDatabase(addresses.databaseUrl))
  return { env: withDatabase(databaseUrl), mailFolder: mail?.folder }
}

/** @param {Place} place @param {string | undefined} mailFolder @param {number} since */
function sayWhere({ publicUrl, dataDir, outside }, mailFolder, since) {
  say(`\nCountershade is at ${publicUrl} (ready after ${secondsSince(since)})`)
  const signIns = outside.database ? [] : demoSignIns(dataDir)
  if (signIns.length > 0) say('\nThe demo workshop lets in:')
  for (const { email, password, role } of signIns) say(`  ${email.padEnd(34)} ${password.padEnd(22)} ${role}`)
  if (mailFolder) say(`\nMail it sends is kept in ${mailFolder} and goes nowhere.`)
  say(`Data lies in ${dataDir}. Ctrl-C stops everything.\n`)
}

/**
 * Sets everything up and serves the application, built or as it is being worked on.
 * @param {{ isDevelopment: boolean }} how
 * @returns {(closing: Closing) => Promise<{ ended: Promise<number> }>}
 */
export const launch = ({ isDevelopment }) => async (closing) => {
  const since = Date.now()
  assertNode()
  const place = readPlace(processEnvironment())
  const lock = openDataDir(place)
  await closing.add('The data folder', lock.release)
  await assertPortIsFree(place.port, place.host)
  if (!place.outside.database) await ensureDebianPackages([POSTGRESQL])
  closing.assertOpen()
  await ensureNpmPackages()
  closing.assertOpen()
  if (!isDevelopment) await ensureBuild()
  closing.assertOpen()
  const { env, mailFolder } = await openServices(place, closing)
  closing.assertOpen()
  const { host, port } = place
  const args = isDevelopment ? developmentServer(host, port) : BUILT_SERVER
  const server = await serve({ args, env: { ...env, NODE_ENV: isDevelopment ? 'development' : 'production' }, host, port, onStart: lock.noteChild }, closing)
  sayWhere(place, mailFolder, since)
  return server
}
