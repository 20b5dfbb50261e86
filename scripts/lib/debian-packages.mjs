// Programs of the operating system that the application or its tests need.
import { existsSync, readdirSync } from 'node:fs'
import { delimiter, join } from 'node:path'
import { run, runOrHalt } from './processes.mjs'
import { Halt, step } from './say.mjs'

/** @typedef {{ name: string, has: () => boolean }} DebianPackage */

const DEBIAN_POSTGRES = '/usr/lib/postgresql'

/** Folders with PostgreSQL's server programs, newest first: Debian's, then any in PATH. */
export function postgresFolders() {
  const debian = existsSync(DEBIAN_POSTGRES) ? readdirSync(DEBIAN_POSTGRES).map(version => join(DEBIAN_POSTGRES, version, 'bin')) : []
  const path = (process.env.PATH ?? '').split(delimiter)
  const newestFirst = debian.sort((a, b) => b.localeCompare(a, 'en', { numeric: true }))
  return [...newestFirst, ...path].filter(folder => existsSync(join(folder, 'initdb')) && existsSync(join(folder, 'pg_ctl')))
}

/** @type {DebianPackage} */
export const POSTGRESQL = { name: 'postgresql', has: () => postgresFolders().length > 0 }

/** A browser, for the tests. @type {DebianPackage} */
export const CHROMIUM = { name: 'chromium', has: () => existsSync('/usr/bin/chromium') }

/** A browser of other make, to hold the checks of the optics in. @type {DebianPackage} */
export const FIREFOX = { name: 'firefox-esr', has: () => existsSync('/usr/bin/firefox-esr') }

/** An S3 client of other make, to judge the photo store. @type {DebianPackage} */
export const AWSCLI = { name: 'awscli', has: () => existsSync('/usr/bin/aws') }

/** A reader of photo metadata that is not ours, and colour profiles and measurements to hold colours against. @type {DebianPackage[]} */
export const JUDGES = [
  { name: 'libimage-exiftool-perl', has: () => existsSync('/usr/bin/exiftool') },
  { name: 'colord-data', has: () => existsSync('/usr/share/color/icc/colord') },
  { name: 'argyll-ref', has: () => existsSync('/usr/share/color/argyll/ref') },
]

const APT = ['-o', 'DPkg::Lock::Timeout=300', '-o', 'Acquire::Retries=3', '-q']

/**
 * Installs what is missing, or says which one command would.
 * @param {DebianPackage[]} packages
 */
export async function ensureDebianPackages(packages) {
  const missing = packages.filter(one => !one.has()).map(one => one.name)
  if (missing.length === 0) return
  const names = missing.join(' ')
  const isRoot = process.getuid?.() === 0
  if ((await run('sh', ['-c', 'command -v apt-get'])).code !== 0) {
    throw new Halt(`Missing on this machine: ${names} (Debian's names).`, 'Install them with the machine\'s own package manager, then start again.')
  }
  if (!isRoot) throw new Halt(`Missing on this machine: ${names}.`, `Run this once, then start again: sudo apt-get install -y ${names}`)
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  const remedy = 'Check the network and the package sources in /etc/apt, then start again.'
  await step(`Installing ${names}`, async () => {
    await runOrHalt('Reading the package lists', 'apt-get', [...APT, 'update'], { env, remedy })
    await runOrHalt(`Installing ${names}`, 'apt-get', [...APT, 'install', '-y', '--no-install-recommends', ...missing], { env, remedy })
  })
  const still = packages.filter(one => !one.has()).map(one => one.name)
  if (still.length > 0) throw new Halt(`${still.join(' ')} was installed and is still not where it should be.`)
}
