import { execFile } from 'node:child_process';
import { mkdirSync, mkdtempSync, utimesSync, writeFileSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { checkNode, fingerprint, isInstalled, portTrouble } from '../../scripts/steps.mjs';

const folderWith = (files: Record<string, string>) => {
  const folder = mkdtempSync(join(tmpdir(), 'foldwright-start-'));
  for (const [name, text] of Object.entries(files)) {
    mkdirSync(join(folder, name, '..'), { recursive: true });
    writeFileSync(join(folder, name), text);
  }
  return folder;
};

const start = (env: Record<string, string>) =>
  new Promise<{ code: number; output: string }>((resolve) => {
    execFile(process.execPath, ['scripts/start.mjs'], { env: { ...process.env, ...env } }, (error, stdout, stderr) =>
      resolve({ code: Number(error?.code ?? 0), output: stdout + stderr }),
    );
  });

describe('starting', () => {
  it('says in one sentence that the data folder cannot be written to', async () => {
    const { code, output } = await start({ DATA_DIR: '/dev/null/data' });
    expect(code).toBe(1);
    expect(output).toBe(
      'The data folder /dev/null/data cannot be written to (ENOTDIR): make it writable, or set DATA_DIR to another.\n',
    );
  });

  it('says in one sentence that the port is taken', async () => {
    const other = createServer();
    await new Promise<void>((resolve) => other.listen(0, '127.0.0.1', resolve));
    const { port } = other.address() as AddressInfo;
    const { code, output } = await start({ PORT: String(port), HOST: '' });
    other.close();
    expect(code).toBe(1);
    expect(output).toMatch(
      new RegExp(`^Port ${port} is taken: stop what runs there, or start with another: PORT=\\d+ npm start\n$`),
    );
  });

  it('says in one sentence that an address is not of this machine', () => {
    const error = Object.assign(new Error(), { code: 'EADDRNOTAVAIL' });
    process.env.HOST = '192.0.2.1';
    expect(portTrouble(error, 4321).message).toBe(
      'HOST is "192.0.2.1", which is no address of this machine: leave it out, or give 0.0.0.0 for all.',
    );
    delete process.env.HOST;
  });

  it.each(['18.20.4', '20.18.0'])('refuses Node %s', (version) => {
    expect(() => checkNode(version)).toThrow(
      `Foldwright needs Node 20.19 or newer and this is ${version}: install a newer one from nodejs.org.`,
    );
  });

  it.each(['20.19.0', '22.0.0', '24.1.0'])('takes Node %s', (version) => {
    expect(() => checkNode(version)).not.toThrow();
  });

  it('installs when nothing is installed or the lock file is newer', () => {
    const lock = 'package-lock.json';
    const installed = 'node_modules/.package-lock.json';
    expect(isInstalled(folderWith({ [lock]: '' }))).toBe(false);
    const folder = folderWith({ [lock]: '', [installed]: '' });
    utimesSync(join(folder, lock), 100, 100);
    expect(isInstalled(folder)).toBe(true);
    utimesSync(join(folder, installed), 50, 50);
    expect(isInstalled(folder)).toBe(false);
  });

  it('builds again when a source changed, came or went, and not when only its date did', () => {
    const base = { 'src/a.ts': '1', 'astro.config.mjs': '', 'tests/a.test.ts': '' };
    const before = fingerprint(folderWith(base));
    expect(fingerprint(folderWith(base))).toBe(before);
    expect(fingerprint(folderWith({ ...base, 'tests/a.test.ts': 'changed' }))).toBe(before);
    expect(fingerprint(folderWith({ ...base, 'src/a.ts': '2' }))).not.toBe(before);
    expect(fingerprint(folderWith({ ...base, 'src/b.ts': '' }))).not.toBe(before);
    expect(fingerprint(folderWith({ ...base, 'astro.config.mjs': 'x' }))).not.toBe(before);
  });
});
