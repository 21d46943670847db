import { createServer } from 'node:net'

/**
 * Whether nothing listens on a port of this machine, over either kind of loopback address:
 * a stranger on `::1` would answer for `localhost` in our place.
 */
export async function portIsFree(/** @type {number} */ port) {
  return (await canListen(port, '127.0.0.1')) && (await canListen(port, '::1'))
}

function canListen(/** @type {number} */ port, /** @type {string} */ host) {
  return new Promise((resolve) => {
    const server = createServer()
    server.once('error', (/** @type {NodeJS.ErrnoException} */ error) => {
      // A machine without IPv6 cannot have anyone there.
      resolve(error.code === 'EADDRNOTAVAIL' || error.code === 'EAFNOSUPPORT')
    })
    server.listen({ port, host, exclusive: true }, () => server.close(() => resolve(true)))
  })
}

/** The first free port at or after `from`; never 5432, where a machine's own database lives. */
export async function freePort(/** @type {number} */ from) {
  for (let port = from; port <= 65_535; port += 1) {
    if (port !== 5432 && (await portIsFree(port))) return port
  }
  throw new Error(`no free port from ${from} on`)
}
