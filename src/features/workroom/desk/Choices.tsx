import { Segmented } from '@/components/Segmented';
import type { Fault } from '@/engine';
import { changeChoice } from '@/features/projects/pattern-edits';
import type { Lit } from '@/features/projects/followers';
import { chosenOption, withChoice } from '@/features/sizing/sizing-values';
import { ChoiceDetails } from './ChoiceDetails';
import type { DeskStore, Draft } from './desk-store';
import { FaultWords } from './FaultWords';

export interface ChoicesProps {
  readonly store: DeskStore;
  readonly draft: Draft;
  readonly lit: Lit | null;
  readonly names: readonly string[];
  readonly faults: readonly Fault[];
}

/** The pattern's choices: which option readers see first, and which is usual. Selected, one opens what else it has. */
export function Choices({ store, draft, lit, names, faults }: ChoicesProps) {
  const { pattern, sizing } = draft;
  if (pattern.choices.length === 0) return null;
  return (
    <div className="desk-block">
      <h3>Choices</h3>
      <div className="choices">
        {pattern.choices.map((choice) => {
          const shown = chosenOption(sizing, choice);
          const selected = lit?.selected === choice.name;
          const own = faults.filter((fault) => fault.where.startsWith(`choice “${choice.name}”`));
          return (
            <div key={choice.name} className={selected ? 'choice selected' : 'choice'}>
              <button
                type="button"
                className="measure-name"
                aria-pressed={selected}
                data-place={`name:${choice.name}`}
                onClick={() => store.select(selected ? null : choice.name)}
              >
                {choice.name}
              </button>
              <Segmented
                legend={choice.question}
                quietLegend
                options={choice.options.map((option) => ({ value: option, label: option }))}
                value={shown}
                onChange={(option) => store.editSizing(null, (now) => withChoice(now, choice.name, option))}
              />
              {shown === choice.usual ? (
                <span className="small soft">usual</span>
              ) : (
                <button
                  type="button"
                  className="text-button small"
                  onClick={() => store.editPattern(null, (now) => changeChoice(now, choice.name, { usual: shown }))}
                >
                  Make it usual
                </button>
              )}
              {selected ? <ChoiceDetails {...{ store, pattern, choice, names, lit, faults: own }} /> : null}
              {selected ? null : (
                <FaultWords
                  faults={own}
                  value={choice.when ?? ''}
                  onCure={(when) => store.editPattern(null, (now) => changeChoice(now, choice.name, { when }))}
                />
              )}
            </div>
          );
        })}
      </div>
    </div>
  );
}
