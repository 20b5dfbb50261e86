// What only this copy of the application knows: kept in its data folder, readable by its owner.
import { randomBytes } from 'node:crypto'
import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'

/** @typedef {{ sessionPassword: string, storeSecret: string }} Secrets */

/**
 * Reads the secrets of a data folder, making them at the first start.
 * @param {string} dataDir
 * @returns {Secrets}
 */
export function localSecrets(dataDir) {
  const file = join(dataDir, 'secrets.json')
  if (!existsSync(file)) {
    const secret = () => randomBytes(32).toString('base64url')
    writeFileSync(file, JSON.stringify({ sessionPassword: secret(), storeSecret: secret() }), { mode: 0o600, flag: 'wx' })
  }
  return JSON.parse(readFileSync(file, 'utf8'))
}
