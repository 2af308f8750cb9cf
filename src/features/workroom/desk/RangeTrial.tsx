import { Icon } from '@/components/Icon';
import { GRIDS, roundTo, showValue, type MeasureFigure, type Sizing } from '@/engine';
import { changeAsk } from '@/features/projects/pattern-edits';
import { narrowerRanges } from '@/features/projects/range-trial';
import type { DeskStore, Draft, Work } from './desk-store';
import { useTrial, type Trial } from './use-trial';

export interface RangeTrialProps {
  readonly store: DeskStore;
  readonly draft: Draft;
  readonly work: Work;
}

/** Whether the box can be made at every size that readers may ask for, and the sizes at which it cannot. */
export function RangeTrial({ store, draft, work }: RangeTrialProps) {
  const { trial, start, stop } = useTrial();
  const { pattern, sizing } = draft;
  const asked = pattern.measures.some(({ ask }) => ask && !ask.finer);
  if (!asked || pattern.pieces.length === 0) return null;
  const older = trial !== null && trial.of !== pattern;
  return (
    <section className="desk-block trial" aria-label="The whole range">
      <h3>
        The whole range <span>every size and choice that readers may ask for</span>
      </h3>
      <p className="measure-deeds">
        <button
          type="button"
          className="btn small-btn"
          disabled={work.stale}
          onClick={() => (trial?.running ? stop() : start(pattern, sizing))}
        >
          {trial?.running ? 'Stop' : trial === null ? 'Try the whole range' : 'Try again'}
        </button>
        {older && !trial.running ? <span className="small soft">Changed since it was tried.</span> : null}
      </p>
      {trial === null ? null : <Found {...{ store, sizing, trial }} work={work} />}
    </section>
  );
}

function Found({
  store,
  sizing,
  trial,
  work,
}: {
  readonly store: DeskStore;
  readonly sizing: Sizing;
  readonly trial: Trial;
  readonly work: Work;
}) {
  const tried = trial.tried.reduce((n, way) => n + way.tried, 0);
  const failing = trial.tried.reduce((n, way) => n + way.failing, 0);
  const firsts = trial.tried.flatMap(({ first }) => first ?? []);
  const measures = work.live?.figures.measures ?? [];
  const narrower =
    failing === 0 || trial.running
      ? []
      : narrowerRanges(
          trial.tried,
          measures.filter(({ asked }) => asked),
          GRIDS[sizing.grid].step,
        ).map(({ name, from, to }) => ({ name, ...onGrid(measures, { name, from, to }, GRIDS[sizing.grid].step) }));
  const text = (name: string, value: number) => {
    const figure = measures.find((one) => one.name === name);
    return showValue(value, figure?.kind ?? 'length', { ...sizing, unit: figure?.unit }).text;
  };
  return (
    <>
      {trial.running ? (
        <progress
          className="trial-progress"
          max={trial.ways}
          value={trial.tried.length}
          aria-label="Ways of choosing tried"
        />
      ) : null}
      <p className={failing > 0 ? 'fault-words' : 'state good'} role="status">
        {failing > 0 ? null : <Icon name="check" />}{' '}
        {trial.running
          ? `${tried} sizes tried so far.`
          : failing === 0
            ? `All of ${tried} sizes tried can be made.`
            : `${failing} of ${tried} sizes tried cannot be made.`}
      </p>
      {firsts.length > 0 ? (
        <ul className="trial-sizes">
          {firsts.map((first, index) => (
            <li key={index}>
              <Icon name="close" label="Cannot be made" />
              <span>
                <b>{first.size}</b> <span className="soft">{first.sentence}</span>
              </span>
              <button
                type="button"
                className="btn small-btn"
                onClick={() => store.editSizing(null, (now) => ({ ...first.sizing, units: now.units, grid: now.grid }))}
              >
                Show it
              </button>
            </li>
          ))}
        </ul>
      ) : null}
      {narrower.map(({ name, from, to }) => (
        <p key={name} className="trial-narrower">
          Nothing failed while <b>{name}</b> was {text(name, from)} to {text(name, to)}.{' '}
          <button
            type="button"
            className="text-button small"
            onClick={() =>
              store.editPattern(null, (now) => changeAsk(now, name, { from: text(name, from), to: text(name, to) }))
            }
          >
            Ask for that range
          </button>
        </p>
      ))}
    </>
  );
}

/** A range that a person would write: lengths on the cut grid, inside what was found. */
function onGrid(
  measures: readonly MeasureFigure[],
  { name, from, to }: { readonly name: string; readonly from: number; readonly to: number },
  step: number,
): { readonly from: number; readonly to: number } {
  const isLength = measures.some((one) => one.name === name && one.kind === 'length');
  return isLength ? { from: roundTo(from, step, 'up'), to: roundTo(to, step, 'down') } : { from, to };
}
