import { readdirSync, readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { join } from 'node:path'
import { build, type Plugin } from 'esbuild'

const ROOT = join(import.meta.dirname, '../..')
const HERE = join(ROOT, 'tests/browser-checks')
const fromVitest = createRequire(createRequire(import.meta.url).resolve('vitest/package.json'))

/** Tests of the optics that need nothing of Node but to read a published table. */
export function lawFiles(): string[] {
  const all = ['tests/reference/optics', 'tests/unit/optics'].flatMap(folder => readdirSync(join(ROOT, folder)).sort().map(file => `${folder}/${file}`))
  return all.filter(path => path.endsWith('.test.ts')).filter(path => !/from 'node:(?!fs')/.test(readFileSync(join(ROOT, path), 'utf8')))
}

/** Gives pages what they find elsewhere in Node. */
const pageWorld: Plugin = {
  name: 'page-world',
  setup({ onLoad, onResolve }) {
    onResolve({ filter: /^test-files$/ }, () => ({ path: 'test-files', namespace: 'made' }))
    onLoad({ filter: /^test-files$/, namespace: 'made' }, () => ({
      contents: `export const FILES = {${lawFiles().map(path => `${JSON.stringify(path)}: () => import(${JSON.stringify(join(ROOT, path))}),`).join('\n')}}`,
      resolveDir: ROOT,
    }))
    onResolve({ filter: /^node:crypto$/ }, () => ({ path: 'node:crypto', namespace: 'made' }))
    onLoad({ filter: /^node:crypto$/, namespace: 'made' }, () => ({ contents: 'export const randomUUID = () => crypto.randomUUID()' }))
  },
}

/** The pages of these checks as files by name, in memory. */
export async function bundlePages(): Promise<Map<string, Uint8Array>> {
  const { outputFiles } = await build({
    entryPoints: ['laws-page.ts', 'engines-page.ts', 'engines-worker.ts'].map(file => join(HERE, file)),
    outdir: '/', absWorkingDir: ROOT, write: false, bundle: true, splitting: true, format: 'esm', platform: 'browser', target: 'es2022', logLevel: 'error',
    plugins: [pageWorld],
    alias: {
      '#shared': join(ROOT, 'shared'), '#server': join(ROOT, 'server'),
      'vitest': join(HERE, 'vitest-in-page.ts'),
      'node:fs': join(HERE, 'files-in-page.ts'),
      '@vitest/runner': fromVitest.resolve('@vitest/runner'),
      '@vitest/expect': fromVitest.resolve('@vitest/expect'),
    },
    define: { 'process.env.NODE_ENV': '"test"' },
  })
  return new Map(outputFiles.map(({ path, contents }) => [path, contents]))
}
