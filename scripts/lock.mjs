import net from 'node:net';
import { createHash } from 'node:crypto';

/*
 * A lock among processes of one machine. It is a listening socket with an abstract name (Linux), so the kernel
 * drops it with the process that holds it: a killed run never leaves a stale lock behind.
 */

/** @param {string} name */
const listen = (name) =>
  new Promise((resolve, reject) => {
    const server = net.createServer((socket) => socket.destroy());
    server.once('error', (error) =>
      /** @type {NodeJS.ErrnoException} */ (error).code === 'EADDRINUSE' ? resolve(undefined) : reject(error),
    );
    server.listen(`\0spinward-${createHash('sha256').update(name).digest('hex').slice(0, 32)}`, () => {
      server.unref();
      resolve(server);
    });
  });

/**
 * Runs `work` while no other process of this machine runs anything under the same name; waits for its turn.
 * @template T
 * @param {string} name
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function inLock(name, work) {
  let lock = await listen(name);
  while (!lock) {
    await new Promise((resolve) => setTimeout(resolve, 100));
    lock = await listen(name);
  }
  try {
    return await work();
  } finally {
    await new Promise((resolve) => /** @type {net.Server} */ (lock).close(resolve));
  }
}
