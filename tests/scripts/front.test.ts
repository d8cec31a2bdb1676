import fs from 'node:fs';
import http from 'node:http';
import type { AddressInfo } from 'node:net';
import os from 'node:os';
import path from 'node:path';
import { brotliDecompressSync } from 'node:zlib';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { makeFront, type Handler } from '#scripts/front.ts';
import { closable } from '#scripts/graceful.ts';
import { precompress } from '#scripts/precompress.ts';
import { expectSoon } from '#tests/support/soon.ts';

const SCRIPT = `// ${'spinward '.repeat(400)}`;
const clientFolder = fs.mkdtempSync(path.join(os.tmpdir(), 'spinward-front-'));
const open: (() => Promise<void>)[] = [];

beforeAll(() => {
  fs.mkdirSync(path.join(clientFolder, '_astro'));
  fs.writeFileSync(path.join(clientFolder, '_astro', 'island.abc123.js'), SCRIPT);
  precompress(path.join(clientFolder, '_astro'));
});
afterAll(async () => {
  await Promise.all(open.map((close) => close()));
  fs.rmSync(clientFolder, { recursive: true });
});

/** Answers with the headers it was handed. */
const echo: Handler = (request, response) => response.end(JSON.stringify(request.headers));

async function listen(extra: { trust?: boolean; origin?: string } = {}, handler = echo) {
  const settings = {
    HOST: '127.0.0.1',
    PORT: 4321,
    SPINWARD_ORIGIN: extra.origin,
    SPINWARD_TRUST_PROXY: extra.trust ?? false,
  };
  const server = makeFront({ settings, handler, clientFolder });
  const close = closable(server);
  open.push(close);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return { port: (server.address() as AddressInfo).port, close };
}

interface Answer {
  status: number | undefined;
  headers: http.IncomingHttpHeaders;
  body: Buffer;
}

/** A plain request: fetch would set the host itself. */
function ask(
  port: number,
  headers: Record<string, string>,
  options: http.RequestOptions = {},
): Promise<Answer> {
  return new Promise((resolve, reject) => {
    const request = http.request({
      host: '127.0.0.1',
      port,
      setHost: false,
      headers,
      agent: false,
      ...options,
    });
    request.once('error', reject).once('response', (response) => {
      const chunks: Buffer[] = [];
      response.once('error', reject);
      response.on('data', (chunk: Buffer) => chunks.push(chunk));
      response.on('end', () =>
        resolve({ status: response.statusCode, headers: response.headers, body: Buffer.concat(chunks) }),
      );
    });
    request.end();
  });
}
const handed = (answer: Answer): Record<string, string> =>
  JSON.parse(answer.body.toString()) as Record<string, string>;

describe('the host', () => {
  test.each(['127.0.0.1:4321', 'localhost:4321', 'LOCALHOST:4321', '[::1]:4321', 's.example'])(
    '%s is answered',
    async (host) => {
      const { port } = await listen({ origin: 'https://s.example' });
      expect((await ask(port, { host })).status).toBe(200);
    },
  );

  // [read] RFC 9110 section 15.5.20: 421 for a host that the server does not answer for.
  test.each(['evil.example', '127.0.0.1:4322', 'localhost', 's.example.evil', 's.example:8443'])(
    '%s is refused',
    async (host) => {
      const { port } = await listen({ origin: 'https://s.example' });
      expect((await ask(port, { host })).status).toBe(421);
    },
  );

  // [read] RFC 9112 section 3.2: a request without a host is answered with 400.
  test('none is a bad request', async () => {
    const { port } = await listen();
    expect((await ask(port, {})).status).toBe(400);
  });

  test('the pages behind see one that Astro knows', async () => {
    const { port } = await listen({ origin: 'https://s.example' });
    expect(handed(await ask(port, { host: 's.example' }))['host']).toBe('localhost:4321');
    expect(handed(await ask(port, { host: '127.0.0.1:4321' }))['host']).toBe('127.0.0.1:4321');
  });
});

describe('what a client says of itself', () => {
  const lies = {
    host: '127.0.0.1:4321',
    'x-forwarded-for': '198.51.100.1, 198.51.100.2',
    'x-forwarded-host': 'evil.example',
    'x-forwarded-proto': 'https',
    'x-client-ip': '198.51.100.3',
    'x-real-ip': '198.51.100.4',
    forwarded: 'for=198.51.100.5',
  };

  test('is not believed: the pages see the address of the connection', async () => {
    const { port } = await listen();
    const headers = handed(await ask(port, lies));
    expect(headers['x-forwarded-for']).toBe('127.0.0.1');
    for (const name of ['x-forwarded-host', 'x-forwarded-proto', 'x-client-ip', 'x-real-ip', 'forwarded'])
      expect(headers).not.toHaveProperty(name);
  });

  test('counts no further than the proxy’s own word where a proxy is trusted', async () => {
    const { port } = await listen({ trust: true });
    expect(handed(await ask(port, lies))['x-forwarded-for']).toBe('198.51.100.2');
  });
});

describe('bodies', () => {
  const host = '127.0.0.1:4321';
  test('over 32 MB are refused before they are read', async () => {
    const { port } = await listen();
    const headers = { host, 'content-length': String(33 * 1024 * 1024), expect: '100-continue' };
    const answer = await new Promise<number | undefined>((resolve) => {
      const request = http.request({ host: '127.0.0.1', port, method: 'POST', setHost: false, headers });
      request.once('response', (response) => resolve(response.statusCode));
      request.once('error', () => undefined);
      request.flushHeaders();
    });
    expect(answer).toBe(413);
  });

  test('without a length are refused', async () => {
    const { port } = await listen();
    expect((await ask(port, { host, 'transfer-encoding': 'chunked' }, { method: 'POST' })).status).toBe(411);
  });
});

describe('built files', () => {
  const host = '127.0.0.1:4321';
  const asset = { path: '/_astro/island.abc123.js?v=1' };

  test('go out compressed and may be kept for good', async () => {
    const { port } = await listen();
    const answer = await ask(port, { host, 'accept-encoding': 'gzip, br' }, asset);
    expect(answer.headers).toMatchObject({
      'content-encoding': 'br',
      'content-type': 'text/javascript; charset=utf-8',
      'cache-control': 'public, max-age=31536000, immutable',
      vary: 'accept-encoding',
    });
    expect(answer.body.length).toBeLessThan(SCRIPT.length / 10);
    expect(brotliDecompressSync(answer.body).toString()).toBe(SCRIPT);
  });

  test('are left to Astro where the client takes no brotli', async () => {
    const { port } = await listen();
    const answer = await ask(port, { host, 'accept-encoding': 'gzip' }, asset);
    expect(handed(answer)['accept-encoding']).toBe('gzip');
  });
});

test('headers of a careful server come with every answer, strict transport only over https', async () => {
  const plain = await ask((await listen()).port, { host: 'evil.example' });
  expect(plain.headers).toMatchObject({
    'x-content-type-options': 'nosniff',
    'referrer-policy': 'same-origin',
  });
  expect(plain.headers).not.toHaveProperty('strict-transport-security');
  const https = await ask((await listen({ origin: 'https://s.example' })).port, { host: 's.example' });
  expect(https.headers['strict-transport-security']).toMatch(/^max-age=\d{8}$/);
});

test('closing ends event streams at once and lets a request under way finish', async () => {
  let release: () => void = () => undefined;
  const { port, close } = await listen({}, (request, response) => {
    if (request.url === '/stream')
      response.writeHead(200, { 'content-type': 'text/event-stream' }).write('\n');
    else release = () => response.end('finished');
  });
  const headers = { host: '127.0.0.1:4321' };
  const stream = ask(port, headers, { path: '/stream' }).catch(() => 'cut');
  const slow = ask(port, headers, { path: '/slow' });
  await new Promise((resolve) => setTimeout(resolve, 100));
  const started = performance.now();
  const closed = close();
  setTimeout(() => release(), 200);
  expect((await slow).body.toString()).toBe('finished');
  await closed;
  expectSoon('closing', performance.now() - started, 2_000);
  await Promise.race([
    stream,
    new Promise((_, reject) => setTimeout(() => reject(new Error('stream open')), 500)),
  ]);
});
