import { Icon } from '@/components/Icon';
import type { ChoiceDef, Fault, Pattern } from '@/engine';
import type { Lit } from '@/features/projects/followers';
import {
  addOption,
  changeChoice,
  removeChoice,
  removeOption,
  usersOf,
  usersOfOption,
} from '@/features/projects/pattern-edits';
import type { DeskStore } from './desk-store';
import { LabelledFormula, orNothing, TextField } from './fields';
import { NamePlate } from './NamePlate';
import { TakeOut } from './TakeOut';

export interface ChoiceDetailsProps {
  readonly store: DeskStore;
  readonly pattern: Pattern;
  readonly choice: ChoiceDef;
  readonly names: readonly string[];
  readonly lit: Lit | null;
  readonly faults: readonly Fault[];
}

/** What a choice asks, its options by name, and when it is asked at all. */
export function ChoiceDetails({ store, pattern, choice, names, lit, faults }: ChoiceDetailsProps) {
  const { name } = choice;
  const change = (field: string | null, part: Partial<ChoiceDef>) =>
    store.editPattern(field === null ? null : `${name}.${field}`, (now) => changeChoice(now, name, part));
  return (
    <div className="choice-details">
      <NamePlate store={store} named={{ what: 'choice', from: name }} what="choice" />
      <TextField
        label="Question for the reader"
        of={name}
        value={choice.question}
        maxLength={200}
        onChange={(question) => change('question', { question })}
      />
      <ul className="plain-list options" aria-label={`Options of ${name}`}>
        {choice.options.map((option, index) => (
          <li key={index}>
            <NamePlate store={store} named={{ what: 'option', choice: name, from: option }} what="option" />
            {choice.options.length > 2 ? (
              <TakeOut
                label="Take out"
                usersOf={() => usersOfOption(pattern, name, option)}
                onTake={() => store.editPattern(null, (now) => removeOption(now, name, option))}
              />
            ) : null}
          </li>
        ))}
      </ul>
      <LabelledFormula
        label="Asked only when"
        of={name}
        value={choice.when ?? ''}
        {...{ names, lit, faults }}
        onChange={(when) => change('when', { when: orNothing(when) })}
      />
      <div className="measure-deeds">
        <button
          type="button"
          className="text-button small"
          onClick={() => store.editPattern(null, (now) => addOption(now, name))}
        >
          <Icon name="plus" /> Option
        </button>
        <label className="check tight">
          <input
            type="checkbox"
            checked={choice.finer ?? false}
            onChange={(event) => change(null, { finer: event.currentTarget.checked || undefined })}
          />
          <span>Among the finer points</span>
        </label>
        <TakeOut
          usersOf={() => usersOf(pattern, name)}
          onTake={() => {
            store.select(null);
            store.editPattern(null, (now) => removeChoice(now, name));
          }}
        />
      </div>
    </div>
  );
}
