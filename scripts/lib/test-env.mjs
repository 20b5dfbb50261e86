// The ground the tests stand on: services of their own in a folder that is removed at the end. Tests find them by
//
//   TEST_PG_ADMIN_URL            superuser's address of the database `postgres`; roles countershade_owner and countershade_app exist
//   TEST_S3_ENDPOINT             the photo store; the bucket of TEST_S3_BUCKET exists
//   TEST_S3_BUCKET, TEST_S3_REGION, TEST_S3_ACCESS_KEY_ID, TEST_S3_SECRET_ACCESS_KEY
//   TEST_SMTP_URL                a mail server that delivers nothing
//   TEST_MAIL_DIR                where it keeps letters: <time>-<id>.eml, listed in index.json as { file, from, to, subject, arrivedAt }
//
// Browser tests find besides
//
//   TEST_BASE_URL                the built application, with the demo workshop in it
//   TEST_DEMO_SIGN_INS           file with the demo's sign-ins: [{ email, password, role }]
import { chmodSync, existsSync, mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { BUILT_SERVER, serve } from './application.mjs'
import { openMailSink, openPhotoStore, openPostgres, STORE } from './local-services.mjs'
import { HELD, takeDataDir, takeLock } from './one-at-a-time.mjs'
import { freePort } from './ports.mjs'
import { removeCluster } from './postgres.mjs'
import { openLocalDatabase, seedDemo } from './workshop-data.mjs'

/** @typedef {import('./until-stopped.mjs').Closing} Closing */

const SECRET = 'for tests only, and long enough for them'
const FOLDER = 'countershade-test-'
const BUCKETS = { api: 'countershade-test', browser: 'countershade-browser' }

/** Removes what earlier runs left behind that were killed; a run that still goes on holds its folder. */
async function sweepKilledRuns() {
  for (const name of readdirSync(tmpdir()).filter(one => one.startsWith(FOLDER))) {
    const folder = join(tmpdir(), name)
    const held = join(folder, HELD)
    if (!existsSync(held) || !takeLock(held)) continue
    await removeCluster(folder)
    rmSync(folder, { recursive: true, force: true })
  }
}

/**
 * Starts the services and returns the environment that names them.
 * @param {Closing} closing
 */
export async function openTestServices(closing) {
  await sweepKilledRuns()
  const dataDir = mkdtempSync(join(tmpdir(), FOLDER))
  takeDataDir(dataDir)
  // PostgreSQL's own account must get through to its folder.
  chmodSync(dataDir, 0o711)
  await closing.add('The folder of the tests', async () => {
    await removeCluster(dataDir)
    rmSync(dataDir, { recursive: true, force: true })
  })
  const adminUrl = await openPostgres({ dataDir, isHasty: true }, closing)
  const storeUrl = await openPhotoStore({ dataDir, secret: SECRET, buckets: Object.values(BUCKETS) }, closing)
  const mail = await openMailSink({ dataDir, isQuiet: true }, closing)
  await openLocalDatabase(adminUrl, 'roles_are_made')
  return {
    dataDir,
    env: {
      TEST_PG_ADMIN_URL: adminUrl,
      TEST_S3_ENDPOINT: storeUrl,
      TEST_S3_BUCKET: BUCKETS.api,
      TEST_S3_REGION: STORE.region,
      TEST_S3_ACCESS_KEY_ID: STORE.accessKeyId,
      TEST_S3_SECRET_ACCESS_KEY: SECRET,
      TEST_SMTP_URL: mail.url,
      TEST_MAIL_DIR: mail.folder,
      AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
    },
  }
}

/**
 * Serves the built application with the demo workshop, for the browser tests; what it prints is kept.
 * @param {Awaited<ReturnType<typeof openTestServices>>} services
 * @param {Closing} closing
 */
export async function openTestApplication({ dataDir, env: test }, closing) {
  const port = await freePort()
  const baseUrl = `http://127.0.0.1:${port}`
  const { databaseUrl } = await openLocalDatabase(test.TEST_PG_ADMIN_URL, 'browser')
  const env = {
    ...process.env,
    NODE_ENV: 'production',
    PORT: String(port),
    HOST: '127.0.0.1',
    DATA_DIR: dataDir,
    PUBLIC_URL: baseUrl,
    DATABASE_URL: databaseUrl,
    S3_ENDPOINT: test.TEST_S3_ENDPOINT,
    S3_BUCKET: BUCKETS.browser,
    S3_REGION: test.TEST_S3_REGION,
    S3_ACCESS_KEY_ID: test.TEST_S3_ACCESS_KEY_ID,
    S3_SECRET_ACCESS_KEY: test.TEST_S3_SECRET_ACCESS_KEY,
    SMTP_URL: test.TEST_SMTP_URL,
    MAIL_FROM: 'Countershade <workshop@countershade.invalid>',
    SESSION_PASSWORD: SECRET,
    NUXT_SESSION_PASSWORD: SECRET,
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
  }
  await seedDemo(env, { show: false })
  const { output } = await serve({ args: BUILT_SERVER, env, host: '127.0.0.1', port, stdio: 'pipe' }, closing)
  return { output, env: { TEST_BASE_URL: baseUrl, TEST_DEMO_SIGN_INS: join(dataDir, 'demo-sign-ins.json') } }
}
