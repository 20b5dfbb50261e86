import { createServer, connect, type Server, type Socket } from 'node:net'

/** A way between a browser and the server that can be shut: a network that is really gone, for pages and background workers alike. */
export interface Gate {
  /** Address of the application through the gate. */
  url: string
  shut: () => void
  open: () => void
  close: () => Promise<void>
}

/** Opens a gate before the server at an address. */
export async function openGate(target: string): Promise<Gate> {
  const { hostname, port } = new URL(target)
  const ways = new Set<Socket>()
  let isOpen = true
  const server: Server = createServer((way) => {
    if (!isOpen) return way.destroy()
    const there = connect(Number(port), hostname)
    for (const one of [way, there]) {
      ways.add(one)
      one.on('error', () => undefined)
      one.on('close', () => {
        ways.delete(one)
        way.destroy()
        there.destroy()
      })
    }
    way.pipe(there).pipe(way)
  })
  await new Promise<void>(resolve => server.listen(0, '127.0.0.1', resolve))
  const address = server.address()
  if (address === null || typeof address === 'string') throw new Error('The gate has no port')
  const cut = () => ways.forEach(way => way.destroy())
  return {
    url: `http://127.0.0.1:${address.port}`,
    shut() {
      isOpen = false
      cut()
    },
    open() {
      isOpen = true
    },
    async close() {
      cut()
      await new Promise<void>(resolve => server.close(() => resolve()))
    },
  }
}
