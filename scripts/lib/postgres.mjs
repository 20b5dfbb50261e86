// A PostgreSQL cluster of the project's own, on loopback.
import { createHash } from 'node:crypto'
import { chmodSync, chownSync, existsSync, mkdirSync, readFileSync, readlinkSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { setTimeout as delay } from 'node:timers/promises'
import { postgresFolders } from './debian-packages.mjs'
import { freePort } from './ports.mjs'
import { processBirth, run, runOrHalt } from './processes.mjs'
import { Halt, say } from './say.mjs'

/** @typedef {{ adminUrl: string, stop: () => Promise<void> }} Cluster */

const SUPERUSER = 'postgres'
/** Where clusters lie when the data folder is one that only root may enter. */
const OUT_OF_HOME = '/var/lib/countershade'
/** The file in a data folder that says where its cluster is, when that is elsewhere. */
const NOTE = 'postgres-is-at.txt'
const START_TRIES = 12
const PAUSE_MS = 1500

/** A test database may be lost with the machine, so it need not wait for the disk. */
const HASTY = ['fsync=off', 'synchronous_commit=off', 'full_page_writes=off', 'wal_level=minimal', 'max_wal_senders=0', 'max_wal_size=2GB']

const isRoot = () => process.getuid?.() === 0

/**
 * PostgreSQL refuses to run as root, so root lends it to the account Debian made for it.
 * @param {string[]} command
 * @returns {[string, string[]]}
 */
function asServer(command) {
  const [program = '', ...args] = command
  return isRoot() ? ['runuser', ['-u', SUPERUSER, '--', program, ...args]] : [program, args]
}

/** @param {string[]} command */
const runAsServer = command => run(...asServer(command), { cwd: '/' })

/** @param {string} folder */
async function giveToServer(folder) {
  mkdirSync(folder, { recursive: true })
  if (!isRoot()) return
  const { output } = await run('id', ['-u', SUPERUSER])
  const { output: group } = await run('id', ['-g', SUPERUSER])
  chownSync(folder, Number(output), Number(group))
}

/**
 * The folder of the cluster that belongs to a data folder. It is remembered, since the data must be found again when
 * the permissions above it have changed.
 * @param {string} dataDir
 */
async function clusterFolder(dataDir) {
  const note = join(dataDir, NOTE)
  if (existsSync(note)) return readFileSync(note, 'utf8').trim()
  const near = join(dataDir, 'postgres')
  await giveToServer(near)
  if ((await runAsServer(['test', '-w', near, '-a', '-x', near])).code === 0) return near
  if (!isRoot()) throw new Halt(`${near} cannot be written to.`, 'It may belong to another user: give it to the one who starts, or set DATA_DIR to another folder.')
  rmSync(near, { recursive: true })
  const far = join(OUT_OF_HOME, createHash('sha256').update(dataDir).digest('hex').slice(0, 16))
  mkdirSync(OUT_OF_HOME, { recursive: true })
  chmodSync(OUT_OF_HOME, 0o755)
  if (existsSync(far)) {
    const aside = `${far}.of-a-deleted-data-folder-${Date.now()}`
    renameSync(far, aside)
    say(`  an older database of the same place was moved to ${aside}`)
  }
  await giveToServer(far)
  writeFileSync(note, `${far}\n`)
  say(`  PostgreSQL's own account cannot enter ${dataDir}; its data lies in ${far}`)
  return far
}

/**
 * Removes the cluster of a data folder that is done with, ending its server when that was left running.
 * @param {string} dataDir
 */
export async function removeCluster(dataDir) {
  const note = join(dataDir, NOTE)
  const folder = existsSync(note) ? readFileSync(note, 'utf8').trim() : join(dataDir, 'postgres')
  const data = join(folder, 'data')
  if (leftRunning(data) !== undefined) await runAsServer([join(programsFor(data), 'pg_ctl'), '-D', data, '-w', '-s', '-m', 'immediate', 'stop'])
  rmSync(folder, { recursive: true, force: true })
}

/** @param {string} data */
function programsFor(data) {
  const folders = postgresFolders()
  const [newest] = folders
  if (!newest) throw new Halt('PostgreSQL is not installed.')
  const version = join(data, 'PG_VERSION')
  if (!existsSync(version)) return newest
  const made = readFileSync(version, 'utf8').trim()
  const fitting = folders.find(folder => folder.includes(`/${made}/`))
  if (fitting) return fitting
  // Outside Debian's layout the version is not in the path; pg_ctl itself says when it does not fit.
  if (!newest.startsWith('/usr/lib/postgresql/')) return newest
  throw new Halt(`The database in ${data} was made by PostgreSQL ${made}, which is not installed.`, `Install it (apt-get install postgresql-${made}), or set DATA_DIR to a new folder.`)
}

/** @param {string} bin @param {string} folder */
async function makeCluster(bin, folder) {
  const fresh = join(folder, 'data.new')
  rmSync(fresh, { recursive: true, force: true })
  const [program, args] = asServer([
    join(bin, 'initdb'), '-D', fresh, '-U', SUPERUSER, '-A', 'trust', '-E', 'UTF8', '--locale=C.UTF-8', '--no-instructions',
  ])
  await runOrHalt('Making the database cluster', program, args, { cwd: '/' })
  renameSync(fresh, join(folder, 'data'))
}

/**
 * The server that still runs on this data, when a start before us was killed. Its number alone is not trusted: it may
 * belong to another program by now.
 * @param {string} data
 */
function leftRunning(data) {
  const file = join(data, 'postmaster.pid')
  if (!existsSync(file)) return undefined
  const pid = Number.parseInt(readFileSync(file, 'utf8'), 10)
  if (!Number.isInteger(pid) || processBirth(pid) === undefined) return undefined
  try {
    return readlinkSync(`/proc/${pid}/cwd`) === data ? pid : undefined
  }
  catch {
    return undefined
  }
}

/**
 * Starts the cluster of a data folder, making it when there is none.
 * @param {{ dataDir: string, isHasty?: boolean }} options
 * @returns {Promise<Cluster>}
 */
export async function startCluster({ dataDir, isHasty = false }) {
  const folder = await clusterFolder(dataDir)
  const data = join(folder, 'data')
  const bin = programsFor(data)
  if (!existsSync(data)) await makeCluster(bin, folder)
  const control = (/** @type {string[]} */ ...args) => runAsServer([join(bin, 'pg_ctl'), '-D', data, '-w', '-s', ...args])
  const stop = async () => {
    if ((await control('-m', 'fast', '-t', '30', 'stop')).code !== 0) await control('-m', 'immediate', '-t', '10', 'stop')
  }
  if (leftRunning(data) !== undefined) {
    say('  an earlier start left PostgreSQL running; stopping it first')
    await stop()
  }
  const log = join(folder, 'server.log')
  let output = ''
  for (let tries = 0; tries < START_TRIES; tries++) {
    const port = await freePort()
    const settings = ['listen_addresses=127.0.0.1', 'unix_socket_directories=\'\'', 'max_connections=200', ...(isHasty ? HASTY : [])]
    const started = await control('-l', log, '-t', '60', '-o', `-p ${port} ${settings.map(one => `-c ${one}`).join(' ')}`, 'start')
    if (started.code === 0) return { adminUrl: `postgres://${SUPERUSER}@127.0.0.1:${port}/postgres`, stop }
    output = started.output
    // The port may have been taken meanwhile, or what a killed server held is not free yet.
    await delay(PAUSE_MS)
  }
  const tail = existsSync(log) ? readFileSync(log, 'utf8').split('\n').slice(-12).join('\n') : ''
  throw new Halt(`PostgreSQL did not start.\n${output}${tail}`, `Its log is ${log}.`)
}
