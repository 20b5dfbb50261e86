import { createServer } from 'node:http'
import { brotliCompressSync, gzipSync } from 'node:zlib'
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { build, type Plugin } from 'esbuild'
import { chromium, type CDPSession } from 'playwright-core'
import type { PageFigures } from './chromium-page'
import { demoWall } from '../../tests/fixtures/demo-looks'

/** Compressed sizes, bytes. */
export interface BundleSize { what: string, raw: number, gzip: number, brotli: number }

const FINISHES = ['Perch, evening water', 'Roach, low sun', 'Ember']

const common = (root: string) => ({
  bundle: true, minify: true, format: 'esm', target: 'es2022', write: false, absWorkingDir: root, logLevel: 'error', define: { '__VUE_OPTIONS_API__': 'false', '__VUE_PROD_DEVTOOLS__': 'false', '__VUE_PROD_HYDRATION_MISMATCH_DETAILS__': 'false', 'process.env.NODE_ENV': '"production"' },
  alias: { '#shared': join(root, 'shared'), '#server': join(root, 'server') },
} as const)

/** The page's thread is a file beside it. */
const besideThread: Plugin = {
  name: 'thread beside the page',
  setup({ onLoad }) {
    onLoad({ filter: /painting-thread\.ts$/ }, ({ path }) => ({
      contents: readFileSync(path, 'utf8').replace('../../workers/picture.worker.ts', './thread.js'), loader: 'ts',
    }))
  },
}

async function bundleOf(root: string, entry: string): Promise<string> {
  const { outputFiles } = await build({ ...common(root), entryPoints: [entry], plugins: [besideThread] })
  return outputFiles[0]!.text
}

function sizeOf(what: string, text: string): BundleSize {
  return { what, raw: Buffer.byteLength(text), gzip: gzipSync(text, { level: 9 }).length, brotli: brotliCompressSync(text).length }
}

/** The code a browser downloads to paint, and the thread with all that is said about a picture. */
export async function bundleSizes(root: string): Promise<BundleSize[]> {
  return [
    sizeOf('engines, stack to light', await bundleOf(root, 'scripts/bench/entry-engines.ts')),
    sizeOf('everything that paints: blanks, deposits, engines', await bundleOf(root, 'scripts/bench/entry-painting.ts')),
    sizeOf('the whole painting thread, with promised colours', await bundleOf(root, 'app/workers/picture.worker.ts')),
  ]
}

/** What a browser measures; `pageCpu` is what the page's own thread takes of the processor for one change, ms: sending it and drawing all that comes back. */
export interface ChromiumFigures { browser: string, pages: PageFigures[], requests: number, pageCpu: number }

/** Measures edits and a drag in Chromium, whose graphics are software. */
export async function chromiumFigures(root: string): Promise<ChromiumFigures> {
  const files: Record<string, string> = {
    '/': '<!doctype html><meta charset="utf-8"><title>bench</title><script type="module" src="page.js"></script>',
    '/page.js': await bundleOf(root, 'scripts/bench/chromium-page.ts'),
    '/thread.js': await bundleOf(root, 'app/workers/picture.worker.ts'),
  }
  const server = createServer(({ url }, answer) => {
    const text = files[url ?? '']
    answer.writeHead(text === undefined ? 404 : 200, { 'content-type': url?.endsWith('.js') ? 'text/javascript' : 'text/html' }).end(text)
  })
  await new Promise<void>(resolve => server.listen(0, '127.0.0.1', resolve))
  const address = server.address()
  if (address === null || typeof address === 'string') throw new Error('the page has no address')
  const browser = await chromium.launch({ executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium', args: ['--no-sandbox', '--use-angle=swiftshader', '--enable-unsafe-swiftshader'] })
  try {
    const pages: PageFigures[] = []
    let requests = 0, pageCpu = 0
    for (const finish of FINISHES) {
      const page = await browser.newPage()
      await page.goto(`http://127.0.0.1:${address.port}/`)
      await page.waitForFunction(() => 'measure' in window)
      const devtools = await page.context().newCDPSession(page)
      await devtools.send('Performance.enable', { timeDomain: 'threadTicks' })
      const before = await busy(devtools)
      const measured = await page.evaluate(asked => window.measure(asked), { finish, look: demoWall.get(finish)! })
      requests += await page.evaluate(() => {
        const since = performance.getEntriesByName('drag')[0]!.startTime
        return performance.getEntriesByType('resource').filter(entry => entry.startTime > since).length
      })
      const pictures = measured.edits.length * 4 / 3 + measured.drag.changes
      pageCpu = Math.max(pageCpu, (await busy(devtools) - before) / pictures)
      pages.push(measured)
      await page.close()
    }
    return { browser: `Chromium ${browser.version()}`, pages, requests, pageCpu }
  }
  finally {
    await browser.close()
    server.close()
  }
}

/** Milliseconds of the processor that the page's own thread has taken. */
async function busy(devtools: CDPSession): Promise<number> {
  const { metrics } = await devtools.send('Performance.getMetrics')
  return 1000 * (metrics.find(({ name }) => name === 'TaskDuration')?.value ?? NaN)
}
