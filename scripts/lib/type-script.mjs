// Runs TypeScript of the repository without a build of the application.
import { mkdirSync } from 'node:fs'
import { basename, join } from 'node:path'
import { pathToFileURL } from 'node:url'
import { ROOT } from './environment.mjs'

const BUNDLES = join(ROOT, 'node_modules/.cache/countershade')

/**
 * Bundles one entry of the repository and returns the path of the bundle; libraries stay outside of it.
 * @param {string} entry from the root: `scripts/seed.ts`
 */
export async function bundleTypeScript(entry) {
  const { build } = await import('esbuild')
  mkdirSync(BUNDLES, { recursive: true })
  // Named by process, so that copies starting side by side do not write into each other's file.
  const outfile = join(BUNDLES, `${basename(entry, '.ts')}.${process.pid}.mjs`)
  await build({
    entryPoints: [join(ROOT, entry)],
    outfile,
    absWorkingDir: ROOT,
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: 'external',
    alias: { '#shared': join(ROOT, 'shared'), '#server': join(ROOT, 'server') },
    sourcemap: 'inline',
    logLevel: 'error',
  })
  return outfile
}

/**
 * Bundles one entry and loads it into this process.
 * @param {string} entry
 * @returns {Promise<unknown>}
 */
export async function importTypeScript(entry) {
  const outfile = await bundleTypeScript(entry)
  try {
    return await import(pathToFileURL(outfile).href)
  }
  finally {
    const { rm } = await import('node:fs/promises')
    await rm(outfile, { force: true })
  }
}
