/** The running site: database, mail and pages in one process. Started by start.mjs; needs dist/ and TypeScript. */
import type { RequestListener } from 'node:http';
import { pathToFileURL } from 'node:url';
import { join } from 'node:path';
import { config } from '@/config.server';
import { closeDatabase, sqlite } from '@/db/client.server';
import { migrateDatabase } from '@/db/migrate.server';
import { DEMO_PEOPLE } from '@/features/demo/people';
import { startScheduler } from '@/features/editions/schedule.server';
import { frontDoor } from '@/features/http/front-door.server';
import { serve } from '@/features/http/serve.server';
import { startLocalMailServer } from '@/features/mailing/local-mail-server.server';
import { startMailWorker } from '@/features/mailing/worker.server';
import { Halt, portTrouble, spawned } from './steps.mjs';

interface Stoppable {
  stop(): Promise<void>;
}

/** The database brought up to date and filled, the mail and planned editions going out: all but the pages. */
export async function startServices(): Promise<Stoppable> {
  const { applied, backup } = migrateDatabase();
  if (backup) console.log(`Brought the data up to date in ${applied} steps; the copy made before: ${backup}`);
  if (config.demo && isEmpty()) {
    console.log('Filling the empty database with the demo.');
    const done = await spawned(process.execPath, ['--import', 'tsx', 'scripts/seed-demo.ts'], {
      stdio: ['inherit', 'inherit', 'inherit', 'ipc'],
    });
    if (done !== 0) throw new Halt('The demo could not be made: see the message above.');
  }

  const mailServer = config.smtpUrl
    ? { url: config.smtpUrl, stop: async () => {} }
    : await startLocalMailServer({ port: config.localMailPort, dir: join(config.dataDir, 'mail') });
  const worker = startMailWorker({ smtpUrl: mailServer.url });
  const scheduler = startScheduler();

  return {
    async stop() {
      scheduler.stop();
      await worker.stop();
      await mailServer.stop();
      closeDatabase();
    },
  };
}

export async function startSite(): Promise<void> {
  // The built entry would listen by itself; it reads this while it is imported.
  process.env.ASTRO_NODE_AUTOSTART = 'disabled';
  const entry = pathToFileURL(join(config.root, 'dist/server/entry.mjs')).href;
  const services = await startServices();
  const { handler } = (await import(entry)) as { handler: RequestListener };
  const site = await serve(frontDoor(handler, config), config).catch((error: unknown) => {
    throw portTrouble(error, config.port);
  });
  stopOnSignal(async () => {
    await site.stop();
    await services.stop();
  });
  greet();
}

/** Stops once, at Ctrl-C or when asked by the system; a second Ctrl-C does not wait. */
export function stopOnSignal(stop: () => Promise<void>): () => void {
  let stopping = false;
  const onSignal = () => {
    if (stopping) process.exit(1);
    stopping = true;
    stop().then(
      () => process.exit(0),
      (error: unknown) => {
        console.error(error);
        process.exit(1);
      },
    );
  };
  process.on('SIGINT', onSignal);
  process.on('SIGTERM', onSignal);
  return onSignal;
}

const isEmpty = () => !sqlite().prepare('SELECT 1 FROM user UNION SELECT 1 FROM project').get();
const isDemo = () => Boolean(sqlite().prepare("SELECT 1 FROM setting WHERE key = 'demo'").get());

/** Where everything is, and how to sign in to the demo. */
export function greet(): void {
  const lines = [`Foldwright is at ${config.siteUrl}`];
  if (!config.smtpUrl) lines.push(`Mail goes nowhere but to ${config.siteUrl}/dev/mailbox`);
  if (isDemo()) {
    lines.push('', 'Demo sign-ins:');
    for (const { role, email, password } of DEMO_PEOPLE)
      lines.push(`  ${role.padEnd(7)} ${email.padEnd(28)} ${password}`);
  }
  lines.push('', 'Ctrl-C stops it.');
  console.log(lines.join('\n'));
}
