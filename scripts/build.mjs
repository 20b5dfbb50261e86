// Builds the application into .output, in a build folder of its own: a development server, a type check or a test that
// reads .nuxt meanwhile is left alone.
import { rm } from 'node:fs/promises'
import { join } from 'node:path'
import { ROOT } from './lib/environment.mjs'

process.env.NODE_ENV = 'production'
process.env.NUXT_TELEMETRY_DISABLED = '1'

const { build, loadNuxt } = await import('nuxt')
const buildDir = join(ROOT, 'node_modules/.cache/countershade/build')
await rm(buildDir, { recursive: true, force: true })

const nuxt = await loadNuxt({ cwd: ROOT, dev: false, dotenv: false, overrides: { buildDir } })
try {
  await build(nuxt)
  await nuxt.close()
  process.exit()
}
catch (error) {
  // The error carries the whole list of modules; what it says is enough.
  process.stderr.write(`${error instanceof Error ? error.message : error}\n`)
  process.exit(1)
}
