/** Undo and redo over whole states. Edits of one field in a row are one step back. */
export interface History<T> {
  readonly past: readonly T[];
  readonly present: T;
  readonly future: readonly T[];
  /** The field that the last edit was made in; null ends the run. */
  readonly field: string | null;
}
const LIMIT = 200;

export const begin = <T>(present: T): History<T> => ({ past: [], present, future: [], field: null });

/** `field` names what is being typed in: a second edit of the same field in a row replaces the first. */
export function edit<T>(history: History<T>, next: T, field: string | null = null): History<T> {
  if (next === history.present) return history;
  const past =
    field !== null && field === history.field ? history.past : [...history.past, history.present].slice(-LIMIT);
  return { past, present: next, future: [], field };
}

/** Ends a run of edits in one field: the next edit is a step of its own. */
export const settle = <T>(history: History<T>): History<T> =>
  history.field === null ? history : { ...history, field: null };

/** Puts `next` in place of the present, with every state before and after it carried over by `onto`: no step of its own. */
export const rebase = <T>(history: History<T>, next: T, onto: (state: T) => T): History<T> => ({
  past: history.past.map(onto),
  present: next,
  future: history.future.map(onto),
  field: null,
});

export function undo<T>(history: History<T>): History<T> {
  const previous = history.past.at(-1);
  if (previous === undefined) return history;
  return {
    past: history.past.slice(0, -1),
    present: previous,
    future: [history.present, ...history.future],
    field: null,
  };
}

export function redo<T>(history: History<T>): History<T> {
  const [next, ...rest] = history.future;
  if (next === undefined) return history;
  return { past: [...history.past, history.present], present: next, future: rest, field: null };
}
