import { createServer, request, type IncomingHttpHeaders, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { brotliDecompressSync } from 'node:zlib';
import { afterEach, describe, expect, it } from 'vitest';
import { LIMITS } from '@/features/http/body-limit.server';
import { frontDoor, isAllowedHost } from '@/features/http/front-door.server';
import { STATE_BYTES } from '@/features/projects/project-input';
import { PICTURE_LIMITS } from '@/features/uploads/limits';

let server: Server | undefined;
afterEach(() => {
  server?.closeAllConnections();
  server?.close();
});

interface Answer {
  status: number;
  headers: IncomingHttpHeaders;
  body: Buffer;
}
interface Ask {
  path?: string;
  method?: string;
  headers?: Record<string, string>;
  body?: Buffer;
  chunked?: boolean;
}

async function behindDoor(handler: RequestListener, trustedProxies: string[] = []) {
  server = createServer(frontDoor(handler, { allowedHosts: ['boxes.example'], trustedProxies }));
  await new Promise<void>((resolve) => server?.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  return ({ path = '/', method = 'GET', headers = {}, body, chunked = false }: Ask = {}) =>
    new Promise<Answer>((resolve, reject) => {
      const length = body && !chunked ? { 'content-length': String(body.length) } : {};
      const req = request({ port, path, method, headers: { host: 'boxes.example', ...length, ...headers } }, (res) => {
        const parts: Buffer[] = [];
        res.on('data', (part: Buffer) => parts.push(part));
        res.on('error', reject);
        res.on('end', () => resolve({ status: res.statusCode ?? 0, headers: res.headers, body: Buffer.concat(parts) }));
      });
      req.on('error', reject);
      for (let i = 0; body && i < body.length; i += 65536) req.write(body.subarray(i, i + 65536));
      req.end();
    });
}

const page: RequestListener = (_req, res) => res.writeHead(200, { 'content-type': 'text/html' }).end('<p>Hello</p>');
const readAll: RequestListener = (req, res) => {
  let bytes = 0;
  req.on('data', (part: Buffer) => (bytes += part.length));
  req.on('end', () => res.end(String(bytes)));
  req.on('error', () => {});
};
const MB = 2 ** 20;

describe('the host', () => {
  it('must be one of ours', async () => {
    const ask = await behindDoor(page);
    expect((await ask()).status).toBe(200);
    const { status, body } = await ask({ headers: { host: 'evil.test' } });
    expect(status).toBe(421);
    expect(body.toString()).toBe('This site does not answer to evil.test: its owner can add that to ALLOWED_HOSTS.\n');
  });

  it('is not repeated when it is no host name', async () => {
    const { body } = await (await behindDoor(page))({ headers: { host: '<b>' } });
    expect(body.toString()).toContain('does not answer to another name');
  });

  it.each([
    ['boxes.example', ['boxes.example'], true],
    ['boxes.example:8080', ['boxes.example'], true],
    ['boxes.example:8080', ['boxes.example:4321'], false],
    ['localhost:4321', ['localhost:4321'], true],
    ['[::1]:4321', ['[::1]:4321'], true],
    ['boxes.example.evil.test', ['boxes.example'], false],
    ['', ['boxes.example'], false],
  ])('%s among %j passes: %s', (host, allowed, passes) => {
    expect(isAllowedHost(host, allowed)).toBe(passes);
  });
});

describe('forwarding headers', () => {
  const tell: RequestListener = (req, res) => {
    const kept = Object.entries(req.headers).filter(([name]) => /forwarded|real-ip/.test(name));
    res.end(JSON.stringify(Object.fromEntries(kept)));
  };
  const forged = {
    'x-forwarded-for': '6.6.6.6, 10.0.0.7',
    'x-forwarded-proto': 'https',
    'x-forwarded-host': 'evil.test',
    'x-forwarded-port': '1',
    'x-real-ip': '6.6.6.6',
    forwarded: 'for=6.6.6.6',
  };
  const heard = async (trusted: string[], headers: Record<string, string> = forged) =>
    JSON.parse((await (await behindDoor(tell, trusted))({ headers })).body.toString()) as unknown;

  it('are dropped from a peer that is no trusted proxy', async () => {
    expect(await heard([])).toEqual({});
    expect(await heard(['10.0.0.7'])).toEqual({});
  });

  it('from a trusted proxy leave the address that it saw, not the one the client wrote', async () => {
    expect(await heard(['127.0.0.1'])).toEqual({ 'x-forwarded-for': '10.0.0.7', 'x-forwarded-proto': 'https' });
  });

  it('skip further trusted proxies on the way to the client', async () => {
    expect(await heard(['loopback', '10.0.0.7'])).toEqual({
      'x-forwarded-for': '6.6.6.6',
      'x-forwarded-proto': 'https',
    });
  });
});

describe('a body', () => {
  it.each([
    ['/api/projects/1', 3 * MB, 200],
    ['/api/projects/1', 3 * MB + 1, 413],
    ['/api/uploads', 13 * MB, 200],
    ['/api/uploads', 13 * MB + 1, 413],
    ['/subscribe?next=/api/uploads', 3 * MB + 1, 413],
  ])('to %s of %i bytes is answered with %i', async (path, bytes, status) => {
    const ask = await behindDoor(readAll);
    const answer = await ask({ path, method: 'POST', body: Buffer.alloc(bytes) }).catch((error: Error) => error);
    // A refusal may close the connection while the client still sends.
    if (answer instanceof Error)
      expect([status, answer.message]).toEqual([413, expect.stringMatching(/EPIPE|ECONNRESET|hang up/)]);
    else expect(answer.status).toBe(status);
  });

  it('says how much may come when too much is announced', async () => {
    const ask = await behindDoor(readAll);
    const { status, body } = await ask({
      method: 'POST',
      headers: { 'content-length': String(3 * MB + 1), expect: '100-continue' },
    });
    expect([status, body.toString()]).toEqual([413, 'That is too much to take in: 3 MB at most.\n']);
  });

  it('may be larger at the door than any route takes', () => {
    expect(LIMITS.usual).toBeGreaterThan(STATE_BYTES);
    expect(LIMITS.upload).toBeGreaterThan(PICTURE_LIMITS.bytes);
  });

  it('sent in chunks is counted as it comes', async () => {
    const ask = await behindDoor(readAll);
    const small = await ask({ method: 'POST', body: Buffer.alloc(MB), chunked: true });
    expect(small.body.toString()).toBe(String(MB));
    const answer = await ask({ method: 'POST', body: Buffer.alloc(5 * MB), chunked: true }).catch(
      (error: Error) => error,
    );
    expect(answer instanceof Error ? 413 : answer.status).toBe(413);
  });
});

describe('headers', () => {
  it('make every answer safe to have around', async () => {
    const { headers } = await (await behindDoor(page))();
    expect(headers).toMatchObject({
      'x-content-type-options': 'nosniff',
      'referrer-policy': 'strict-origin-when-cross-origin',
      'permissions-policy': expect.stringContaining('camera=()'),
      'cross-origin-opener-policy': 'same-origin',
      'x-frame-options': 'DENY',
      'cache-control': 'private, no-cache',
    });
    expect(headers['strict-transport-security']).toBeUndefined();
  });

  it('add frame-ancestors to the policy that a page has', async () => {
    const withPolicy: RequestListener = (_req, res) =>
      res.writeHead(200, { 'content-type': 'text/html', 'content-security-policy': "default-src 'self';" }).end();
    const { headers } = await (await behindDoor(withPolicy))();
    expect(headers['content-security-policy']).toBe("default-src 'self'; frame-ancestors 'none'");
  });

  it('leave a route its own framing, caching and cookies', async () => {
    const own: RequestListener = (_req, res) =>
      res
        .writeHead(200, {
          'content-type': 'text/html',
          'content-security-policy': "sandbox; frame-ancestors 'self'",
          'cache-control': 'public, max-age=60',
          'set-cookie': ['a=1', 'b=2'],
        })
        .end();
    const { headers } = await (await behindDoor(own))();
    expect(headers['content-security-policy']).toBe("sandbox; frame-ancestors 'self'");
    expect(headers['x-frame-options']).toBeUndefined();
    expect(headers['cache-control']).toBe('public, max-age=60');
    expect(headers['set-cookie']).toEqual(['a=1', 'b=2']);
  });

  it('let nothing load into a drawing that is opened by itself', async () => {
    const drawing: RequestListener = (_req, res) =>
      res.writeHead(200, { 'content-type': 'image/svg+xml' }).end('<svg/>');
    const { headers } = await (await behindDoor(drawing))();
    expect(headers['content-security-policy']).toContain("default-src 'none'");
  });

  it('ask for https again only where a trusted proxy says it was https', async () => {
    const headers = { 'x-forwarded-proto': 'https' };
    const trusted = await (await behindDoor(page, ['loopback']))({ headers });
    expect(trusted.headers['strict-transport-security']).toBe('max-age=31536000');
    server?.close();
    const forged = await (await behindDoor(page))({ headers });
    expect(forged.headers['strict-transport-security']).toBeUndefined();
  });
});

describe('compression', () => {
  const text = 'fold '.repeat(1000);

  it('shrinks a page', async () => {
    const long: RequestListener = (_req, res) => res.writeHead(200, { 'content-type': 'text/html' }).end(text);
    const { headers, body } = await (await behindDoor(long))({ headers: { 'accept-encoding': 'br' } });
    expect(headers['content-encoding']).toBe('br');
    expect(body.length).toBeLessThan(200);
    expect(brotliDecompressSync(body).toString()).toBe(text);
  });

  it('leaves an event stream alone, which must not wait', async () => {
    const events: RequestListener = (_req, res) =>
      res.writeHead(200, { 'content-type': 'text/event-stream' }).end(text);
    const { headers } = await (await behindDoor(events))({ headers: { 'accept-encoding': 'br' } });
    expect(headers['content-encoding']).toBeUndefined();
  });
});
