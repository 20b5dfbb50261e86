// The built application: made again when what it is made of has changed, and served.
import { createHash } from 'node:crypto'
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs'
import { request } from 'node:http'
import { join } from 'node:path'
import { setTimeout as delay } from 'node:timers/promises'
import { ROOT } from './environment.mjs'
import { inTurn } from './one-at-a-time.mjs'
import { runOrHalt, startProgram, stopProgram } from './processes.mjs'
import { Halt, step } from './say.mjs'

const SOURCES = ['app', 'server', 'shared', 'public', 'scripts/build.mjs', 'nuxt.config.ts', 'tailwind.config.ts', 'tailwind.theme.ts', 'package.json', 'package-lock.json']
const STAMP = join(ROOT, '.output/made-of.txt')
const LOCK = join(ROOT, 'node_modules/.cache/countershade/build.lock')
const SERVER = join(ROOT, '.output/server/index.mjs')
const PATIENCE_MS = 60_000

/**
 * Every file at or below a path of the repository, sorted.
 * @param {string} path
 * @returns {string[]}
 */
function filesOf(path) {
  const full = join(ROOT, path)
  if (!existsSync(full)) return []
  try {
    return readdirSync(full, { withFileTypes: true })
      .sort((a, b) => (a.name < b.name ? -1 : 1))
      .flatMap(entry => (entry.isDirectory() ? filesOf(`${path}/${entry.name}`) : [`${path}/${entry.name}`]))
  }
  catch {
    return [path]
  }
}

/** One line that changes when anything the build is made of changes. */
function sourcesStamp() {
  const hash = createHash('sha256').update(process.versions.node)
  for (const file of SOURCES.flatMap(filesOf)) hash.update(`\n${file}\n`).update(readFileSync(join(ROOT, file)))
  return hash.digest('hex')
}

const isBuilt = () => existsSync(SERVER) && existsSync(STAMP) && readFileSync(STAMP, 'utf8') === sourcesStamp()

/**
 * Builds the application when it is not built yet, or was built from something else.
 * @param {typeof step} tell how the work is told
 */
export async function ensureBuild(tell = step) {
  if (isBuilt()) return
  await inTurn(LOCK, 'the application is being built', async () => {
    if (isBuilt()) return
    const stamp = sourcesStamp()
    await tell('Building the application', () => runOrHalt('The build', process.execPath, [join(ROOT, 'scripts/build.mjs')], { cwd: ROOT }))
    if (!existsSync(SERVER)) throw new Halt('The build ended without making a server.')
    writeFileSync(STAMP, stamp)
  })
}

/**
 * True when somebody answers HTTP there.
 * @param {string} host
 * @param {number} port
 * @returns {Promise<boolean>}
 */
function answers(host, port) {
  return new Promise((resolve) => {
    const asked = request({ host, port, path: '/favicon.svg', timeout: 5000 }, (response) => {
      response.resume()
      resolve(true)
    })
    asked.once('error', () => resolve(false))
    asked.once('timeout', () => asked.destroy())
    asked.end()
  })
}

/**
 * Starts a server program and waits until it answers.
 * @param {{ args: string[], env: NodeJS.ProcessEnv, host: string, port: number, stdio?: 'inherit' | 'pipe', onStart?: (pid: number) => void }} options
 * @param {import('./until-stopped.mjs').Closing} closing
 */
export async function serve({ args, env, host, port, stdio = 'inherit', onStart }, closing) {
  const server = startProgram(process.execPath, args, { cwd: ROOT, env, stdio })
  if (server.pid !== undefined) onStart?.(server.pid)
  await closing.add('The server', () => stopProgram(server))
  /** @type {string[]} */
  const output = []
  for (const stream of [server.stdout, server.stderr]) stream?.on('data', chunk => output.push(String(chunk)))
  /** @type {Promise<number>} */
  const ended = new Promise(resolve => server.once('exit', code => resolve(code ?? 1)))
  const knock = host === '0.0.0.0' ? '127.0.0.1' : host === '::' ? '::1' : host
  const until = Date.now() + PATIENCE_MS
  while (!await answers(knock, port)) {
    closing.assertOpen()
    if (server.exitCode !== null || server.signalCode !== null) throw new Halt(`The server ended while it started.\n${output.join('')}`)
    if (Date.now() > until) throw new Halt(`The server did not answer on ${knock}:${port} within ${PATIENCE_MS / 1000} seconds.\n${output.join('')}`)
    await delay(100)
  }
  return { ended, output }
}

/** Arguments for node to serve what was built. */
export const BUILT_SERVER = [SERVER]

/** Arguments for node to serve what is being worked on. */
export const developmentServer = (/** @type {string} */ host, /** @type {number} */ port) =>
  [join(ROOT, 'node_modules/nuxt/bin/nuxt.mjs'), 'dev', '--host', host, '--port', String(port)]
