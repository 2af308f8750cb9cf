import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import { ESLint } from 'eslint';
import { beforeAll, describe, expect, it } from 'vitest';

/** Small files that each break one arrow; both tools must see them, or their silence about src/ means nothing. */
const BREACHES = 'tests/architecture/breaches/src';

describe('the import-direction rule of ESLint', () => {
  let messages: Record<string, string[]>;
  beforeAll(async () => {
    const results = await new ESLint({ ignore: false }).lintFiles([BREACHES]);
    messages = Object.fromEntries(
      results.map(({ filePath, messages }) => [
        filePath.split(`${BREACHES}/`)[1],
        messages.map(({ ruleId, message }) => `${ruleId}: ${message}`),
      ]),
    );
  }, 120_000);
  const restricted = (text: string) => expect.stringMatching(`no-restricted-imports: .*${text}`);

  it('refuses an engine file that imports Node or a feature, or reads the clock', () => {
    expect(messages['engine/measure/length.ts']).toEqual(
      expect.arrayContaining([
        restricted('The engine imports nothing from outside its folder'),
        restricted('src/engine must not know what stands above it'),
        expect.stringMatching("no-restricted-globals: Unexpected use of 'Date'"),
      ]),
    );
  });

  it('refuses an import of the engine’s insides', () => {
    expect(messages['features/sizing/deep.ts']).toEqual([restricted('one door')]);
  });

  it('refuses a write-up file that imports a feature', () => {
    expect(messages['writeup/render.ts']).toEqual([restricted('src/writeup must not know')]);
  });

  it('refuses a shared component that imports a server file', () => {
    expect(messages['components/Badge.tsx']).toEqual(
      expect.arrayContaining([restricted('must not touch the server'), restricted('src/components must not know')]),
    );
  });

  it('refuses a server file in a page’s script but not in its front matter', () => {
    expect(messages['pages/list.astro']).toEqual([restricted('must not touch the server')]);
  });
});

describe('the dependency check', () => {
  let violations: string[];
  beforeAll(async () => {
    const args = ['--config', '.dependency-cruiser.cjs', '--output-type', 'json', BREACHES];
    const run = promisify(execFile)('node_modules/.bin/depcruise', args, { maxBuffer: 1e8 });
    // It exits with the number of errors: the report is on stdout all the same.
    const stdout = await run.then(
      (done) => done.stdout,
      (failed: { stdout: string }) => failed.stdout,
    );
    const report = JSON.parse(stdout) as {
      summary: { violations: { from: string; to: string; rule: { name: string } }[] };
    };
    violations = report.summary.violations.map(({ from, to, rule }) =>
      `${rule.name}: ${from} → ${to}`.replaceAll(`${BREACHES}/`, ''),
    );
  }, 120_000);

  it.each([
    'engine-is-pure: engine/measure/length.ts → features/sizing/title.ts',
    'engine-order-measure: engine/measure/length.ts → engine/formula/order.ts',
    'nothing-above-lower: writeup/render.ts → features/sizing/title.ts',
    'no-cycles: features/sizing/first.ts → features/sizing/second.ts',
    'island-reaches-server: features/accounts/Roster.tsx → features/accounts/people.server.ts',
  ])('reports %s', (breach) => {
    expect(violations).toContain(breach);
  });
});
