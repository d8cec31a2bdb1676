import net from 'node:net';

const tryPort = (port: number, host: string): Promise<number | undefined> =>
  new Promise((resolve) => {
    const server = net.createServer();
    server.once('error', () => resolve(undefined));
    server.listen(port, host, () => {
      const address = server.address();
      server.close(() => resolve(typeof address === 'object' ? address?.port : undefined));
    });
  });

export const portIsFree = async (port: number, host = '127.0.0.1'): Promise<boolean> =>
  (await tryPort(port, host)) !== undefined;

/** The preferred port when it is free, else any free one of the loopback address. */
export async function freePort(preferred?: number): Promise<number> {
  if (preferred && (await portIsFree(preferred))) return preferred;
  const port = await tryPort(0, '127.0.0.1');
  if (!port) throw new Error('No free port on 127.0.0.1.');
  return port;
}
