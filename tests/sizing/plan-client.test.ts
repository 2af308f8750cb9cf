import { describe, expect, it } from 'vitest';
import { planSheets, type SheetPlan } from '@/engine';
import { isBetter } from '@/features/sizing/plan-client';

const stock = { id: 'own', name: 'own', across: 100, along: 100 };
const plan = (count: number): SheetPlan =>
  planSheets({ pieces: [{ name: 'Strip', across: 100, along: 40, count }] }, { stock });

describe('a better plan', () => {
  it('takes fewer sheets, whatever is left over', () => {
    // Two strips fill most of a sheet; the third starts another and leaves 100 × 60 of it.
    expect(isBetter(plan(2), plan(3))).toBe(true);
    expect(isBetter(plan(3), plan(2))).toBe(false);
  });
  it('leaves a larger offcut on as many sheets: 100 × 60 beside 100 × 20', () => {
    expect(isBetter(plan(1), plan(2))).toBe(true);
    expect(isBetter(plan(2), plan(1))).toBe(false);
  });
  it('is not the same plan again', () => {
    expect(isBetter(plan(2), plan(2))).toBe(false);
  });
});
