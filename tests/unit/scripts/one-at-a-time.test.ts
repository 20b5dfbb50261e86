import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { takeDataDir, takeLock } from '../../../scripts/lib/one-at-a-time.mjs'
import { processBirth } from '../../../scripts/lib/processes.mjs'

let folder: string
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'held-'))
})
afterAll(() => rmSync(folder, { recursive: true }))

describe('a data folder', () => {
  it('belongs to one start at a time', () => {
    const held = takeDataDir(folder)
    expect(() => takeDataDir(folder)).toThrow(`process ${process.pid}`)
    held.release()
    takeDataDir(folder).release()
    expect(existsSync(join(folder, 'running.json'))).toBe(false)
  })

  it('is taken over from a start that was killed, and what that left running is ended', async () => {
    const file = join(folder, 'killed.json')
    const orphan = spawn(process.execPath, ['-e', 'setInterval(() => {}, 1000)'], { detached: true, stdio: 'ignore' })
    await once(orphan, 'spawn')
    const children = [{ pid: orphan.pid, birth: processBirth(orphan.pid ?? 0) }]
    writeFileSync(file, JSON.stringify({ holder: { pid: process.pid, birth: 'another life' }, children }))
    const ended = once(orphan, 'exit')
    const held = takeLock(file)
    expect(held).toBeDefined()
    expect((await ended)[1]).toBe('SIGKILL')
    held?.release()
  })

  it('never costs a stranger its process, whose number a dead child had', async () => {
    const file = join(folder, 'reused.json')
    const stranger = spawn(process.execPath, ['-e', 'setTimeout(() => {}, 300)'], { detached: true, stdio: 'ignore' })
    await once(stranger, 'spawn')
    writeFileSync(file, JSON.stringify({ holder: { pid: process.pid, birth: '0' }, children: [{ pid: stranger.pid, birth: '0' }] }))
    takeLock(file)?.release()
    expect((await once(stranger, 'exit'))[0]).toBe(0)
  })

  it('survives a lock file that was cut off in the middle of writing', () => {
    const file = join(folder, 'cut.json')
    writeFileSync(file, '{"holder"')
    const held = takeLock(file)
    expect(JSON.parse(readFileSync(file, 'utf8'))).toMatchObject({ holder: { pid: process.pid } })
    held?.release()
  })
})
