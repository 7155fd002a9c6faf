import { once } from 'node:events';
import { createServer } from 'node:net';

/**
 * Whether a port of this machine can be listened on.
 * @param {number} port @param {string} host
 */
export async function isFree(port, host = '127.0.0.1') {
  return (await listenOnce(port, host)) !== null;
}

/** A port nobody listens on at the moment. */
export async function freePort() {
  const port = await listenOnce(0, '127.0.0.1');
  if (port === null) throw new Error('This machine gives no free port.');
  return port;
}

/** @param {number} port @param {string} host @returns {Promise<number | null>} */
async function listenOnce(port, host) {
  const server = createServer();
  try {
    server.listen(port, host);
    await once(server, 'listening');
    const address = server.address();
    server.close();
    await once(server, 'close');
    return typeof address === 'object' && address ? address.port : null;
  } catch {
    return null;
  }
}
