import { loadavg } from 'node:os';
import { performance } from 'node:perf_hooks';
import { packer } from 'guillotine-packer';
import type * as MaxRects from 'maxrects-packer/dist/index';
import { planSheets } from '@/engine';
import { print } from './measure';
import { apart, cutFree, type Placed } from './sheet-check';
import { sheetInstances, type Instance } from './sheet-instances';

// The package's own entry is a bundle that Node cannot read names from.
const { MaxRectsPacker, Rectangle } = (await import(
  'maxrects-packer/dist/maxrects-packer.mjs' as string
)) as typeof MaxRects;

/** A plan of one instance: the parts of each sheet. */
type Sheets = readonly (readonly Placed[])[];
interface Contestant {
  readonly name: string;
  readonly guillotine: boolean;
  readonly plan: (instance: Instance) => Sheets;
}

/**
 * `npm run bench -- sheets [50ms] [500ms] [4000tries] [fixed]`: sheets needed in all, beside two packers in the same run. A budget
 * in ms is of the processor's time for an instance, which a busy machine leaves nearly alone; one in tries comes out the same
 * everywhere. `fixed`: no piece is turned, as when the grain decides. Every plan is cut up again by a check of its own.
 */
export async function sheetsBench(): Promise<void> {
  const asked = process.argv.slice(3);
  const turned = !asked.includes('fixed');
  const budgets = asked.filter((word) => /^\d+(ms|tries)$/.test(word));
  const { from, all } = sheetInstances();
  const best = all.every((one) => one.best) ? all.reduce((sum, one) => sum + bestKnown(one, turned), 0) : null;
  print({ bench: 'sheets: instances', from, count: all.length, turned, best_known: best });

  const guillotine = run(guillotinePacker(turned), all);
  const rows = [guillotine, run(maxRects(turned), all)];
  for (const budget of budgets.length > 0 ? budgets : ['50ms']) rows.push(run(ours(budget, turned), all));
  for (const row of rows) {
    const ties = all.map((_, index) => index).filter((index) => row.counts[index] === guillotine.counts[index]);
    const mean = ties.reduce((sum, index) => sum + (row.offcuts[index] ?? 0), 0) / Math.max(1, ties.length);
    print({
      bench: `sheets: ${row.name}`,
      sheets: row.counts.reduce((sum, count) => sum + count, 0),
      guillotine: row.guillotine,
      ...(row.guillotine
        ? { instances_tied_with_guillotine_packer: ties.length, mean_offcut_there: Number(mean.toFixed(4)) }
        : {}),
      median_ms: Number(row.median.toPrecision(3)),
      checked: row.checked,
      load: Number((loadavg()[0] ?? 0).toFixed(1)),
    });
    if (row.faults.length > 0) {
      print({ bench: 'sheets: plans that do not hold', of: row.name, faults: row.faults.slice(0, 5) });
      process.exitCode = 1;
    }
  }
}

const bestKnown = ({ best }: Instance, turned: boolean): number => (turned ? best?.turned : best?.drawn) ?? 0;

function run({ name, guillotine, plan }: Contestant, all: readonly Instance[]) {
  const faults: string[] = [];
  const times: number[] = [];
  const counts: number[] = [];
  const offcuts: number[] = [];
  for (const instance of all) {
    const start = performance.now();
    const sheets = plan(instance);
    times.push(performance.now() - start);
    counts.push(sheets.length);
    const sheet = { x: 0, y: 0, ...instance.sheet };
    const used = (parts: readonly Placed[]) => parts.reduce((sum, { across, along }) => sum + across * along, 0);
    if (!holdsAll(sheets, instance)) faults.push(`${instance.name}: other pieces than were asked for`);
    if (!sheets.every((parts) => apart(parts, sheet))) faults.push(`${instance.name}: parts over one another`);
    if (!guillotine) continue;
    if (sheets.some((parts) => cutFree(parts, sheet) === null)) faults.push(`${instance.name}: cannot be cut`);
    const emptiest = [...sheets].sort((a, b) => used(a) - used(b))[0] ?? [];
    offcuts.push((cutFree(emptiest, sheet) ?? 0) / (sheet.across * sheet.along));
  }
  const median = times.sort((a, b) => a - b)[Math.floor(times.length / 2)] ?? 0;
  return { name, guillotine, counts, offcuts, median, checked: all.length - faults.length, faults };
}

/** Every piece once for each time that it was asked for, turned or not. */
function holdsAll(sheets: Sheets, { pieces }: Instance): boolean {
  const size = ({ across, along }: { across: number; along: number }) =>
    `${Math.min(across, along)} × ${Math.max(across, along)}`;
  const asked = pieces.flatMap((piece) => Array.from({ length: piece.count }, () => size(piece))).sort();
  return asked.join() === sheets.flat().map(size).sort().join();
}

function ours(budget: string, turned: boolean): Contestant {
  const amount = Number.parseInt(budget, 10);
  return {
    name: `ours, ${amount} ${budget.endsWith('ms') ? 'ms' : 'tries'} an instance`,
    guillotine: true,
    plan: ({ sheet, pieces }) => {
      const start = process.cpuUsage();
      const spent = (tries: number): number => {
        if (!budget.endsWith('ms')) return tries / amount;
        const { user, system } = process.cpuUsage(start);
        return (user + system) / 1000 / amount;
      };
      const stock = { id: 'bench', name: 'bench', ...sheet };
      const figures = pieces.map((piece, index) => ({
        name: `${index}`,
        ...piece,
        ...(turned ? {} : { foldsRun: 'along' as const }),
      }));
      const plan = planSheets({ pieces: figures }, { stock, spent, folds: turned ? 'either' : 'along the grain' });
      return plan.sheets.map(({ parts }) => parts);
    },
  };
}
const guillotinePacker = (turned: boolean): Contestant => ({
  name: 'guillotine-packer 1.0.2, all its strategies',
  guillotine: true,
  plan: ({ sheet, pieces }) => {
    const items = pieces.flatMap(({ across, along, count }) =>
      Array.from({ length: count }, () => ({ name: '', width: across, height: along })),
    );
    const bins = packer({ binWidth: sheet.across, binHeight: sheet.along, items }, { allowRotation: turned });
    return (bins ?? []).map((bin) => bin.map(({ x, y, width, height }) => ({ x, y, across: width, along: height })));
  },
});

/** Its two general logics; the better of the two counts. */
const maxRects = (turned: boolean): Contestant => ({
  name: 'maxrects-packer 2.7.4, the better of area and edge (not cut edge to edge)',
  guillotine: false,
  plan: ({ sheet, pieces }) => {
    const plans = [0, 1].map((logic) => {
      const packing = new MaxRectsPacker(sheet.across, sheet.along, 0, {
        smart: false,
        pot: false,
        square: false,
        allowRotation: turned,
        logic,
      });
      packing.addArray(
        pieces.flatMap(({ across, along, count }) => Array.from({ length: count }, () => new Rectangle(across, along))),
      );
      return packing.bins.map(({ rects }) =>
        rects.map(({ x, y, width, height }) => ({ x, y, across: width, along: height })),
      );
    });
    return plans.reduce((a, b) => (b.length < a.length ? b : a));
  },
});
