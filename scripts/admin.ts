/** `npm run admin -- create-admin <email> [--name <name>]`: the first admin of a real installation. */
import { randomBytes } from 'node:crypto';
import { createInterface } from 'node:readline/promises';
import { Writable } from 'node:stream';
import { parseArgs } from 'node:util';
import { config } from '@/config.server';
import { closeDatabase } from '@/db/client.server';
import { migrateDatabase } from '@/db/migrate.server';
import { createPerson } from '@/features/accounts/people.server';
import { passwordFault } from '@/features/accounts/password-rule';

const USAGE = 'How it is called: npm run admin -- create-admin <email> [--name <name>]';

async function main(): Promise<number> {
  const { positionals, values } = parseArgs({ allowPositionals: true, options: { name: { type: 'string' } } });
  const [command, email, ...more] = positionals;
  if (command !== 'create-admin' || !email || more.length > 0) return refuse(USAGE);

  migrateDatabase();
  const typed = process.stdin.isTTY ? await askHidden('Password (leave it empty and one is made): ') : '';
  const fault = typed ? passwordFault(typed, { email, name: values.name }) : null;
  if (fault) return refuse(fault);
  const password = typed || randomBytes(15).toString('base64url');
  const made = await createPerson({ email, name: values.name ?? null, role: 'admin', password });
  if (!made.ok) return refuse(made.sentence);
  console.log(`${made.person.email} is an admin and can sign in at ${config.siteUrl}/sign-in.`);
  if (!typed) console.log(`The password, shown this once: ${password}`);
  return 0;
}

function refuse(sentence: string): number {
  console.error(sentence);
  return 2;
}

/** Asks without showing what is typed. */
async function askHidden(question: string): Promise<string> {
  process.stdout.write(question);
  const nowhere = new Writable({ write: (_chunk, _encoding, done) => done() });
  const reader = createInterface({ input: process.stdin, output: nowhere, terminal: true });
  try {
    return await reader.question('');
  } finally {
    reader.close();
    process.stdout.write('\n');
  }
}

try {
  process.exitCode = await main();
} catch (error) {
  process.exitCode = refuse(error instanceof Error ? error.message : String(error));
} finally {
  closeDatabase();
}
