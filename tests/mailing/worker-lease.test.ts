import { spawnSync } from 'node:child_process';
import { hostname } from 'node:os';
import { beforeEach, describe, expect, it } from 'vitest';
import { holdLease, leaveLease, newOwner, workerSeenAt } from '@/features/mailing/worker-lease.server';
import { testDatabase } from '../setup/test-database';

const NOW = 1_000_000;
/** The number of a process that has ended. */
const gone = () => spawnSync(process.execPath, ['-e', '0']).pid;

beforeEach(() => void testDatabase());

describe('the worker’s lease', () => {
  it('is held by one, renewed by it, and free for others after 30 seconds', () => {
    expect(holdLease('one', NOW)).toBe(true);
    expect(holdLease('two', NOW + 1_000)).toBe(false);
    expect(holdLease('one', NOW + 20_000)).toBe(true);
    expect(holdLease('two', NOW + 50_000)).toBe(false);
    expect(holdLease('two', NOW + 50_001)).toBe(true);
    expect(holdLease('one', NOW + 50_002)).toBe(false);
  });

  it('of a process of this machine that is gone is free at once', () => {
    holdLease(`${hostname()}/${gone()}/x`, NOW);
    expect(holdLease(newOwner(), NOW + 1)).toBe(true);
  });

  it('of a process that may still live is not', () => {
    for (const owner of [`${hostname()}/${process.ppid}/x`, `elsewhere/${gone()}/x`, newOwner()]) {
      holdLease(owner, NOW);
      expect(holdLease('another', NOW + 1), owner).toBe(false);
      leaveLease(owner);
    }
  });

  it('of a process that had our own number before us is free at once', () => {
    holdLease(`${hostname()}/${process.pid}/before`, NOW);
    expect(holdLease(newOwner(), NOW + 1)).toBe(true);
  });

  it('tells when a worker was last at work', () => {
    expect(workerSeenAt()).toBeNull();
    holdLease('one', NOW);
    expect(workerSeenAt()).toBe(NOW);
    leaveLease('one');
    expect(workerSeenAt()).toBeNull();
  });
});
