import { Icon } from '@/components/Icon';
import { explain } from '@/engine';
import type { Lit } from '@/features/projects/followers';
import { usesAny } from '@/features/projects/followers';
import type { Draft, Work } from './desk-store';
import { gapText } from './figure-text';

export interface FitListProps {
  readonly work: Work;
  readonly draft: Draft;
  readonly lit: Lit | null;
  readonly names: readonly string[];
}

/** Whether the pieces go together at the size shown. */
export function FitList({ work, draft, lit, names }: FitListProps) {
  const { fits } = draft.pattern;
  if (fits.length === 0) return null;
  const faults = work.compiled.ok ? [] : work.compiled.faults;
  const figures = new Map(work.live?.figures.fits.map((fit) => [fit.name, fit]));
  return (
    <div className="desk-block">
      <h3>
        Fits <span>at this size, as cut{work.stale ? '; the last good figures' : ''}</span>
      </h3>
      <ul className="fits">
        {fits.map((fit) => {
          const fault = faults.find((found) => found.where.startsWith(`fit “${fit.name}”`));
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
              <span>{fit.name}</span>
              <em>
                {fault ? 'does not read' : figure === undefined ? 'not in use' : gapText(figure.gap, draft.sizing)}
              </em>
              {fault ? <p className="fault-words">{explain(fault)}</p> : null}
              {figure && !figure.holds && !fault ? (
                <p className={figure.advice ? 'small soft' : 'fault-words'}>{figure.otherwise}</p>
              ) : null}
            </li>
          );
        })}
      </ul>
    </div>
  );
}
