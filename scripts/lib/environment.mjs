// The environment as the start scripts see it. Only node: built-ins, since nothing is installed yet when it is read.
import { existsSync } from 'node:fs'
import { dirname, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { Halt } from './say.mjs'

/** The folder of the repository. */
export const ROOT = resolve(dirname(fileURLToPath(import.meta.url)), '../..')

const OLDEST_NODE = [20, 19]
const STORE = ['S3_ENDPOINT', 'S3_BUCKET', 'S3_REGION', 'S3_ACCESS_KEY_ID', 'S3_SECRET_ACCESS_KEY']

/**
 * @typedef {object} Place where this copy of the application lives, and which services it was given from outside
 * @property {number} port
 * @property {string} host
 * @property {string} dataDir absolute
 * @property {string} publicUrl
 * @property {NodeJS.ProcessEnv} env
 * @property {{ database: boolean, photos: boolean, mail: boolean }} outside
 */

/** Stops on a Node that is too old to run any of this. */
export function assertNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number)
  const [oldest = 0, oldestMinor = 0] = OLDEST_NODE
  if (major < oldest || (major === oldest && minor < oldestMinor)) {
    throw new Halt(`Node ${process.versions.node} is too old.`, `Install Node ${OLDEST_NODE.join('.')} or newer.`)
  }
}

/** The environment of this process, with what .env adds to it. */
export function processEnvironment() {
  const file = resolve(ROOT, '.env')
  if (existsSync(file)) process.loadEnvFile(file)
  return process.env
}

/**
 * Of settings that only make sense together: true when all are there.
 * @param {NodeJS.ProcessEnv} env
 * @param {string[]} names
 */
function allOrNone(env, names) {
  const missing = names.filter(name => !env[name])
  if (missing.length === 0 || missing.length === names.length) return missing.length === 0
  throw new Halt(`Wrong settings: ${names.filter(name => env[name]).join(', ')} set without ${missing.join(', ')}.`, 'Set all of them or none; see .env.example.')
}

/**
 * Reads where to run and what not to start ourselves.
 * @param {NodeJS.ProcessEnv} env
 * @returns {Place}
 */
export function readPlace(env) {
  const port = Number(env.PORT || 3000)
  if (!Number.isInteger(port) || port < 1 || port > 65_535) throw new Halt(`Wrong settings: PORT is ${env.PORT}.`, 'PORT is a number from 1 to 65535.')
  const host = env.HOST || '127.0.0.1'
  const outside = {
    database: allOrNone(env, ['DATABASE_URL', 'DATABASE_OWNER_URL']),
    photos: allOrNone(env, STORE),
    mail: allOrNone(env, ['SMTP_URL', 'MAIL_FROM']),
  }
  if (outside.database && !env.SESSION_PASSWORD) {
    throw new Halt('Wrong settings: SESSION_PASSWORD is missing.', 'With a DATABASE_URL of your own, set SESSION_PASSWORD to 32 or more random characters.')
  }
  const shownHost = host === '0.0.0.0' || host === '::' ? '127.0.0.1' : host
  const publicUrl = env.PUBLIC_URL || `http://${shownHost.includes(':') ? `[${shownHost}]` : shownHost}:${port}`
  return { port, host, dataDir: resolve(ROOT, env.DATA_DIR || '.data'), publicUrl, env, outside }
}
