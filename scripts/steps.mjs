/** What start, dev, build and test have in common. Node's own modules only: nothing may be installed yet. */
import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import {
  accessSync,
  constants,
  existsSync,
  mkdirSync,
  readFileSync,
  readdirSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { createServer } from 'node:net';
import { dirname, join, relative, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

export const root = resolve(dirname(fileURLToPath(import.meta.url)), '..');

/** Something that the person can put right. Its message is one sentence, shown without a stack. */
export class Halt extends Error {}

/** Runs a command's steps from the root of the checkout; a Halt ends it with its sentence and exit code 1. */
export async function run(steps) {
  process.chdir(root);
  process.env.ASTRO_TELEMETRY_DISABLED ??= '1';
  process.env.ASTRO_DISABLE_UPDATE_CHECK ??= 'true';
  // A .env file beside package.json may hold settings; what is set already wins.
  if (existsSync('.env') && process.loadEnvFile) process.loadEnvFile('.env');
  try {
    await steps();
  } catch (error) {
    const expected = error instanceof Halt || error?.name === 'ConfigError';
    console.error(expected ? error.message : error);
    process.exit(1);
  }
}

export function checkNode(version = process.versions.node) {
  const needed = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')).engines.node.match(/\d+\.\d+/)[0];
  const [major, minor] = needed.split('.').map(Number);
  const [hasMajor, hasMinor] = version.split('.').map(Number);
  if (hasMajor < major || (hasMajor === major && hasMinor < minor)) {
    throw new Halt(
      `Foldwright needs Node ${needed} or newer and this is ${version}: install a newer one from nodejs.org.`,
    );
  }
}

export async function install() {
  if (isInstalled()) return;
  console.log('Installing packages; the first time takes about two minutes.');
  const done = await spawned(...npm('ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'));
  if (done !== 0) throw new Halt('The packages could not be installed: see what npm says above, then try again.');
}

/** npm writes its own copy of the lock file last, so an installation that was broken off has none. */
export function isInstalled(folder = root) {
  const lock = statSync(join(folder, 'package-lock.json'));
  const installed = statSync(join(folder, 'node_modules/.package-lock.json'), { throwIfNoEntry: false });
  return Boolean(installed && installed.mtimeMs >= lock.mtimeMs);
}

/** Builds when the sources are not those that dist/ was built from. */
export async function build({ always = false } = {}) {
  const stamp = join(root, 'dist/.built-from');
  const sources = fingerprint();
  if (!always && existsSync(stamp) && readFileSync(stamp, 'utf8') === sources) return;
  console.log('Building the site; this takes about a minute.');
  rmSync(stamp, { force: true });
  const env = { ...process.env, NODE_ENV: 'production', FOLDWRIGHT_BUILDING: '1' };
  const done = await spawned(process.execPath, ['node_modules/astro/astro.js', 'build', '--silent'], { env });
  if (done !== 0) throw new Halt('The site could not be built: see the message above.');
  writeFileSync(stamp, sources);
}

/** Changes when anything changes that goes into dist/. */
export function fingerprint(folder = root) {
  const hash = createHash('sha256').update(process.versions.node.split('.')[0] ?? '');
  const add = (path) => {
    const found = statSync(path, { throwIfNoEntry: false });
    if (found?.isDirectory()) for (const name of readdirSync(path).sort()) add(join(path, name));
    else if (found) hash.update(`${relative(folder, path)}\n${found.size}\n`).update(readFileSync(path));
  };
  for (const name of ['src', 'content', 'public', 'package-lock.json', 'tsconfig.json']) add(join(folder, name));
  for (const name of readdirSync(folder).sort()) if (/\.config\.(mjs|ts)$/.test(name)) add(join(folder, name));
  return hash.digest('hex');
}

export function checkDataFolder() {
  const folder = resolve(root, process.env.DATA_DIR || '.data');
  try {
    // Addresses and password hashes will lie there.
    mkdirSync(folder, { recursive: true, mode: 0o700 });
    accessSync(folder, constants.W_OK | constants.X_OK);
    const probe = join(folder, `.probe-${process.pid}`);
    writeFileSync(probe, '');
    rmSync(probe);
  } catch (error) {
    throw new Halt(
      `The data folder ${folder} cannot be written to (${error.code}): make it writable, or set DATA_DIR to another.`,
    );
  }
}

/** Told before the two minutes of installing rather than after. */
export async function checkPort() {
  const port = Number(process.env.PORT || 4321);
  if (!Number.isInteger(port) || port < 1 || port > 65535) return; // The settings say it better.
  const probe = createServer();
  await new Promise((done, fail) => {
    probe.once('error', (error) => fail(portTrouble(error, port)));
    probe.listen(port, process.env.HOST || '127.0.0.1', () => probe.close(done));
  });
}

export function portTrouble(error, port) {
  const other = `start with another: PORT=${port < 65535 ? port + 1 : 4322} npm start`;
  if (error.code === 'EADDRINUSE') return new Halt(`Port ${port} is taken: stop what runs there, or ${other}`);
  if (error.code === 'EACCES') return new Halt(`Port ${port} may not be used by this account: ${other}`);
  if (error.code === 'EADDRNOTAVAIL' || error.code === 'ENOTFOUND') {
    return new Halt(
      `HOST is "${process.env.HOST}", which is no address of this machine: leave it out, or give 0.0.0.0 for all.`,
    );
  }
  return error;
}

/** Every child that still runs; ended with this process. */
const children = new Set();
process.on('exit', () => children.forEach((child) => child.kill('SIGTERM')));

/** Starts a program in the checkout with our own output. */
export function begin(command, args, options = {}) {
  const child = spawn(command, args, { cwd: root, stdio: 'inherit', ...options });
  children.add(child);
  const ended = new Promise((done) => {
    child.on('error', () => done(127));
    child.on('exit', (code, signal) => done(code ?? (signal ? 1 : 0)));
  }).finally(() => children.delete(child));
  return { child, ended };
}

export const spawned = (...args) => begin(...args).ended;

/** npm as a command and its arguments, whether we were started by npm or by node. */
export function npm(...args) {
  const script = process.env.npm_execpath;
  if (script && /npm-cli\.js$/.test(script)) return [process.execPath, [script, ...args]];
  return process.platform === 'win32' ? ['npm.cmd', args, { shell: true }] : ['npm', args];
}

/** From here on TypeScript files can be imported, with the paths of tsconfig.json. */
export async function readTypeScript() {
  const { register } = await import('tsx/esm/api');
  register();
}
