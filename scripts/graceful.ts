import type http from 'node:http';

const PATIENCE_MS = 3_000;

/**
 * Prepares a server to close in order: requests under way may finish for a moment, event streams, which never do,
 * end at once.
 * @returns what closes it
 */
export function closable(server: http.Server): () => Promise<void> {
  const open = new Set<http.ServerResponse>();
  server.on('request', (_request, response: http.ServerResponse) => {
    open.add(response);
    response.once('close', () => open.delete(response));
  });
  return async () => {
    const closed = new Promise((resolve) => server.close(resolve));
    for (const response of open) if (isStream(response)) response.destroy();
    server.closeIdleConnections();
    const timer = setTimeout(() => server.closeAllConnections(), PATIENCE_MS);
    await closed;
    clearTimeout(timer);
  };
}

const isStream = (response: http.ServerResponse): boolean =>
  String(response.getHeader('content-type')).startsWith('text/event-stream');

/**
 * Runs `stop`, once, when the process is asked to stop or when the process that started it is gone.
 * The exit code is 0 unless process.exitCode says otherwise by then.
 */
export function stopInOrder(stop: () => Promise<unknown>): void {
  let stopping = false;
  const once = (): void => {
    if (stopping) return;
    stopping = true;
    void stop().then(
      () => process.exit(),
      () => process.exit(1),
    );
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, once);
  process.on('disconnect', once);
}
