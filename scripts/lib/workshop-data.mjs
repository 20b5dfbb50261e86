// The database of a copy of the application: made, brought up to date, and filled with the demo workshop when empty.
import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { rm } from 'node:fs/promises'
import { join } from 'node:path'
import { ROOT } from './environment.mjs'
import { runOrHalt } from './processes.mjs'
import { step } from './say.mjs'
import { bundleTypeScript, importTypeScript } from './type-script.mjs'

export const DATABASE = 'countershade'
const MIGRATIONS = join(ROOT, 'drizzle')

/** @typedef {typeof import('../database.ts')} DatabaseModule */
/** @typedef {{ databaseUrl: string, ownerUrl: string }} Addresses */

const loadDatabase = async () => /** @type {DatabaseModule} */ (await importTypeScript('scripts/database.ts'))

/**
 * Makes roles and a database on a cluster of ours, with every migration.
 * @param {string} adminUrl
 * @param {string} [name]
 * @returns {Promise<Addresses & { isEmpty: boolean }>}
 */
export async function openLocalDatabase(adminUrl, name = DATABASE) {
  const database = await loadDatabase()
  const ownerUrl = database.addressOf(adminUrl, database.OWNER_ROLE, name)
  await database.ensureRoles(adminUrl)
  await database.ensureDatabase(adminUrl, name)
  await database.migrateDatabase(ownerUrl, MIGRATIONS)
  return { ownerUrl, databaseUrl: database.addressOf(adminUrl, database.APP_ROLE, name), isEmpty: !await database.hasWorkshop(ownerUrl) }
}

/**
 * Brings a database of somebody else's server up to date.
 * @param {string} ownerUrl
 */
export async function migrateOutsideDatabase(ownerUrl) {
  const { migrateDatabase } = await loadDatabase()
  await step('Bringing the database up to date', () => migrateDatabase(ownerUrl, MIGRATIONS))
}

/**
 * Fills an empty database with the demo workshop.
 * @param {NodeJS.ProcessEnv} env as the server gets it
 * @param {{ show: boolean }} options whether its progress is shown
 */
export async function seedDemo(env, { show }) {
  await step('Setting up the demo workshop', async () => {
    const bundle = await bundleTypeScript('scripts/seed.ts')
    try {
      await runOrHalt('Setting up the demo workshop', process.execPath, ['--enable-source-maps', bundle], { cwd: ROOT, env, show })
    }
    finally {
      await rm(bundle, { force: true })
    }
  })
}

/**
 * Opens the local database and sees to it that a demo workshop is in it. A demo that was cut short in the middle is
 * thrown away and set up again: nobody has worked on it, since the server starts after it.
 * @param {string} adminUrl
 * @param {string} dataDir
 * @param {(addresses: Addresses) => NodeJS.ProcessEnv} envFor
 */
export async function openDemoDatabase(adminUrl, dataDir, envFor) {
  const unfinished = join(dataDir, 'demo-is-being-set-up.txt')
  if (existsSync(unfinished)) await (await loadDatabase()).dropDatabase(adminUrl, DATABASE)
  const { isEmpty, ...addresses } = await openLocalDatabase(adminUrl)
  if (isEmpty) {
    writeFileSync(unfinished, 'The demo workshop is not complete while this file is here.\n')
    await seedDemo(envFor(addresses), { show: true })
  }
  rmSync(unfinished, { force: true })
  return addresses
}

/**
 * Who may sign in to the demo workshop, as its set-up wrote it down.
 * @param {string} dataDir
 * @returns {{ email: string, password: string, role: string, name?: string }[]}
 */
export function demoSignIns(dataDir) {
  const file = join(dataDir, 'demo-sign-ins.json')
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : []
}
