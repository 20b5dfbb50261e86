import { readFileSync, readdirSync } from 'node:fs'
import { dirname, join, normalize } from 'node:path'
import { expect, it } from 'vitest'

/**
 * Which rooms a file may import from; the first room that fits the file counts, so the narrower stand first.
 * A room not named here is an arrow nobody has thought about: it fails.
 */
const MAY_IMPORT: Readonly<Record<string, readonly string[]>> = {
  'app/components/dev': ['app', 'shared'], // the drawing sheet: never built
  'app/components/ui': ['app/components/ui', 'app/composables/ui', 'shared/quantities', 'shared/optics/colour-words', 'shared/people', 'shared/shelf'],
  'app/components/bench': ['app/components', 'app/composables', 'app/bench', 'app/stores', 'app/errors', 'shared'],
  'app/components': ['app/components', 'app/composables', 'app/stores', 'app/errors', 'shared'],
  'app/pages': ['app/components', 'app/composables', 'app/stores', 'app/errors', 'shared'],
  'app/layouts': ['app/components', 'app/composables', 'shared'],
  'app/middleware': ['app/composables', 'shared'],
  'app/errors': ['app/errors', 'shared'],
  'app/workers': ['app/workers', 'shared'],
  'app/stores': ['app/stores', 'app/bench', 'app/errors', 'app/composables', 'shared'],
  'app/composables/ui': ['app/composables/ui', 'app/components/ui', 'shared'],
  'app/composables': ['app/composables', 'app/components/ui', 'app/stores', 'app/bench', 'app/errors', 'app/workers', 'shared'],
  'app/bench': ['app/bench', 'app/errors', 'shared'],
  'app': ['app', 'shared'],
  'server/api': ['server/http', 'server/services', 'server/db/client', 'server/photos', 'shared'],
  'server/routes': ['server/http', 'server/services', 'server/db/client', 'server/photos', 'server/settings', 'shared'],
  'server/services': ['server/services', 'server/db', 'server/photos', 'server/pictures', 'server/mail', 'server/settings', 'shared'],
  'server/db': ['server/db', 'server/settings', 'shared'],
  'server/photos': ['server/photos', 'server/threads', 'server/settings', 'shared'],
  'server/pictures': ['server/pictures', 'server/threads', 'server/settings', 'shared'],
  'server/mail': ['server/mail', 'server/settings', 'shared'],
  'server/settings': [],
  'server': ['server', 'shared'], // http, boot, plugins, middleware, seed: the wiring
  'shared/quantities': ['shared/quantities'],
  'shared/optics': ['shared/optics', 'shared/quantities'],
  'shared/errors': ['shared/errors'],
  'shared/api': ['shared/api', 'shared/errors'],
  'shared/people': ['shared/people', 'shared/quantities', 'shared/optics/kelvin-light', 'shared/errors'],
  'shared/blank': ['shared/blank', 'shared/quantities', 'shared/errors'],
  'shared/shelf': ['shared/shelf', 'shared/optics', 'shared/quantities', 'shared/errors'],
  'shared/scheme': ['shared/scheme', 'shared/optics', 'shared/blank', 'shared/shelf', 'shared/api', 'shared/quantities', 'shared/errors'],
  'shared/picture': ['shared/picture', 'shared/scheme', 'shared/optics', 'shared/blank', 'shared/shelf', 'shared/quantities', 'shared/errors'],
  'shared/bench': ['shared/bench', 'shared/scheme', 'shared/picture', 'shared/blank', 'shared/shelf', 'shared/optics', 'shared/api', 'shared/quantities', 'shared/errors'],
  'shared/files': ['shared/files', 'shared/scheme', 'shared/optics', 'shared/blank', 'shared/shelf', 'shared/errors'],
  'shared/photos': ['shared/photos', 'shared/errors'],
  'shared/cards': ['shared/cards', 'shared/scheme', 'shared/picture', 'shared/blank', 'shared/photos', 'shared/people', 'shared/errors'],
}

/** Arrows that go against the table, each with the reason it may; one that is not there any more fails. */
const EXCEPTIONS: Readonly<Record<string, string>> = {}

const files = ['app', 'server', 'shared'].flatMap(folder =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' }).map(file => `${folder}/${file.replaceAll('\\', '/')}`))
  .filter(file => /\.(?:ts|vue)$/.test(file)).sort()

const forbidden = new Map(files.map(file => [file, forbiddenIn(file)]))

it.each(files)('%s imports only what its room may', (file) => {
  expect(forbidden.get(file)!.filter(path => !(`${file} → ${path}` in EXCEPTIONS))).toEqual([])
})

it('has no exception that is no longer needed', () => {
  const needed = [...forbidden].flatMap(([file, paths]) => paths.map(path => `${file} → ${path}`))
  expect(Object.keys(EXCEPTIONS).filter(arrow => !needed.includes(arrow))).toEqual([])
})

function forbiddenIn(file: string): string[] {
  const room = Object.keys(MAY_IMPORT).find(name => inRoom(file, name))
  const allowed = room === undefined ? [] : MAY_IMPORT[room]!
  const specs = [...readFileSync(file, 'utf8').matchAll(/\b(?:from|import)\s*\(?\s*['"]([^'"]+)['"]/g)]
  const ours = specs.map(match => pathOf(file, match[1]!)).filter(path => /^(?:app|server|shared)\//.test(path))
  return [...new Set(ours)].filter(path => !allowed.some(name => inRoom(path, name)))
}

/** Where an import leads, from the repository's folder; a package keeps its own name. */
function pathOf(file: string, spec: string): string {
  if (spec.startsWith('#')) return spec.slice(1)
  if (spec.startsWith('~~/') || spec.startsWith('@@/')) return spec.slice(3)
  if (spec.startsWith('~/') || spec.startsWith('@/')) return `app/${spec.slice(2)}`
  return spec.startsWith('.') ? normalize(join(dirname(file), spec)).replaceAll('\\', '/') : spec
}

function inRoom(path: string, room: string): boolean {
  return path === room || path === `${room}.ts` || path.startsWith(`${room}/`)
}
