import { existsSync, readFileSync, readdirSync } from 'node:fs'
import { expect, it } from 'vitest'

/** A file longer than this is two files, or a table. */
const LINES_MAX = 300

/** Files that may be longer, each with its reason; one that has become short again, or is gone, fails. */
const LONGER: Readonly<Record<string, string>> = {}

const FOLDERS = ['app', 'server', 'shared', 'scripts', 'tests', 'docker-less-s3-fake']

const files = FOLDERS.filter(folder => existsSync(folder)).flatMap(folder =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' }).map(file => `${folder}/${file.replaceAll('\\', '/')}`))
  .filter(file => /\.(?:ts|mjs|vue|css)$/.test(file))

const lines = new Map(files.map(file => [file, readFileSync(file, 'utf8').trimEnd().split('\n').length]))

it('keeps every file short enough to be read in one go', () => {
  const long = [...lines].filter(([file, count]) => count > LINES_MAX && !(file in LONGER))
  expect(long.map(([file, count]) => `${file}: ${count} lines`)).toEqual([])
})

it('has no exception that is no longer needed', () => {
  expect(Object.keys(LONGER).filter(file => (lines.get(file) ?? 0) <= LINES_MAX)).toEqual([])
})
