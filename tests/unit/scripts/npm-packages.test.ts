import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { areNpmPackagesInstalled } from '../../../scripts/lib/npm-packages.mjs'

let root: string
beforeEach(() => {
  root = mkdtempSync(join(tmpdir(), 'libraries-'))
  mkdirSync(join(root, 'node_modules'))
  mkdirSync(join(root, '.nuxt'))
  writeFileSync(join(root, '.nuxt/tsconfig.app.json'), '{}')
})
afterEach(() => rmSync(root, { recursive: true }))

const PAINT = { version: '1.0.0', integrity: 'sha512-a' }
function lay(asked: object, installed?: object) {
  writeFileSync(join(root, 'package-lock.json'), JSON.stringify({ packages: { '': { name: 'app' }, ...asked } }))
  if (installed) writeFileSync(join(root, 'node_modules/.package-lock.json'), JSON.stringify({ packages: installed }))
  return areNpmPackagesInstalled(root)
}

describe('libraries', () => {
  it('are there when npm put what the lock file asks for', () => {
    expect(lay({ 'node_modules/paint': PAINT }, { 'node_modules/paint': PAINT })).toBe(true)
  })

  it('may lack what is for another machine', () => {
    expect(lay({ 'node_modules/paint': PAINT, 'node_modules/paint-for-arm': { ...PAINT, optional: true } }, { 'node_modules/paint': PAINT })).toBe(true)
  })

  it('may lack what the lock file names and nothing asks for', () => {
    expect(lay({ 'node_modules/paint': PAINT, 'node_modules/old': { ...PAINT, extraneous: true } }, { 'node_modules/paint': PAINT })).toBe(true)
  })

  it.each([
    ['nothing was installed', undefined],
    ['one is missing', {}],
    ['one is of another version', { 'node_modules/paint': { ...PAINT, version: '1.0.1' } }],
    ['one has other contents', { 'node_modules/paint': { ...PAINT, integrity: 'sha512-b' } }],
    ['there is one too many', { 'node_modules/paint': PAINT, 'node_modules/old': PAINT }],
  ])('are installed anew when %s', (_, installed) => {
    expect(lay({ 'node_modules/paint': PAINT }, installed)).toBe(false)
  })
})
