// Programs we start. Each gets a process group of its own, so that Ctrl-C reaches only us and we stop them in good order.
import { spawn } from 'node:child_process'
import { readFileSync } from 'node:fs'
import { setTimeout as delay } from 'node:timers/promises'
import { Halt } from './say.mjs'

/** @typedef {{ cwd?: string, env?: NodeJS.ProcessEnv, show?: boolean, limitMs?: number }} RunOptions */
/** @typedef {{ code: number, output: string }} RunResult */

/** @type {Set<import('node:child_process').ChildProcess>} */
const running = new Set()

/**
 * Starts a program and keeps it on the list of those to be stopped.
 * @param {string} command
 * @param {string[]} args
 * @param {RunOptions & { stdio?: 'inherit' | 'pipe' }} options
 */
export function startProgram(command, args, { cwd, env, stdio = 'pipe' } = {}) {
  const child = spawn(command, args, { cwd, env, detached: true, stdio: ['ignore', stdio, stdio] })
  running.add(child)
  child.once('close', () => running.delete(child))
  child.once('error', () => running.delete(child))
  return child
}

/**
 * Runs a program to its end and keeps what it printed; never throws for a bad exit code.
 * @param {string} command
 * @param {string[]} args
 * @param {RunOptions} options
 * @returns {Promise<RunResult>}
 */
export function run(command, args, { show = false, limitMs, ...options } = {}) {
  return new Promise((resolve, reject) => {
    const child = startProgram(command, args, options)
    /** @type {Buffer[]} */
    const output = []
    for (const [from, to] of /** @type {const} */ ([[child.stdout, process.stdout], [child.stderr, process.stderr]])) {
      from?.on('data', (/** @type {Buffer} */ chunk) => {
        output.push(chunk)
        if (show) to.write(chunk)
      })
    }
    const limit = limitMs === undefined
      ? undefined
      : setTimeout(() => {
          output.push(Buffer.from(`\nstopped after ${limitMs / 1000} seconds\n`))
          void stopProgram(child)
        }, limitMs)
    child.once('error', reject)
    child.once('close', (code, signal) => {
      clearTimeout(limit)
      resolve({ code: code ?? 1, output: Buffer.concat(output).toString('utf8') + (signal ? `\nended by ${signal}\n` : '') })
    })
  })
}

/**
 * Runs a program that must succeed.
 * @param {string} what in words, for the message when it fails: `Installing packages`
 * @param {string} command
 * @param {string[]} args
 * @param {RunOptions & { remedy?: string }} options
 */
export async function runOrHalt(what, command, args, { remedy, ...options } = {}) {
  const { code, output } = await run(command, args, options)
  if (code === 0) return output
  const tail = options.show ? '' : `\n${output.trimEnd().split('\n').slice(-60).join('\n')}`
  throw new Halt(`${what} failed (${[command, ...args].join(' ')} ended with ${code}).${tail}`, remedy)
}

/** @param {number} pid @param {NodeJS.Signals} signal */
function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal)
  }
  catch {
    // It has ended meanwhile.
  }
}

/**
 * Ends a program and everything it started, politely first.
 * @param {import('node:child_process').ChildProcess} child
 */
export async function stopProgram(child, patience = 8000) {
  const { pid } = child
  if (pid === undefined) return
  if (child.exitCode === null && child.signalCode === null) {
    const ended = new Promise(resolve => child.once('exit', resolve))
    signalGroup(pid, 'SIGTERM')
    await Promise.race([ended, delay(patience, undefined, { ref: false })])
  }
  signalGroup(pid, 'SIGKILL')
}

/** Ends every program that is still running. */
export async function stopAllPrograms() {
  await Promise.all([...running].map(child => stopProgram(child)))
}

/**
 * When a process began, in clock ticks since the machine started: together with its number it names one process for
 * good. Undefined when there is no such process, or no /proc to ask.
 * @param {number} pid
 */
export function processBirth(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8')
    return stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19]
  }
  catch {
    return undefined
  }
}
