// Builds the vector engine: shared/picture/simd/*.as into shared/picture/simd/simd-module.ts.
// `--check` builds and compares instead of writing.
import { readFileSync, writeFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import asc from 'assemblyscript/asc'

const folder = fileURLToPath(new URL('../shared/picture/simd/', import.meta.url))
const target = `${folder}simd-module.ts`

/** The text of simd-module.ts as its source says it must be. */
export async function builtModule() {
  let binary
  const { error, stderr } = await asc.main([
    'index.ts', '--outFile', 'module.wasm', '-O3', '--converge', '--runtime', 'stub', '--noAssert', '--enable', 'simd', '--importMemory', '--memoryBase', '0',
  ], {
    readFile: name => name.endsWith('.ts') && !name.includes('/') ? readSource(name) : null,
    writeFile: (name, contents) => {
      if (name === 'module.wasm') binary = contents
    },
    listFiles: () => [],
  })
  if (error || !binary) throw new Error(`the vector engine does not build: ${error?.message}\n${stderr.toString()}`)
  return `/** The vector engine, built by scripts/simd.mjs from the .as files beside it. */\nexport const SIMD_MODULE = '${Buffer.from(binary).toString('base64')}'\n`
}

/** The compiler knows its own language by another name; ours stay apart from the TypeScript they are not. */
function readSource(name) {
  try {
    return readFileSync(folder + name.replace(/\.ts$/, '.as'), 'utf8')
  }
  catch {
    return null
  }
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const text = await builtModule()
  if (!process.argv.includes('--check')) writeFileSync(target, text)
  else if (readFileSync(target, 'utf8') !== text) {
    process.stderr.write('simd-module.ts is not the build of its source: run node scripts/simd.mjs\n')
    process.exitCode = 1
  }
}
