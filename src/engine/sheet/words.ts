import type { Sentence } from '../types';
import type { Cut, SheetPlan } from './plan';

/** The cuts of one sheet in words, in order; each measured from the edge of what is in the hand. */
export function cutsInWords(plan: SheetPlan, sheet: number): readonly Sentence[] {
  return (plan.sheets[sheet]?.cuts ?? []).map((cut, index, all) => {
    const before = all[index - 1];
    const turn = before !== undefined && before.runs !== cut.runs ? 'turn, then trim at ' : 'trim at ';
    return [`${cut.n}. ${turn.charAt(0).toUpperCase()}${turn.slice(1)}`, { mm: cut.measure }, `${frees(cut)}.`];
  });
}
function frees({ frees: free }: Cut): string {
  if (free.includes('the edge')) return ' to take the edge off';
  const pieces = free.filter((name) => !name.startsWith('offcut'));
  const left = free.filter((name) => name.startsWith('offcut'));
  const parts = [
    pieces.length > 0 ? `that is the ${pieces.join(' and the ')}` : '',
    left.length > 0 ? `left over: ${left.join(' and ')}` : '',
  ].filter((text) => text !== '');
  return parts.length === 0 ? '' : `: ${parts.join('; ')}`;
}
