import { describe, expect, it } from 'vitest';
import { later } from '@/features/sizing/later';

/** Lets what waits for a promise run. */
const settle = () => new Promise((resolve) => setTimeout(resolve));

describe('a part that comes later', () => {
  it('does the last that was asked of it once it is there, and everything at once after that', async () => {
    const done: string[] = [];
    let come: (part: string) => void = () => undefined;
    const use = later(new Promise<string>((resolve) => (come = resolve)), () => done.push('lost'));
    use((part) => done.push(`first with ${part}`));
    use((part) => done.push(`second with ${part}`));
    expect(done).toEqual([]);
    come('it');
    await settle();
    expect(done).toEqual(['second with it']);
    use((part) => done.push(`third with ${part}`));
    expect(done).toEqual(['second with it', 'third with it']);
  });
  it('says that it is lost only when something is asked of it', async () => {
    const done: string[] = [];
    const asked = later(Promise.reject(new Error('offline')), () => done.push('asked'));
    later(Promise.reject(new Error('offline')), () => done.push('not asked'));
    asked(() => done.push('used'));
    await settle();
    expect(done).toEqual(['asked']);
    asked(() => done.push('used'));
    expect(done).toEqual(['asked', 'asked']);
  });
});
