import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { boundsOfRead, readDxf, readSvg } from '../exports/read-cutting';

const root = join(import.meta.dirname, '../..');
function sheet(...args: string[]) {
  const { status, stdout, stderr } = spawnSync(process.execPath, ['--import', 'tsx', 'scripts/sheet.ts', ...args], {
    cwd: root,
    encoding: 'utf8',
  });
  return { status, stdout, stderr };
}

describe('npm run sheet', { timeout: 60_000 }, () => {
  it('prints strips of 53.975 mm and their tabs for a 2 in depth on a 4 in circle', () => {
    const { status, stdout } = sheet(
      'book-box',
      '--set',
      'inside depth=2 in',
      '--set',
      'circle=4 in',
      '--grid',
      '1/16in',
      '--format',
      'json',
    );
    expect(status).toBe(0);
    const json = JSON.parse(stdout);
    expect(json.measures.find((one: { name: string }) => one.name === 'arc')).toEqual({
      name: 'arc',
      kind: 'length',
      exact: 53.197636,
      cut: 53.975,
      shown: '2 1/8 in',
    });
    const spine = json.pieces.find((one: { name: string }) => one.name === 'Lower spine');
    expect(spine).toMatchObject({ across: 79.375, scores: { across: [12.7, 66.675] } });
    expect(Object.keys(json)).toEqual([
      'pattern',
      'sizing',
      'measures',
      'pieces',
      'fits',
      'sheets',
      'materials',
      'departure',
      'problems',
    ]);
    expect(json.sheets).toMatchObject({ stock: '12x12in', count: 1, used: 3 });
  });
  it.each([
    [
      ['book-box', '--set', 'inside dept=2 in'],
      'Book box does not ask for “inside dept”. The nearest is “inside depth”.\n',
    ],
    [
      ['book-box', '--set', 'inside depth=2 feet'],
      'inside depth: “feet” after the number. Write the unit as in, mm or cm.\n',
    ],
    [
      ['book-box', '--set', 'inside depth'],
      "--set “inside depth” has no “=”. Write it like --set 'inside width=5 3/8 in'.\n",
    ],
    [['book-bx'], 'No pattern is called “book-bx”. The nearest is “book-box”.\n'],
    [['book-box', '--choose', 'spine=bent'], 'spine cannot be “bent”. It can be curved or straight.\n'],
    [
      ['book-box', '--grid', '1/7in'],
      'The cut grid “1/7in” is not known. It can be 1/8in, 1/16in, 1/32in, 1mm, 0.5mm.\n',
    ],
    [['tray', '--copies', 'many'], '--copies “many” is not a whole number from 1 to 500.\n'],
    [['tray', '--colour', 'red'], "Unknown option '--colour'\n"],
    [['tray', '--format', 'png'], 'The format “png” is not known. It can be text, json, pdf, svg, dxf.\n'],
    [['tray', '--glue'], '--glue goes with --format svg or --format dxf.\n'],
  ])('exits 2 with one clear line for %j', (args, line) => {
    expect(sheet(...args)).toEqual({ status: 2, stdout: '', stderr: line });
  });
  it('exits 1 and prints the sheet all the same when a size is out of range', () => {
    const { status, stdout } = sheet('tray', '--set', 'inside height=20 in');
    expect(status).toBe(1);
    expect(stdout).toContain(
      'PROBLEM Inside height is 20 in; here it can be at most 6 in. Nearest that works: inside height 6 in.',
    );
  });
  it('lists the patterns', () => {
    const { status, stdout } = sheet('--list', '--format', 'json');
    expect(status).toBe(0);
    expect(JSON.parse(stdout).map((one: { slug: string }) => one.slug)).toEqual(
      expect.arrayContaining(['book-box', 'lidded-box', 'sleeve-drawer', 'tray']),
    );
  });
  it('prints every piece, fit and cut as text, in millimetres too', () => {
    const { status, stdout } = sheet('lidded-box', '--units', 'mm', '--copies', '2');
    expect(status).toBe(0);
    expect(stdout).toMatch(/1 Base, cut 2: 254 × 178 mm/);
    expect(stdout).toMatch(/holds {2}lid goes on/);
    expect(stdout).toMatch(/Sheet 1\n {4}1\. Trim at \d+ mm/);
  });
  it('draws every piece side by side for a cutting machine, in millimetres', () => {
    // A tray of 8 × 5 in, 1 in tall: 10 × 7 in flat, 254 × 177.8 mm; two of them 10 mm apart are 518 mm.
    const size = ['--set', 'inside length=8 in', '--set', 'inside width=5 in', '--set', 'inside height=1 in'];
    const svg = sheet('tray', ...size, '--copies', '2', '--format', 'svg');
    expect([svg.status, svg.stderr]).toEqual([0, '']);
    const { root } = readSvg(svg.stdout);
    expect(root.attributes).toMatchObject({ width: '518mm', height: '177.8mm', viewBox: '0 0 518 177.8' });
    expect(root.text('title')).toBe('Tray: all pieces');
    const out = join(mkdtempSync(join(tmpdir(), 'sheet-')), 'tray.dxf');
    expect(sheet('tray', ...size, '--copies', '2', '--format', 'dxf', '--glue', '--out', out)).toEqual({
      status: 0,
      stdout: '',
      stderr: '',
    });
    const { lines } = readDxf(readFileSync(out, 'utf8'));
    expect(boundsOfRead(lines)).toEqual({ left: 0, right: 518, low: 0, high: 177.8 });
    expect(new Set(lines.map(({ work }) => work))).toEqual(new Set(['cut', 'valley', 'draw']));
  });
  it('says what it takes', () => {
    const { status, stdout } = sheet('--help');
    expect(status).toBe(0);
    for (const option of [
      'set',
      'choose',
      'units',
      'grid',
      'stock',
      'copies',
      'format',
      'glue',
      'paper',
      'templates',
      'out',
      'list',
    ])
      expect(stdout).toContain(`--${option} `);
  });
});
