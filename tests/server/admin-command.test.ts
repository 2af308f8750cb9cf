import { execFile } from 'node:child_process';
import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { openDatabase } from '@/db/client.server';

const folder = mkdtempSync(join(tmpdir(), 'foldwright-admin-'));
const admin = (...args: string[]) =>
  new Promise<{ code: number; stdout: string; stderr: string }>((resolve) => {
    const env = { ...process.env, DATA_DIR: folder, NODE_ENV: 'production' };
    execFile(process.execPath, ['--import', 'tsx', 'scripts/admin.ts', ...args], { env }, (error, stdout, stderr) =>
      resolve({ code: Number(error?.code ?? 0), stdout, stderr }),
    );
  });

describe('npm run admin', () => {
  it('makes an admin in an empty data folder and shows the password once', async () => {
    const { code, stdout, stderr } = await admin('create-admin', 'Ada@Boxes.Example', '--name', 'Ada');
    expect([code, stderr]).toEqual([0, '']);
    expect(stdout).toMatch(
      /^Ada@Boxes\.Example is an admin and can sign in at http:\/\/localhost:4321\/sign-in\.\nThe password, shown this once: \S{20}\n$/,
    );
    const people = openDatabase(join(folder, 'foldwright.sqlite'))
      .$client.prepare('SELECT name, email_key, role FROM user')
      .all();
    expect(people).toEqual([{ name: 'Ada', email_key: 'ada@boxes.example', role: 'admin' }]);
  });

  it.each([
    [['create-admin', 'ada@boxes.example'], 'Somebody has an account with ada@boxes.example.\n'],
    [['create-admin', 'nobody'], '"nobody" is not an e-mail address.\n'],
    [['create-admin'], 'How it is called: npm run admin -- create-admin <email> [--name <name>]\n'],
    [
      ['remove-admin', 'ada@boxes.example'],
      'How it is called: npm run admin -- create-admin <email> [--name <name>]\n',
    ],
  ])('refuses %j with one sentence and exit code 2', async (args, sentence) => {
    expect(await admin(...args)).toEqual({ code: 2, stdout: '', stderr: sentence });
  });
});
