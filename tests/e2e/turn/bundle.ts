import { fileURLToPath } from 'node:url'
import { build, type Plugin } from 'esbuild'

const root = fileURLToPath(new URL('../../..', import.meta.url))

/** Rooms by name, as the application resolves them; what only a server has stays empty. */
const rooms: Plugin = {
  name: 'rooms',
  setup(bundle) {
    const to = (folder: string) => ({ path: after }: { path: string }) => ({ path: `${root}${folder}/${after.slice(after.indexOf('/') + 1)}.ts` })
    bundle.onResolve({ filter: /^#shared\// }, to('shared'))
    bundle.onResolve({ filter: /^#server\// }, to('server'))
    bundle.onResolve({ filter: /^~\// }, to('app'))
    bundle.onResolve({ filter: /^node:crypto$/ }, ({ path }) => ({ path, namespace: 'server-only' }))
    bundle.onLoad({ filter: /.*/, namespace: 'server-only' }, () => ({ contents: 'export const randomUUID = () => crypto.randomUUID()' }))
  },
}

/** A file of the product and all it imports, as one script for a page. */
export async function bundled(file: string): Promise<string> {
  const { outputFiles } = await build({
    entryPoints: [`${root}${file}`], bundle: true, write: false, format: 'esm', target: 'es2022', logLevel: 'error', plugins: [rooms],
    define: { 'process.env.NODE_ENV': '"production"', '__VUE_OPTIONS_API__': 'false', '__VUE_PROD_DEVTOOLS__': 'false', '__VUE_PROD_HYDRATION_MISMATCH_DETAILS__': 'false' },
  })
  return outputFiles[0]!.text
}
