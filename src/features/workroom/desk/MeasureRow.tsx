import { useId } from 'react';
import type { Fault, MeasureDef, MeasureFigure, Rounding, Sizing } from '@/engine';
import { changeAsk, changeMeasure } from '@/features/projects/pattern-edits';
import type { Lit } from '@/features/projects/followers';
import { fieldOfFault } from '@/features/projects/proof-place';
import type { DeskStore } from './desk-store';
import { FaultWords } from './FaultWords';
import { cutText, exactText } from './figure-text';
import { FormulaField } from './FormulaField';
import { MeasureDetails } from './MeasureDetails';
import { NameField, RenameWords } from './RenameMeasure';
import { useRenaming } from './use-renaming';

export interface MeasureRowProps {
  readonly store: DeskStore;
  readonly measure: MeasureDef;
  readonly names: readonly string[];
  readonly faults: readonly Fault[];
  readonly figure: MeasureFigure | undefined;
  readonly lit: Lit | null;
  readonly stale: boolean;
  readonly sizing: Sizing;
  /** How many places followed its new name, while nothing else has changed since. */
  readonly renamed: string | null;
  readonly onRenamed: (name: string, words: string) => void;
}
const ROUNDINGS: readonly Rounding[] = ['nearest', 'up', 'down', 'exact'];

/** One measure: what it is, what it comes to, how it is rounded. Selected, it opens what else can be changed. */
export function MeasureRow(props: MeasureRowProps) {
  const { store, measure, names, faults, figure, lit, stale, sizing } = props;
  const errorId = useId();
  const renameId = useId();
  const { name } = measure;
  const renaming = useRenaming(store, name, props.onRenamed);
  const selected = lit?.selected === name;
  const follows = lit !== null && !selected && lit.names.has(name);
  const own = faults.filter((fault) => fieldOfFault(fault, name) !== null);
  const inFormula = measure.ask ? [] : own;
  const usualRounding: Rounding = (measure.kind ?? 'length') === 'length' ? 'nearest' : 'exact';
  const setFormula = (formula: string) =>
    store.editPattern(`${name}.formula`, (pattern) => changeMeasure(pattern, name, { formula }));
  const className = ['measure-row', selected ? 'selected' : '', follows ? 'follows' : '', own.length > 0 ? 'wrong' : '']
    .filter(Boolean)
    .join(' ');
  const meanwhile = figure
    ? `Until it reads, pieces keep the last good ${cutText(figure, sizing)}.`
    : 'Until it reads, no piece can be drawn.';

  return (
    <>
      <tr className={className} data-lit={follows ? '' : undefined} data-measure={name}>
        <th scope="row">
          {renaming.typed === null ? (
            <button
              type="button"
              className="measure-name"
              aria-pressed={selected}
              aria-keyshortcuts="F2"
              title="F2 renames it"
              data-place={`name:${name}`}
              onClick={() => store.select(selected ? null : name)}
              onKeyDown={(event) => {
                if (event.key !== 'F2') return;
                event.preventDefault();
                renaming.begin();
              }}
            >
              {name}
            </button>
          ) : (
            <NameField name={name} renaming={renaming} describedBy={renameId} />
          )}
        </th>
        <td>
          {measure.ask ? (
            <textarea
              className="plain-input"
              rows={1}
              aria-label={`Question for ${name}`}
              data-place={`measure:${name}`}
              value={measure.ask.question}
              maxLength={200}
              onFocus={() => store.select(name)}
              onChange={(event) => {
                const question = event.currentTarget.value.replace(/\n/gu, ' ');
                store.editPattern(`${name}.question`, (pattern) => changeAsk(pattern, name, { question }));
              }}
            />
          ) : (
            <FormulaField
              label={`Formula of ${name}`}
              place={`measure:${name}`}
              value={measure.formula ?? ''}
              names={names}
              lit={lit?.names ?? null}
              faults={inFormula}
              describedBy={inFormula.length > 0 ? errorId : undefined}
              onChange={setFormula}
              onFocus={() => store.select(name)}
            />
          )}
          {measure.note ? <p className="small soft">{measure.note}</p> : null}
        </td>
        <td className="figures soft">{figure ? exactText(figure, sizing) : '–'}</td>
        <td className={stale ? 'figures stale' : 'figures'}>
          <b>{figure ? cutText(figure, sizing) : '–'}</b>
        </td>
        <td>
          <select
            className="plain-select"
            aria-label={`How ${name} is rounded`}
            value={measure.rounds ?? usualRounding}
            onChange={(event) => {
              const rounds = event.currentTarget.value as Rounding;
              store.editPattern(null, (pattern) => changeMeasure(pattern, name, { rounds }));
            }}
          >
            {ROUNDINGS.map((rounding) => (
              <option key={rounding}>{rounding}</option>
            ))}
          </select>
        </td>
      </tr>
      {renaming.typed === null && props.renamed === null ? null : (
        <tr className={selected ? 'measure-naming selected' : 'measure-naming'}>
          <td colSpan={5}>
            {renaming.typed === null ? (
              <p className="fault-cure">
                <b>{props.renamed}</b>
                <button type="button" className="text-button small" onClick={store.undo}>
                  Undo
                </button>
              </p>
            ) : (
              <RenameWords id={renameId} renaming={renaming} />
            )}
          </td>
        </tr>
      )}
      {inFormula.length > 0 ? (
        <tr className="row-fault">
          <td />
          <td colSpan={4}>
            <FaultWords
              id={errorId}
              faults={inFormula}
              value={measure.formula ?? ''}
              meanwhile={meanwhile}
              onCure={setFormula}
            />
          </td>
        </tr>
      ) : null}
      {selected || (measure.ask && own.length > 0) ? (
        <tr className={selected ? 'measure-more selected' : 'measure-more'}>
          <td colSpan={5}>
            <MeasureDetails {...props} own={own} onRename={renaming.begin} />
          </td>
        </tr>
      ) : null}
    </>
  );
}
