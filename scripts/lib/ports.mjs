import { createServer } from 'node:net';
import { UsageError } from './options.mjs';

/**
 * Find out whether a port can be listened on; 0 asks for any that is free.
 *
 * @param {string} host
 * @param {number} port
 * @returns {Promise<number>} the port
 * @throws {UsageError} when it is taken or not allowed
 */
export async function freePort(host, port) {
  const probe = createServer();
  try {
    await new Promise((resolve, reject) => {
      probe.once('error', reject).listen({ host, port }, () => resolve(undefined));
    });
    return /** @type {import('node:net').AddressInfo} */ (probe.address()).port;
  } catch (error) {
    throw portError(error, host, port);
  } finally {
    await new Promise((resolve) => probe.close(resolve));
  }
}

/**
 * One sentence for a port that cannot be had.
 *
 * @param {unknown} error
 * @param {string} host
 * @param {number} port
 */
export function portError(error, host, port) {
  const code = error instanceof Error && 'code' in error ? error.code : '';
  const why =
    code === 'EADDRINUSE'
      ? `Port ${port} is in use by another program; stop it, or choose another one with --port.`
      : code === 'EACCES'
        ? `Port ${port} may not be used by this account; choose one above 1023 with --port.`
        : `Zaffre cannot listen on ${host}, port ${port} (${code || error}).`;
  return new UsageError(why);
}
