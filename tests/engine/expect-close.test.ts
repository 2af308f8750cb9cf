import { describe, expect, it } from 'vitest';
import { expectClose } from '../setup/expect-close';

describe('expectClose', () => {
  it('takes its third argument as a distance', () => {
    expectClose(1.05, 1, 0.051);
    expect(() => expectClose(1.06, 1, 0.05)).toThrow('more than 0.05');
  });
  it('refuses a value that is not a number', () => {
    expect(() => expectClose(NaN, 1, 10)).toThrow();
  });
});
