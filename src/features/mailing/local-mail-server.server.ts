import { randomBytes } from 'node:crypto';
import { once } from 'node:events';
import { createWriteStream } from 'node:fs';
import { mkdir, rename, rm } from 'node:fs/promises';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { pipeline } from 'node:stream/promises';
import { SMTPServer } from 'smtp-server';

export interface LocalMailServer {
  /** `smtp://127.0.0.1:2525` */
  readonly url: string;
  stop(): Promise<void>;
}

const MOST_BYTES = 5 * 1024 * 1024;

/**
 * Stands in for the world's mail servers: takes every message, sends none on, and keeps each as it came in a file of its
 * own, `dir`/<time>-<number>.eml, with the envelope in `Return-Path` and `Delivered-To` as a last server writes it.
 * Listens on this machine alone; port 0 takes any free one.
 */
export async function startLocalMailServer({ port, dir }: { port: number; dir: string }): Promise<LocalMailServer> {
  await mkdir(dir, { recursive: true });
  let arrived = 0;
  const server = new SMTPServer({
    name: 'local mail server',
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    disableReverseLookup: true,
    logger: false,
    size: MOST_BYTES,
    // How long stopping waits for clients that stay connected.
    closeTimeout: 1_000,
    onData(stream, session, done) {
      const { mailFrom, rcptTo } = session.envelope;
      const head = [
        `Return-Path: <${mailFrom ? mailFrom.address : ''}>`,
        ...rcptTo.map(({ address }) => `Delivered-To: ${address}`),
      ].map((line) => `${line.replace(/[\r\n]/g, '')}\r\n`);
      arrived += 1;
      const name = `${Date.now()}-${String(arrived).padStart(6, '0')}-${randomBytes(4).toString('hex')}`;
      const partial = join(dir, `${name}.part`);
      const file = createWriteStream(partial);
      file.write(head.join(''));
      // Renamed when whole, so that nobody reads half a message.
      pipeline(stream, file)
        .then(async () => {
          if (!stream.sizeExceeded) return await rename(partial, join(dir, `${name}.eml`));
          await rm(partial, { force: true });
          throw Object.assign(new Error('Message too large'), { responseCode: 552 });
        })
        .then(() => done(), done);
    },
  });
  server.on('error', () => {
    // A client that breaks off; the sender notices and tries again.
  });
  server.listen(port, '127.0.0.1');
  await Promise.race([
    once(server.server, 'listening'),
    once(server.server, 'error').then(([error]: unknown[]) => Promise.reject(error as Error)),
  ]);
  return {
    url: `smtp://127.0.0.1:${(server.server.address() as AddressInfo).port}`,
    stop: () => new Promise((resolve) => server.close(() => resolve())),
  };
}
