// Answers one colour question, written as JSON on standard input or as the first argument. See docs/optics.md.
import { fileURLToPath } from 'node:url'
import { readFileSync } from 'node:fs'
import { build } from 'esbuild'

const entry = fileURLToPath(new URL('./optics-cli.ts', import.meta.url))

async function loadEngine() {
  const { outputFiles } = await build({ entryPoints: [entry], bundle: true, platform: 'node', format: 'esm', write: false, logLevel: 'silent' })
  return import(`data:text/javascript;base64,${Buffer.from(outputFiles[0].contents).toString('base64')}`)
}

try {
  const question = process.argv[2] ?? readFileSync(0, 'utf8')
  const { answer } = await loadEngine()
  process.stdout.write(`${JSON.stringify(answer(question))}\n`)
}
catch (error) {
  const reason = error instanceof Error ? error.message : String(error)
  process.stderr.write(`optics: ${reason.replaceAll(/\s+/g, ' ').trim()}\n`)
  process.exitCode = 1
}
