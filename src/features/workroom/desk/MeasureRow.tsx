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

export interface MeasureRowProps {
  readonly store: DeskStore;
  readonly measure: MeasureDef;
  readonly names: readonly string[];
  readonly faults: readonly Fault[];
  readonly figure: MeasureFigure | undefined;
  readonly lit: Lit | null;
  readonly stale: boolean;
  readonly sizing: Sizing;
}
const ROUNDINGS: readonly Rounding[] = ['nearest', 'up', 'down', 'exact'];

/** One measure: what it is, what it comes to, how it is rounded. Selected, it opens what else can be changed. */
export function MeasureRow(props: MeasureRowProps) {
  const { store, measure, names, faults, figure, lit, stale, sizing } = props;
  const errorId = useId();
  const { name } = measure;
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
          <button
            type="button"
            className="measure-name"
            aria-pressed={selected}
            data-place={`name:${name}`}
            onClick={() => store.select(selected ? null : name)}
          >
            {name}
          </button>
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
            <MeasureDetails {...props} own={own} />
          </td>
        </tr>
      ) : null}
    </>
  );
}
