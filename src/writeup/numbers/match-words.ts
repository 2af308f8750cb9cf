import { show, showValue } from '@/engine';
import { readLive, type LiveFigures } from '../live';
import type { FoundNumber } from './find-numbers';
import type { Match } from './match-numbers';

/** What the finder understood: "6 1/4 in, or 1.4 in". */
export const understood = ({ readings }: Pick<FoundNumber, 'readings'>): string =>
  readings.map(({ says }) => says).join(', or ');

/** A match in two parts: what it is, and how its figure lies to what was said. */
export function matchWords({ formula, says, cut, exact, off }: Match, { model, figures }: LiveFigures) {
  const { units, grid } = figures.sizing;
  const read = readLive(model, formula);
  const unit = read.ok ? read.value.unit : undefined;
  const cutAs = show(cut, { units, grid, unit }).typeset;
  const far = Math.abs(cut - exact) < 1e-6 ? '' : `, ${showValue(exact, 'length', { units, unit }).typeset} exact`;
  const same = off === 0 ? 'the same' : `off by ${show(off, { units: units === 'in' ? 'in' : 'mm' }).typeset}`;
  return { name: formula, place: says === formula ? '' : says, figure: `${cutAs} as cut${far}`, lies: same };
}
