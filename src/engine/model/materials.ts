import type { Values } from '../formula';
import { snap } from '../measure';
import { lengthOf } from '../net';
import type { Materials, Net, PieceFigure } from '../types';
import type { Model } from './model';
import { isInUse } from './values';

/** What making the box takes: card and paper by what is cut from them, glue, and what the pattern names. */
export function materialsOf(model: Model, pieces: readonly PieceFigure[], cut: Values): Materials {
  const stocks = [...new Set(pieces.map(({ stock }) => stock))];
  const sum = (list: readonly PieceFigure[], of: (piece: PieceFigure) => number): number =>
    snap(list.reduce((all, piece) => all + piece.count * of(piece), 0));
  return {
    stocks: stocks.map((stock) => ({
      stock,
      area: sum(
        pieces.filter((piece) => piece.stock === stock),
        ({ area }) => area,
      ),
    })),
    seams: sum(pieces, ({ net }) => seamsOf(net)),
    glued: sum(
      pieces.filter(({ layer }) => layer !== undefined),
      ({ area }) => area,
    ),
    extras: model.materials.flatMap(({ def, kind, formula, when }) =>
      isInUse(when ? { when } : {}, cut) ? [{ name: def.name, kind, value: snap(formula.work(cut)) }] : [],
    ),
  };
}

/** Millimetres of the folds on which glued tabs hang; teeth count each for itself. A tab that hangs on another counts once. */
function seamsOf(net: Net): number {
  const tabs = net.panels.filter(({ role }) => role === 'tab');
  const names = new Set(tabs.map(({ name }) => name));
  return tabs.reduce((all, { name }) => {
    const folds = net.folds.filter(({ panels }) => panels.includes(name));
    const hosts = new Map<string, number>();
    for (const { curve, panels } of folds) {
      const host = panels[0] === name ? panels[1] : panels[0];
      hosts.set(host, (hosts.get(host) ?? 0) + lengthOf(curve));
    }
    const onCard = [...hosts].filter(([host]) => !names.has(host));
    return all + Math.max(0, ...(onCard.length > 0 ? onCard : [...hosts]).map(([, length]) => length));
  }, 0);
}
