import { createServer } from 'node:net'
import { Halt } from './say.mjs'

/**
 * @param {number} port
 * @param {string} host
 * @returns {Promise<number>}
 */
function tryPort(port, host) {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.once('error', reject)
    server.listen({ port, host, exclusive: true }, () => {
      const address = server.address()
      server.close(() => resolve(typeof address === 'object' && address ? address.port : port))
    })
  })
}

/** A port on loopback that nobody listens on. */
export const freePort = () => tryPort(0, '127.0.0.1')

/**
 * Stops early when somebody else listens where we are to listen.
 * @param {number} port
 * @param {string} host
 */
export async function assertPortIsFree(port, host) {
  try {
    await tryPort(port, host)
  }
  catch (error) {
    const code = /** @type {NodeJS.ErrnoException} */ (error).code
    if (code === 'EADDRINUSE') throw new Halt(`Port ${port} on ${host} is taken by another program.`, `Choose another, for instance: PORT=${port + 1} npm start`)
    if (code === 'EACCES') throw new Halt(`This user may not listen on port ${port}.`, 'Choose a port above 1023.')
    throw new Halt(`Cannot listen on ${host}, port ${port}: ${code}.`, 'HOST is an address of this machine, such as 127.0.0.1 or 0.0.0.0.')
  }
}
