import type { RequestListener } from 'node:http';
import { createServer, type AddressInfo } from 'node:net';
import { describe, expect, it } from 'vitest';
import { frontDoor } from '@/features/http/front-door.server';
import { serve } from '@/features/http/serve.server';

async function freePort(): Promise<number> {
  const probe = createServer();
  await new Promise<void>((resolve) => probe.listen(0, '127.0.0.1', resolve));
  const { port } = probe.address() as AddressInfo;
  await new Promise((resolve) => probe.close(resolve));
  return port;
}

const pause = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

describe('stopping', () => {
  it('lets an answer that has begun finish, then is done at once', async () => {
    const port = await freePort();
    const site = await serve((_req, res) => void pause(300).then(() => res.end('done')), { port, host: '127.0.0.1' });
    const answer = fetch(`http://127.0.0.1:${port}/`).then((res) => res.text());
    await pause(100);
    const started = Date.now();
    await site.stop();
    expect(Date.now() - started).toBeLessThan(1500);
    expect(await answer).toBe('done');
    await expect(fetch(`http://127.0.0.1:${port}/`)).rejects.toThrow();
  });

  it('ends an event stream, which would never end by itself', async () => {
    const port = await freePort();
    const events: RequestListener = (_req, res) => {
      res.writeHead(200, { 'content-type': 'text/event-stream' }).write(': hello\n\n');
    };
    const door = frontDoor(events, { allowedHosts: ['127.0.0.1'], trustedProxies: [] });
    const site = await serve(door, { port, host: '127.0.0.1' });
    const stream = await fetch(`http://127.0.0.1:${port}/`);
    const started = Date.now();
    await site.stop();
    expect(Date.now() - started).toBeLessThan(1500);
    expect(await stream.text()).toBe(': hello\n\n');
  });

  it('cuts off an answer that outlasts its patience', async () => {
    const port = await freePort();
    const site = await serve(() => {}, { port, host: '127.0.0.1' });
    const answer = fetch(`http://127.0.0.1:${port}/`).catch(() => 'cut off');
    await pause(100);
    await site.stop({ patience: 200 });
    expect(await answer).toBe('cut off');
  });

  it('is refused a port that is taken', async () => {
    const port = await freePort();
    const site = await serve(() => {}, { port, host: '127.0.0.1' });
    await expect(serve(() => {}, { port, host: '127.0.0.1' })).rejects.toThrow('EADDRINUSE');
    await site.stop();
  });
});
