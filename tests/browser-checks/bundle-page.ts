import { readdirSync, readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { join } from 'node:path'
import { build, type Plugin } from 'esbuild'
import { PUBLISHED } from './published-folders'

const ROOT = join(import.meta.dirname, '../..')
const HERE = join(ROOT, 'tests/browser-checks')
const fromVitest = createRequire(createRequire(import.meta.url).resolve('vitest/package.json'))

function testsIn(...folders: string[]): string[] {
  return folders.flatMap(folder => readdirSync(join(ROOT, folder)).filter(file => file.endsWith('.test.ts')).sort().map(file => `${folder}/${file}`))
}

/** Searches are no laws, and take long. */
const SEARCHES = /\/find-[^/]+$/

/** What pages have of Node's files. */
const READING = { existsSync: true, readFileSync: true }

/** Laws of pictures: what composing, light and tone keep to, and that a plain picture shows what is promised. */
const PICTURE_LAWS = ['compose', 'light', 'plain', 'tone'].map(name => `tests/unit/picture/${name}.test.ts`)

/** Published checks and laws: tests of the optics that need nothing of Node but to read a published table, and laws of pictures. */
export function lawFiles(): string[] {
  return [...testsIn('tests/browser-checks/laws', 'tests/reference/optics', 'tests/unit/optics'), ...PICTURE_LAWS].filter(path => !SEARCHES.test(path)).filter(path => isLaw(readFileSync(join(ROOT, path), 'utf8')))
}

/** Tests of commands, plots and documents are of no use in a page: they start programs, or read the repository. */
function isLaw(source: string): boolean {
  const ofNode = [...source.matchAll(/^import (.+) from '(?:node:(.+)|.*\/scripts\/.+)'$/gm)]
  const onlyReads = ofNode.every(([, names, from]) => from === 'fs' && names?.replace(/[{} ]/g, '').split(',').every(name => name in READING))
  return onlyReads && (ofNode.length === 0 || PUBLISHED.some(folder => source.includes(folder)))
}

/** Tests that need a page with a graphics processor, played or real. */
export function graphicsFiles(): string[] {
  return testsIn('tests/browser-checks/graphics')
}

/** What pages find elsewhere than in Node. */
function pageWorld(): Plugin {
  const gathered = (paths: string[]) => `export const FILES = {${paths.map(path => `${JSON.stringify(path)}: () => import(${JSON.stringify(join(ROOT, path))}),`).join('\n')}}`
  const made: Record<string, string> = {
    'law-files': gathered(lawFiles()),
    'graphics-files': gathered(graphicsFiles()),
    'node:crypto': 'export const randomUUID = () => crypto.randomUUID()',
  }
  return {
    name: 'page-world',
    setup({ onLoad, onResolve }) {
      onResolve({ filter: /./ }, ({ path }) => path in made ? { path, namespace: 'made' } : undefined)
      onLoad({ filter: /./, namespace: 'made' }, ({ path }) => ({ contents: made[path]!, resolveDir: ROOT }))
    },
  }
}

/** Scripts of pages and threads as files by name, in memory: `laws-page`. */
export async function bundlePages(...scripts: string[]): Promise<Map<string, Uint8Array>> {
  const { outputFiles } = await build({
    entryPoints: scripts.map(script => join(HERE, `${script}.ts`)),
    outdir: '/', absWorkingDir: ROOT, write: false, bundle: true, splitting: true, format: 'esm', platform: 'browser', target: 'es2022', logLevel: 'error',
    plugins: [pageWorld()],
    alias: {
      '#shared': join(ROOT, 'shared'), '#server': join(ROOT, 'server'), '~': join(ROOT, 'app'),
      'vitest': join(HERE, 'vitest-in-page.ts'),
      'node:fs': join(HERE, 'files-in-page.ts'),
      '@vitest/runner': fromVitest.resolve('@vitest/runner'),
      '@vitest/expect': fromVitest.resolve('@vitest/expect'),
    },
    define: { 'process.env.NODE_ENV': '"test"' },
  })
  return new Map(outputFiles.map(({ path, contents }) => [path, contents]))
}
