import type { Fault, KindName, Result, Unit } from '../types';
import { readLength } from './read';

/** Reads what a person types for a measure, by its kind: a length with or without unit, degrees, a number. */
export function readValue(
  measure: { readonly kind: KindName; readonly unit?: Unit },
  text: string,
  options: { readonly units: Unit },
): Result<number> {
  if (measure.kind === 'length') {
    const read = readLength(text, { units: measure.unit ?? options.units });
    return read.ok ? { ok: true, value: read.value.mm } : read;
  }
  const match = /^([-−+]?\d+(?:[.,]\d+)?|[-−+]?[.,]\d+)\s*(°|degrees?)?$/.exec(text.trim());
  const value = match?.[1] === undefined ? NaN : Number(match[1].replace(',', '.').replace('−', '-'));
  const refuse = (expected: string, hint: string): Result<number> => {
    const fault: Fault = {
      code: 'value unreadable',
      where: 'value',
      found: text.trim() === '' ? 'nothing' : `“${text.trim()}”`,
      expected,
      hint,
    };
    return { ok: false, faults: [fault] };
  };
  if (!Number.isFinite(value))
    return measure.kind === 'angle'
      ? refuse('an angle', 'Write it like 45°.')
      : refuse('a number', 'Write it in figures.');
  if (match?.[2] !== undefined && measure.kind !== 'angle') return refuse('a number', 'Leave the degree sign away.');
  if (measure.kind === 'whole number' && !Number.isInteger(value))
    return refuse('a whole number', 'Write it without a fraction.');
  return { ok: true, value };
}
