import { useState } from 'react';
import { Icon } from '@/components/Icon';
import { explain } from '@/engine';
import type { Lit } from '@/features/projects/followers';
import { usesAny } from '@/features/projects/followers';
import { addFit } from '@/features/projects/pattern-edits';
import type { DeskStore, Draft, Work } from './desk-store';
import { gapText } from './figure-text';
import { FitDetails } from './FitDetails';

export interface FitListProps {
  readonly store: DeskStore;
  readonly work: Work;
  readonly draft: Draft;
  readonly lit: Lit | null;
  readonly names: readonly string[];
}

/** Whether the pieces go together at the size shown. Opened, a fit shows what it compares. */
export function FitList({ store, work, draft, lit, names }: FitListProps) {
  const [open, setOpen] = useState<string | null>(null);
  const { fits } = draft.pattern;
  const faults = work.compiled.ok ? [] : work.compiled.faults;
  const figures = new Map(work.live?.figures.fits.map((fit) => [fit.name, fit]));
  const add = () => {
    const added = addFit(draft.pattern);
    store.editPattern(null, () => added.pattern);
    setOpen(added.name);
  };
  return (
    <div className="desk-block">
      <h3>
        Fits {fits.length === 0 ? null : <span>at this size, as cut{work.stale ? '; the last good figures' : ''}</span>}
      </h3>
      {fits.length === 0 ? (
        <p className="small soft">A fit says what must hold between pieces, such as a lid that goes on.</p>
      ) : null}
      <ul className="fits">
        {fits.map((fit) => {
          const own = faults.filter((found) => found.where.startsWith(`fit “${fit.name}”`));
          const [fault] = own;
          const figure = figures.get(fit.name);
          const follows = lit !== null && [fit.left, fit.right].some((formula) => usesAny(formula, names, lit.names));
          const state = fault
            ? 'bad'
            : figure === undefined
              ? 'quiet'
              : figure.holds
                ? 'good'
                : figure.advice
                  ? 'warn'
                  : 'bad';
          const opened = open === fit.name;
          return (
            <li
              key={fit.name}
              className={follows ? 'follows' : undefined}
              data-lit={follows ? '' : undefined}
              data-place={`fit:${fit.name}`}
              tabIndex={-1}
            >
              <span className={`state ${state}`}>
                <Icon
                  name={state === 'good' ? 'check' : state === 'quiet' ? 'minus' : 'warning'}
                  label={state === 'good' ? 'Holds' : state === 'quiet' ? 'Not in use' : 'Does not hold'}
                />
              </span>
              <button
                type="button"
                className="fit-name"
                aria-expanded={opened}
                onClick={() => setOpen(opened ? null : fit.name)}
              >
                {fit.name}
              </button>
              <em>
                {fault ? 'does not read' : figure === undefined ? 'not in use' : gapText(figure.gap, draft.sizing)}
              </em>
              {fault && !opened ? <p className="fault-words">{explain(fault)}</p> : null}
              {figure && !figure.holds && !fault ? (
                <p className={figure.advice ? 'small soft' : 'fault-words'}>{figure.otherwise}</p>
              ) : null}
              {opened ? (
                <FitDetails
                  {...{ store, fit, names, lit, faults: own, pattern: draft.pattern }}
                  onRenamed={setOpen}
                  onGone={() => setOpen(null)}
                />
              ) : null}
            </li>
          );
        })}
      </ul>
      <p className="fit-add">
        <button type="button" className="text-button small" onClick={add}>
          <Icon name="plus" /> Fit
        </button>
      </p>
    </div>
  );
}
