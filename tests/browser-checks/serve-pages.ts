import { readFile } from 'node:fs/promises'
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http'
import type { AddressInfo } from 'node:net'
import { text } from 'node:stream/consumers'
import { PUBLISHED } from './published-folders'

/** A server for the pages of these checks, and what they hand back. */
export interface PageServer {
  /** Address of a page, by the name of its script: `laws-page`. */
  address: (page: string) => string
  /** The next report, or a failure when none comes in time. */
  report: (withinMs: number) => Promise<unknown>
  close: () => void
}

/** Serves bundled files on a free port of this machine only. */
export async function servePages(files: ReadonlyMap<string, Uint8Array>): Promise<PageServer> {
  let take: ((report: { value?: unknown, error?: string }) => void) | undefined

  async function answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
    const { pathname, searchParams } = new URL(request.url ?? '/', 'http://127.0.0.1')
    if (pathname === '/report') {
      take?.(JSON.parse(await text(request)) as { value?: unknown, error?: string })
      return void response.end()
    }
    if (pathname === '/published') {
      const file = searchParams.get('file') ?? ''
      const isPublished = PUBLISHED.some(folder => file.startsWith(`${folder}/`)) && !file.includes('..')
      return void response.end(isPublished ? await readFile(file) : response.writeHead(404) && '')
    }
    const script = files.get(pathname)
    if (script) return void response.setHeader('content-type', 'text/javascript').end(script)
    if (!files.has(`${pathname}.js`)) return void response.writeHead(404).end()
    response.setHeader('content-type', 'text/html; charset=utf-8').end(`<!doctype html><meta charset="utf-8"><title>at work</title><script type="module" src="${pathname}.js"></script>`)
  }

  const server = createServer((request, response) => {
    answer(request, response).catch(() => response.writeHead(404).end())
  })
  await new Promise<void>(resolve => server.listen(0, '127.0.0.1', resolve))
  const { port } = server.address() as AddressInfo

  return {
    address: page => `http://127.0.0.1:${port}/${page}`,
    report: withinMs => new Promise((resolve, reject) => {
      const late = setTimeout(() => reject(new Error(`no report came within ${withinMs} ms`)), withinMs)
      take = ({ value, error }) => {
        clearTimeout(late)
        if (error) reject(new Error(error))
        else resolve(value)
      }
    }),
    close: () => server.close(),
  }
}
