import type { Result } from '../types';
import { checkFormula } from './check';
import type { Kind } from './kind';
import { parseFormula } from './parse';
import type { Formula, Scope } from './syntax';
import { workOf } from './work';

/** Text to a checked, compiled function; `wanted` is the kind that it must work out. */
export function compileFormula(text: string, scope: Scope, where: string, wanted?: Kind): Result<Formula> {
  const parsed = parseFormula(text, scope, where);
  if (!parsed.ok) return parsed;
  const node = parsed.value;
  const { kind, uses, faults } = checkFormula(node, scope, where, wanted);
  return faults.length > 0
    ? { ok: false, faults }
    : { ok: true, value: { node, kind, work: workOf(node, scope), uses } };
}
