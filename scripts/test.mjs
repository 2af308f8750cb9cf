/**
 * `npm test`: unit, reference, server and browser tests. Installs what they need, or names the one command.
 * The last line is "N passed, N failed", over everything that ran; a step that could not run counts as one failed.
 */
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { build, checkNode, install, run, spawned } from './steps.mjs';

const CHROMIUMS = [process.env.CHROMIUM, '/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'];
const INSTALL_CHROMIUM = 'apt-get update && apt-get install -y chromium';

await run(async () => {
  checkNode();
  await install();
  const folder = mkdtempSync(join(tmpdir(), 'foldwright-tests-'));
  let results;
  try {
    results = [await unitTests(folder), ...(await browserTests(folder))];
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
  const sum = (key) => results.reduce((total, result) => total + result[key], 0);
  const notes = results.flatMap(({ note }) => note ?? []);
  if (sum('skipped') > 0) notes.push(`${sum('skipped')} skipped`);
  if (notes.length > 0) console.log(`\n${notes.join('\n')}`);
  console.log(`\n${sum('passed')} passed, ${sum('failed')} failed`);
  process.exitCode = sum('failed') > 0 ? 1 : 0;
});

async function unitTests(folder) {
  const file = join(folder, 'unit.json');
  const code = await spawned(process.execPath, [
    'node_modules/vitest/vitest.mjs',
    'run',
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${file}`,
  ]);
  return tally('The unit, reference and server tests', code, file, (report) => ({
    passed: report.numPassedTests,
    failed: report.numFailedTests,
    skipped: report.numPendingTests + report.numTodoTests,
  }));
}

async function browserTests(folder) {
  if (!(await haveChromium())) {
    return [broken(`The browser tests need Chromium. Install it with: sudo sh -c '${INSTALL_CHROMIUM}'`)];
  }
  const built = await build().catch((error) => error);
  if (built instanceof Error) return [broken(built.message)];
  const file = join(folder, 'browser.json');
  const code = await spawned(process.execPath, ['node_modules/@playwright/test/cli.js', 'test'], {
    env: {
      ...process.env,
      BROWSER_TEST_PORT: String(await freePort()),
      BROWSER_TEST_DATA: join(folder, 'data'),
      PLAYWRIGHT_JSON_OUTPUT_FILE: file,
    },
  });
  return [
    tally('The browser tests', code, file, ({ stats }) => ({
      passed: stats.expected + stats.flaky,
      failed: stats.unexpected,
      skipped: stats.skipped,
    })),
  ];
}

function tally(name, code, file, count) {
  if (!existsSync(file)) return broken(`${name} did not run: see above.`);
  const result = count(JSON.parse(readFileSync(file, 'utf8')));
  // A file that cannot be loaded has no tests to count.
  if (code !== 0 && result.failed === 0)
    return { ...result, failed: 1, note: `${name} ended with an error: see above.` };
  if (result.passed === 0 && result.failed === 0) return { ...result, failed: 1, note: `${name}: there were none.` };
  return result;
}

function broken(note) {
  return { passed: 0, failed: 1, skipped: 0, note };
}

async function haveChromium() {
  const installed = () => CHROMIUMS.some((path) => path && existsSync(path));
  if (installed()) return true;
  if (process.getuid?.() !== 0 || !existsSync('/usr/bin/apt-get')) return false;
  console.log('Installing Chromium for the browser tests.');
  await spawned('sh', ['-c', INSTALL_CHROMIUM], { env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' } });
  return installed();
}

function freePort() {
  const probe = createServer();
  return new Promise((done, fail) => {
    probe.once('error', fail);
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address();
      probe.close(() => done(port));
    });
  });
}
