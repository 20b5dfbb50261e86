import { type ChildProcess, spawn } from 'node:child_process'
import { createServer } from 'node:net'
import { setTimeout as delay } from 'node:timers/promises'
import { defaults, seal } from 'iron-webcrypto'
import { afterAll } from 'vitest'
import type { PersonCtx } from '#server/services/ctx'
import { ensureBuild } from '../../scripts/lib/application.mjs'
import { testDatabaseUrl } from './database'

/** A built server of a test file, working on the file's own database. */
export interface TestServer {
  url: string
  /** Sends a request as our own pages send it: same origin, JSON where the body is an object. */
  ask: (method: string, path: string, options?: AskOptions) => Promise<Response>
  /** Tells it to stop, as whoever runs it does, and waits until its process has ended; answers with its exit code. */
  stop: () => Promise<number | null>
}

export interface AskOptions {
  /** Who asks; nobody signed in without it. */
  as?: PersonCtx | null
  body?: unknown
  headers?: Record<string, string>
}

/** The same object under the sealing library's own, older, name for its bytes. */
const WEB_CRYPTO = crypto as unknown as Parameters<typeof seal>[0]

const running: ChildProcess[] = []

/** Starts the built server; it is built first when it is not, or when what it is made of has changed. Ends with the test file. */
export async function testServer(environment: Record<string, string> = {}): Promise<TestServer> {
  await ensureBuild()
  const port = await freePort()
  const url = `http://127.0.0.1:${port}`
  const said: string[] = []
  const child = spawn(process.execPath, ['.output/server/index.mjs'], {
    env: {
      ...process.env, NODE_ENV: 'production', HOST: '127.0.0.1', PORT: String(port), PUBLIC_URL: url,
      DATABASE_URL: await testDatabaseUrl(), ...environment,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  running.push(child)
  for (const stream of [child.stdout, child.stderr]) stream.on('data', chunk => said.push(String(chunk)))
  await listening(child, `${url}/api/session`, said)
  return {
    url,
    stop: () => stopped(child),
    async ask(method, path, { as, body, headers } = {}) {
      const isPlain = body === undefined || body instanceof Uint8Array || body instanceof FormData || typeof body === 'string'
      return fetch(new URL(path, url), {
        method,
        redirect: 'manual',
        headers: {
          origin: url,
          ...(isPlain ? {} : { 'content-type': 'application/json' }),
          ...(as ? { cookie: await cookieOf(as) } : {}),
          ...headers,
        },
        body: isPlain ? body as BodyInit | undefined : JSON.stringify(body),
      })
    },
  }
}

/** The cookie a browser holds for somebody's session, sealed as the server seals it. */
export async function cookieOf({ sessionId }: Pick<PersonCtx, 'sessionId'>): Promise<string> {
  const session = { id: crypto.randomUUID(), createdAt: Date.now(), data: { secure: { sessionId } } }
  const sealed = await seal(WEB_CRYPTO, session, process.env.SESSION_PASSWORD ?? '', { ...defaults, ttl: 3_600_000 })
  return `countershade=${sealed}`
}

afterAll(async () => {
  await Promise.all(running.splice(0).map(stopped))
})

function stopped(child: ChildProcess): Promise<number | null> {
  return new Promise((resolve) => {
    if (child.exitCode !== null || child.signalCode !== null) return resolve(child.exitCode)
    child.once('exit', code => resolve(code))
    child.kill('SIGTERM')
  })
}

async function listening(child: ChildProcess, url: string, said: string[]): Promise<void> {
  for (let patience = 0; patience < 400; patience++) {
    if (child.exitCode !== null) break
    if (await fetch(url).then(() => true, () => false)) return
    await delay(50)
  }
  throw new Error(`The server did not answer:\n${said.join('')}`)
}

async function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.once('error', reject)
    server.listen(0, '127.0.0.1', () => {
      const address = server.address()
      server.close(() => typeof address === 'object' && address ? resolve(address.port) : reject(new Error('No port is free.')))
    })
  })
}
