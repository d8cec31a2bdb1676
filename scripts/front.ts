import fs from 'node:fs';
import http from 'node:http';
import path from 'node:path';
import { allowedOrigins, type StartEnv } from '#server/env.ts';

export type Handler = (request: http.IncomingMessage, response: http.ServerResponse) => unknown;

export interface FrontOptions {
  settings: Pick<StartEnv, 'HOST' | 'PORT' | 'SPINWARD_ORIGIN' | 'SPINWARD_TRUST_PROXY'>;
  /** Astro's handler. */
  handler: Handler;
  /** The folder of built files that a browser may have, precompressed twins among them. */
  clientFolder: string;
}

const MAX_BODY_BYTES = 32 * 1024 * 1024;
const LOOPBACK = new Set(['localhost', '127.0.0.1']);

/** Headers that only a proxy in front may set, and that the pages behind would believe. */
const FORWARDED = /^(x-forwarded-.*|forwarded|x-real-ip|x-client-ip)$/;

const HEADERS: Readonly<Record<string, string>> = {
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'same-origin',
  'permissions-policy': 'geolocation=(), camera=(), microphone=()',
  'cross-origin-opener-policy': 'same-origin',
  'cross-origin-resource-policy': 'same-origin',
};

const TYPES: Readonly<Record<string, string>> = {
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.svg': 'image/svg+xml',
};

function refuse(response: http.ServerResponse, status: number, sentence: string): void {
  response.writeHead(status, { 'content-type': 'text/plain; charset=utf-8', connection: 'close' });
  response.end(`${sentence}\n`);
}

/** Why a request may not enter, if it may not. */
function refusal(request: http.IncomingMessage, hosts: ReadonlySet<string>): [number, string] | undefined {
  const host = request.headers.host?.toLowerCase();
  if (!host) return [400, 'The request names no host.'];
  if (!hosts.has(host))
    return [421, 'This server does not answer for that host. Set SPINWARD_ORIGIN to the address used.'];
  if (request.headers['transfer-encoding']) return [411, 'The request has to say its length.'];
  if (Number(request.headers['content-length'] ?? 0) > MAX_BODY_BYTES)
    return [413, 'The request is larger than 32 MB.'];
  return undefined;
}

/** The address of whoever asks: the proxy's last word where a proxy is trusted, else the connection's. */
function clientAddress(request: http.IncomingMessage, trustProxy: boolean): string {
  const forwarded = trustProxy ? request.headers['x-forwarded-for'] : undefined;
  const last = String(forwarded ?? '')
    .split(',')
    .at(-1)
    ?.trim();
  return last || (request.socket.remoteAddress ?? '');
}

/** Leaves the pages behind with headers they can believe: a host they know, and the client's true address. */
function cleanHeaders(request: http.IncomingMessage, { settings }: FrontOptions): void {
  const address = clientAddress(request, settings.SPINWARD_TRUST_PROXY);
  for (const name of Object.keys(request.headers)) if (FORWARDED.test(name)) delete request.headers[name];
  request.headers['x-forwarded-for'] = address;
  const { hostname } = new URL(`http://${request.headers.host}`);
  if (!LOOPBACK.has(hostname)) request.headers.host = `localhost:${settings.PORT}`;
}

/** Astro's own files carry a hash in their names, so a browser may keep them for good. */
const ASSETS = '/_astro/';

/** Addresses of the assets that have a precompressed twin, with the twin. */
function findTwins(clientFolder: string): ReadonlyMap<string, string> {
  const folder = path.join(clientFolder, ASSETS);
  const names = fs.existsSync(folder) ? fs.readdirSync(folder) : [];
  const twins = names.filter((name) => name.endsWith('.br'));
  return new Map(twins.map((name) => [ASSETS + name.slice(0, -'.br'.length), path.join(folder, name)]));
}

const addressOf = (request: http.IncomingMessage): string => (request.url ?? '/').split('?', 1)[0] ?? '/';

/** Sends a precompressed asset, if there is one that this request wants. */
function sendTwin(
  request: http.IncomingMessage,
  response: http.ServerResponse,
  twins: ReadonlyMap<string, string>,
): boolean {
  const address = addressOf(request);
  const twin = twins.get(address);
  const wanted = request.method === 'GET' && /\bbr\b/.test(String(request.headers['accept-encoding'] ?? ''));
  if (!twin || !wanted) return false;
  response.writeHead(200, {
    'content-type': TYPES[path.extname(address)] ?? 'application/octet-stream',
    'content-encoding': 'br',
    'content-length': fs.statSync(twin).size,
    vary: 'accept-encoding',
    'cache-control': 'public, max-age=31536000, immutable',
  });
  fs.createReadStream(twin).pipe(response);
  return true;
}

/** The server that stands before Astro's handler. Not listening yet. */
export function makeFront(options: FrontOptions): http.Server {
  const origins = allowedOrigins(options.settings);
  const hosts = new Set(origins.map((origin) => new URL(origin).host));
  const secure = options.settings.SPINWARD_ORIGIN?.startsWith('https://');
  const headers = secure ? { ...HEADERS, 'strict-transport-security': 'max-age=31536000' } : HEADERS;
  const twins = findTwins(options.clientFolder);

  return http.createServer((request, response) => {
    for (const [name, value] of Object.entries(headers)) response.setHeader(name, value);
    const refused = refusal(request, hosts);
    if (refused) return refuse(response, ...refused);
    cleanHeaders(request, options);
    if (!sendTwin(request, response, twins)) options.handler(request, response);
  });
}
