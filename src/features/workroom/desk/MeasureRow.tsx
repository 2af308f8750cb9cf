import { useId, useState, type DragEvent } from 'react';
import { Icon } from '@/components/Icon';
import type { Fault, MeasureDef, MeasureFigure, Rounding, Sizing } from '@/engine';
import { changeAsk, changeMeasure, moveMeasure, moveMeasureTo } from '@/features/projects/pattern-edits';
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
const MOVES: Readonly<Record<string, 1 | -1>> = { ArrowUp: -1, ArrowDown: 1 };
const ROUNDINGS: readonly Rounding[] = ['nearest', 'up', 'down', 'exact'];

/** One measure: what it is, what it comes to, how it is rounded. Selected, it opens what else can be changed. */
export function MeasureRow(props: MeasureRowProps) {
  const { store, measure, names, faults, figure, lit, stale, sizing } = props;
  const errorId = useId();
  const renameId = useId();
  const { name } = measure;
  const renaming = useRenaming(
    store,
    { what: 'measure', from: name },
    {
      onRenamed: props.onRenamed,
      onBegin: () => store.select(name),
      backTo: (called) => `[data-place="name:${CSS.escape(called)}"]`,
    },
  );
  const dragging = useRowDrag(name, (from) => store.editPattern(null, (pattern) => moveMeasureTo(pattern, from, name)));
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
      <tr
        className={dragging.over ? `${className} takes-drop` : className}
        data-lit={follows ? '' : undefined}
        data-measure={name}
        {...dragging.row}
      >
        <th scope="row">
          <span className="row-grip" aria-hidden="true" title="Drag it to another place" {...dragging.grip}>
            <Icon name="grip" />
          </span>
          {renaming.typed === null ? (
            <button
              type="button"
              className="measure-name"
              aria-pressed={selected}
              aria-keyshortcuts="F2 Alt+ArrowUp Alt+ArrowDown"
              title="F2 renames it, Alt with an arrow moves it"
              data-place={`name:${name}`}
              onClick={() => store.select(selected ? null : name)}
              onKeyDown={(event) => {
                const by = event.altKey ? MOVES[event.key] : undefined;
                if (by === undefined && event.key !== 'F2') return;
                event.preventDefault();
                if (by === undefined) return renaming.begin();
                store.editPattern(null, (pattern) => moveMeasure(pattern, name, by));
                const { currentTarget } = event;
                requestAnimationFrame(() => currentTarget.focus());
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

/** What is dragged from one row to another; only rows of this table know it. */
const DRAGGED = 'application/x-foldwright-measure';

/** A row that can be dragged by its grip and takes what is dropped on it. */
function useRowDrag(name: string, onDrop: (from: string) => void) {
  const [over, setOver] = useState(false);
  const carries = (event: DragEvent) => event.dataTransfer.types.includes(DRAGGED);
  return {
    over,
    grip: {
      draggable: true,
      onDragStart: (event: DragEvent) => {
        event.dataTransfer.setData(DRAGGED, name);
        event.dataTransfer.effectAllowed = 'move';
      },
    },
    row: {
      onDragOver: (event: DragEvent) => {
        if (!carries(event)) return;
        event.preventDefault();
        setOver(true);
      },
      onDragLeave: () => setOver(false),
      onDrop: (event: DragEvent) => {
        setOver(false);
        if (!carries(event)) return;
        event.preventDefault();
        onDrop(event.dataTransfer.getData(DRAGGED));
      },
    },
  };
}
