// The libraries package-lock.json names.
import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { ROOT } from './environment.mjs'
import { runOrHalt } from './processes.mjs'
import { step } from './say.mjs'

/** @typedef {{ version?: string, integrity?: string, optional?: boolean, devOptional?: boolean, extraneous?: boolean }} Locked */

/**
 * @param {string} path
 * @returns {Record<string, Locked>}
 */
function lockedPackages(path) {
  return JSON.parse(readFileSync(path, 'utf8')).packages
}

/**
 * True when node_modules holds exactly what the lock file asks for, by npm's own record of what it installed. Packages
 * that are for other machines, or that nothing asks for any more, may be absent.
 */
export function areNpmPackagesInstalled(root = ROOT) {
  const record = join(root, 'node_modules/.package-lock.json')
  if (!existsSync(record) || !existsSync(join(root, '.nuxt/tsconfig.app.json'))) return false
  const installed = lockedPackages(record)
  const asked = lockedPackages(join(root, 'package-lock.json'))
  const isSame = Object.entries(asked).every(([path, { version, integrity, optional, devOptional, extraneous }]) => {
    if (path === '') return true
    const present = installed[path]
    return present ? present.version === version && present.integrity === integrity : Boolean(optional || devOptional || extraneous)
  })
  return isSame && Object.keys(installed).every(path => asked[path] !== undefined)
}

/** Installs the libraries when they are missing or the lock file has changed. */
export async function ensureNpmPackages() {
  if (areNpmPackagesInstalled()) return
  await step('Installing libraries (npm ci)', () => runOrHalt('Installing libraries', 'npm', ['ci', '--include=dev', '--include=optional'], {
    cwd: ROOT,
    env: { ...process.env, NUXT_TELEMETRY_DISABLED: '1' },
    remedy: 'Check the network and that nothing else is installing into node_modules, then start again.',
  }))
}
