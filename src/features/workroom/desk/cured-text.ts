import type { Fault } from '@/engine';

/** The text with the fault's cure put in its place; null when it has none. */
export function curedText(fault: Pick<Fault, 'span' | 'cure'>, value: string): string | null {
  if (fault.cure === undefined || fault.span === undefined) return null;
  return value.slice(0, fault.span.from) + fault.cure + value.slice(fault.span.to);
}
