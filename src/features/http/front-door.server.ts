import type { IncomingMessage, OutgoingHttpHeaders, RequestListener, ServerResponse } from 'node:http';
import compression from 'compression';
import { keepForwardedHonest, plainAddress } from './forwarded.server';
import { limitBody } from './body-limit.server';
import { addSecurityHeaders } from './security-headers.server';

export interface FrontDoorOptions {
  /** Hosts that requests may name; one without a port stands for every port. */
  readonly allowedHosts: readonly string[];
  readonly trustedProxies: readonly string[];
}

/** What every request passes before Astro sees it: host, forwarding headers, body size, security headers, compression. */
export function frontDoor(handler: RequestListener, options: FrontDoorOptions): RequestListener {
  const compress = compression({
    filter: (req, res) => !isEventStream(res) && compression.filter(req as never, res as never),
  }) as unknown as (req: IncomingMessage, res: ServerResponse, next: () => void) => void;

  return (req, res) => {
    keepForwardedHonest(req, plainAddress(req.socket.remoteAddress ?? ''), options.trustedProxies);
    setHeadersLate(res, () => addSecurityHeaders(res, { https: req.headers['x-forwarded-proto'] === 'https' }));

    const host = req.headers.host?.toLowerCase() ?? '';
    if (!isAllowedHost(host, options.allowedHosts)) {
      const name = /^[\w.:[\]-]{1,255}$/.test(host) ? host : 'another name';
      return refuse(res, 421, `This site does not answer to ${name}: its owner can add that to ALLOWED_HOSTS.`);
    }
    if (!limitBody(req, res, (max) => refuse(res, 413, `That is too much to take in: ${max / 2 ** 20} MB at most.`)))
      return;
    compress(req, res, () => handler(req, res));
  };
}

function refuse(res: ServerResponse, status: number, sentence: string): void {
  if (res.headersSent) return void res.destroy();
  res.writeHead(status, {
    'content-type': 'text/plain; charset=utf-8',
    'cache-control': 'no-store',
    connection: 'close',
  });
  res.end(`${sentence}\n`);
}

/** Calls `change` when the headers are complete and not yet sent, whichever way the handler sends them. */
function setHeadersLate(res: ServerResponse, change: () => void): void {
  const writeHead = res.writeHead.bind(res);
  let changed = false;
  res.writeHead = ((status: number, ...rest: unknown[]) => {
    const given = rest.find((part) => typeof part === 'object') as OutgoingHttpHeaders | undefined;
    for (const [name, value] of Object.entries(given ?? {})) if (value !== undefined) res.setHeader(name, value);
    if (!changed) change();
    changed = true;
    const message = rest.find((part) => typeof part === 'string') as string | undefined;
    return message === undefined ? writeHead(status) : writeHead(status, message);
  }) as typeof res.writeHead;
}

export function isAllowedHost(host: string, allowed: readonly string[]): boolean {
  const name = host.replace(/:\d+$/, '');
  return allowed.some((entry) => entry.toLowerCase() === host || entry.toLowerCase() === name);
}

const isEventStream = (res: ServerResponse) => String(res.getHeader('content-type')).startsWith('text/event-stream');
