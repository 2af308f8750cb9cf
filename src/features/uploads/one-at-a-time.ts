/**
 * Jobs that take turns: each begins when the one before it has ended, well or badly. Gives null, without running the
 * job, when `waiting` jobs already wait.
 */
export function oneAtATime({ waiting }: { waiting: number }): <T>(job: () => Promise<T>) => Promise<T | null> {
  let last: Promise<unknown> = Promise.resolve();
  let inLine = 0;
  return async (job) => {
    if (inLine > waiting) return null;
    inLine += 1;
    const turn = last.then(job, job);
    last = turn.catch(() => undefined);
    try {
      return await turn;
    } finally {
      inLine -= 1;
    }
  };
}
