import net from 'node:net';
import { Failure } from './failure.mjs';

/**
 * Whether nothing listens on 127.0.0.1:port, and something could.
 * @param {number} port
 * @param {string} [host]
 * @returns {Promise<boolean>}
 */
export function isFree(port, host = '127.0.0.1') {
  return new Promise((resolve) => {
    const probe = net.createServer();
    probe.once('error', () => resolve(false));
    probe.listen({ port, host, exclusive: true }, () => probe.close(() => resolve(true)));
  });
}

/**
 * The first free port from `from` on that is not in `taken`; it is added to `taken`.
 * @param {number} from
 * @param {Set<number>} [taken]
 * @returns {Promise<number>}
 */
export async function nextFreePort(from, taken = new Set()) {
  for (let port = from; port < from + 200; port += 1) {
    if (taken.has(port) || !(await isFree(port))) continue;
    taken.add(port);
    return port;
  }
  throw new Failure(`No free port on 127.0.0.1 between ${from} and ${from + 199}.`);
}

/**
 * Some free port that the system picks: for throw-away services.
 * @returns {Promise<number>}
 */
export function anyFreePort() {
  return new Promise((resolve, reject) => {
    const probe = net.createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const { port } = /** @type {net.AddressInfo} */ (probe.address());
      probe.close(() => resolve(port));
    });
  });
}
