import { once } from 'node:events';
import { readFileSync, readdirSync } from 'node:fs';
import { createServer, type IncomingMessage, type RequestListener, type Server, type ServerResponse } from 'node:http';
import { join } from 'node:path';
import { guidePage } from './guide-page.js';
import { TRUST_CHECK_PATH } from './trust-check.js';
import type { Trust } from './trust-folder.js';

export interface GuideOptions {
  /** Asked anew each time: certificates are renewed while it runs. */
  trust: () => Trust;
  httpsPort: () => number;
  /** Style, script and font of the page come from there; null for none. */
  tabletDist: string | null;
}

interface Answer {
  type: string;
  body: string | Buffer;
}

const headers = {
  'Cache-Control': 'no-store',
  // The one thing that the page asks of others is whether this device trusts the hub.
  'Content-Security-Policy':
    "default-src 'none'; img-src 'self'; style-src 'self'; script-src 'self'; font-src 'self'; connect-src https:; base-uri 'none'; form-action 'none'; frame-ancestors 'none'",
  'Referrer-Policy': 'no-referrer',
  'X-Content-Type-Options': 'nosniff',
};

/**
 * The page that walks a tablet through trusting this hub. Plain HTTP, since nobody trusts it yet; so there is nothing else on it: no API, no
 * sign-in, no tablet, no file but the certificate that everyone may have.
 */
export function createGuideServer(options: GuideOptions): Server {
  return createServer({ requestTimeout: 10_000, headersTimeout: 10_000 }, guideHandler(options));
}

export async function listenGuide(server: Server, port: number, host: string): Promise<number> {
  server.listen(port, host);
  await once(server, 'listening');
  return (server.address() as { port: number }).port;
}

function guideHandler(options: GuideOptions): RequestListener {
  const pages = pagesOf(options);
  return (request, response) => {
    const page = pages.get((request.url ?? '').replace(/\?.*$/, ''));
    if (!page) return end(response, 404, { type: 'text/plain; charset=utf-8', body: 'There is nothing here.\n' });
    if (request.method !== 'GET' && request.method !== 'HEAD')
      return end(response, 405, { type: 'text/plain; charset=utf-8', body: 'This page can only be read.\n' });
    end(response, 200, page(request), request.method === 'HEAD');
  };
}

function pagesOf({
  trust,
  httpsPort,
  tabletDist,
}: GuideOptions): ReadonlyMap<string, (request: IncomingMessage) => Answer> {
  // By this type an iPad knows a profile, as long as nothing calls it a file to keep.
  const certificateType = 'application/x-x509-ca-cert';
  const pages = new Map<string, (request: IncomingMessage) => Answer>([
    [
      '/',
      ({ headers: { host } }) => ({
        type: 'text/html; charset=utf-8',
        body: guidePage({ trust: trust(), host: host ?? '', httpsPort: httpsPort(), checkPath: TRUST_CHECK_PATH }),
      }),
    ],
    ['/steepfall.crt', () => ({ type: certificateType, body: trust().authority.der })],
    ['/steepfall.pem', () => ({ type: 'application/x-pem-file', body: trust().authority.pem })],
  ]);
  if (tabletDist === null) return pages;
  const add = (path: string, type: string, file: string) => pages.set(path, () => ({ type, body: readFileSync(file) }));
  add('/guide.css', 'text/css; charset=utf-8', join(tabletDist, 'trust/guide.css'));
  add('/guide.js', 'text/javascript; charset=utf-8', join(tabletDist, 'trust/guide.js'));
  add('/mark.svg', 'image/svg+xml', join(tabletDist, 'icons/mark.svg'));
  const font = readdirSync(join(tabletDist, 'assets')).find((name) => name.endsWith('.woff2'));
  if (font) add('/guide.woff2', 'font/woff2', join(tabletDist, 'assets', font));
  return pages;
}

function end(response: ServerResponse, status: number, { type, body }: Answer, isHead = false): void {
  response.writeHead(status, {
    ...headers,
    'Content-Type': type,
    'Content-Length': Buffer.byteLength(body),
  });
  response.end(isHead ? undefined : body);
}
