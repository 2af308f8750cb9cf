import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { DEMO_PEOPLE } from '@/features/demo/people';

const read = (file: string) => readFileSync(file, 'utf8');
const { scripts } = JSON.parse(read('package.json')) as { scripts: Record<string, string> };

describe('README.md', () => {
  it.each(DEMO_PEOPLE)('gives the demo sign-in of the $role', ({ role, email, password }) => {
    const rows = read('README.md').split('\n');
    expect(rows.map((row) => row.split(/ *\| */).slice(1, -1))).toContainEqual([role, email, password]);
  });

  it('explains every setting that is read from the environment', () => {
    const settings = new Set([...read('src/config.server.ts').matchAll(/\benv\.([A-Z_]+)/g)].map(([, name]) => name));
    expect(settings.size).toBeGreaterThan(8);
    for (const name of settings) expect(read('README.md')).toContain(`\`${name}\``);
  });

  it.each(['dev', 'build', 'start', 'test', 'lint', 'typecheck', 'format', 'bench', 'sheet', 'admin'])(
    'names `npm run %s`, which exists',
    (name) => {
      expect(scripts).toHaveProperty(name);
      expect(read('README.md')).toMatch(new RegExp(`npm (run )?${name}\\b`));
    },
  );
});

describe('the index of decisions', () => {
  const files = readdirSync('docs/decisions').filter((name) => name !== 'README.md');

  it('has every decision by its own heading, in the order of their numbers', () => {
    const links = [...read('docs/decisions/README.md').matchAll(/^- \[(.+)\]\((.+\.md)\)$/gm)].map(
      ([, title, file]) => [file, title],
    );
    expect(links).toEqual(
      files.sort().map((file) => [file, read(`docs/decisions/${file}`).split('\n')[0]?.replace(/^# /, '')]),
    );
  });

  it('gives no number twice', () => {
    const numbers = files.map((file) => file.slice(0, 3));
    expect(numbers).toEqual([...new Set(numbers)]);
  });
});
