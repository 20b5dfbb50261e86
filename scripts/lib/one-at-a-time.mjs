// One start per data folder, and one build per repository.
import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { setTimeout as delay } from 'node:timers/promises'
import { processBirth } from './processes.mjs'
import { Halt, say } from './say.mjs'

/** @typedef {{ pid: number, birth?: string | undefined }} Named a process that cannot be mistaken for another */
/** @typedef {{ holder: Named, children: Named[] }} Held */

/** The file in a data folder that names who works on it. */
export const HELD = 'running.json'

/** @param {Named} named */
function isAlive({ pid, birth }) {
  const now = processBirth(pid)
  if (now !== undefined) return now === birth
  try {
    process.kill(pid, 0)
    return birth === undefined
  }
  catch {
    return false
  }
}

/** @param {number} pid @returns {Named} */
const named = pid => ({ pid, birth: processBirth(pid) })

/** @param {string} file @returns {Held | undefined} */
function readHeld(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'))
  }
  catch {
    return undefined
  }
}

/** What a killed holder left running is ended, since nobody else will. @param {Held} held */
function endOrphans(held) {
  for (const child of held.children.filter(isAlive)) {
    say(`  an earlier start left process ${child.pid} running; ending it`)
    try {
      process.kill(-child.pid, 'SIGKILL')
    }
    catch {
      // It has ended meanwhile.
    }
    // Its port is free only when it is gone.
    for (let waits = 0; waits < 40 && isAlive(child); waits++) Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 50)
  }
}

/**
 * Takes a lock file, taking it over from a holder that is dead; undefined while its holder lives.
 * @param {string} file
 * @returns {{ noteChild: (pid: number) => void, release: () => void } | undefined}
 */
export function takeLock(file) {
  mkdirSync(dirname(file), { recursive: true })
  /** @type {Held} */
  const held = { holder: named(process.pid), children: [] }
  const before = readHeld(file)
  if (before && isAlive(before.holder)) return undefined
  if (before) endOrphans(before)
  rmSync(file, { force: true })
  try {
    writeFileSync(file, JSON.stringify(held), { flag: 'wx' })
  }
  catch {
    return undefined
  }
  return {
    noteChild: (pid) => {
      held.children.push(named(pid))
      writeFileSync(file, JSON.stringify(held))
    },
    release: () => rmSync(file, { force: true }),
  }
}

/**
 * Takes the data folder for this start, or says who has it.
 * @param {string} dataDir
 */
export function takeDataDir(dataDir) {
  const file = join(dataDir, HELD)
  const lock = takeLock(file)
  if (lock) return lock
  throw new Halt(`Another start is running on ${dataDir} (process ${readHeld(file)?.holder.pid}).`, 'Stop it first, or start this one with another DATA_DIR and PORT.')
}

/**
 * Waits for a lock, does the work, and gives the lock back.
 * @template T
 * @param {string} file
 * @param {string} what
 * @param {() => Promise<T>} work
 */
export async function inTurn(file, what, work) {
  let lock = takeLock(file)
  if (!lock) say(`  waiting for another process: ${what}`)
  while (!lock) {
    await delay(1000)
    lock = takeLock(file)
  }
  try {
    return await work()
  }
  finally {
    lock.release()
  }
}
