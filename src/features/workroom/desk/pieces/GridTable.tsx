import { useRef, type KeyboardEvent } from 'react';
import { Icon } from '@/components/Icon';
import type { GridPieceDef } from '@/engine';
import { usesAny } from '@/features/projects/followers';
import {
  cellAt,
  changeTrack,
  insertTrack,
  placesOf,
  setCell,
  type Axis,
  type CellPlace,
} from '@/features/projects/grid-edits';
import type { GridSelection } from '@/features/projects/piece-faults';
import { PieceFormula } from './PieceFormula';
import { usePiece, usePieceDesk } from './piece-context';

export interface GridTableProps {
  readonly selection: GridSelection | null;
  readonly onSelect: (selection: GridSelection | null) => void;
}
const AXES = { columns: 'column', rows: 'row' } as const;

/** A grid piece as a table of columns and rows, as it lies in the drawing: their sizes by formula, every cell by its name. */
export function GridTable({ selection, onSelect }: GridTableProps) {
  const { piece, edit } = usePiece('grid');
  const table = useRef<HTMLTableElement>(null);
  const head = (axis: Axis, index: number) => (
    <TrackHead key={index} axis={axis} index={index} selection={selection} onSelect={onSelect} />
  );
  const chosen = selection?.is === 'cell' ? selection : null;
  const go = (to: CellPlace) => {
    if (piece.cells[to.row]?.[to.column] === undefined) return;
    onSelect({ is: 'cell', ...to });
    table.current?.querySelector<HTMLElement>(`[data-cell="${to.row} ${to.column}"]`)?.focus();
  };
  return (
    <div className="grid-scroll">
      <table ref={table} className="grid-table">
        <thead>
          <tr>
            <td>
              <AddTrack axis="columns" onAdd={(index) => onSelect({ is: 'track', axis: 'columns', index })} />
              <AddTrack axis="rows" onAdd={(index) => onSelect({ is: 'track', axis: 'rows', index })} />
            </td>
            {piece.columns.map((_, index) => head('columns', index))}
          </tr>
        </thead>
        <tbody>
          {piece.rows.map((_, row) => (
            <tr key={row}>
              {head('rows', row)}
              {piece.columns.map((_, column) => (
                <CellButton
                  key={column}
                  piece={piece}
                  at={{ row, column }}
                  chosen={chosen}
                  onChoose={() =>
                    onSelect(chosen?.row === row && chosen.column === column ? null : { is: 'cell', row, column })
                  }
                  onGo={go}
                  onAway={() => edit(null, (now) => setCell(now, { row, column }, { kind: 'away' }))}
                />
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function AddTrack({ axis, onAdd }: { readonly axis: Axis; readonly onAdd: (index: number) => void }) {
  const { piece, edit } = usePiece('grid');
  const one = AXES[axis];
  return (
    <button
      type="button"
      className="text-button small"
      onClick={() => {
        const index = piece[axis].length;
        edit(null, (now) => insertTrack(now, { axis, index }, '1/2 in'));
        onAdd(index);
      }}
    >
      <Icon name="plus" /> {one === 'column' ? 'Column' : 'Row'}
    </button>
  );
}

interface TrackHeadProps extends GridTableProps {
  readonly axis: Axis;
  readonly index: number;
}
function TrackHead({ axis, index, selection, onSelect }: TrackHeadProps) {
  const { names, lit } = usePieceDesk();
  const { piece, edit } = usePiece('grid');
  const track = piece[axis][index];
  if (track === undefined) return null;
  const one = AXES[axis];
  const selected = selection?.is === 'track' && selection.axis === axis && selection.index === index;
  const follows = lit !== null && usesAny(track.size, names, lit.names);
  return (
    <th
      scope={one === 'column' ? 'col' : 'row'}
      className={[selected ? 'selected' : '', follows ? 'follows' : ''].join(' ').trim() || undefined}
      data-lit={follows ? '' : undefined}
    >
      <button
        type="button"
        className="track-name"
        aria-pressed={selected}
        aria-label={`${one === 'column' ? 'Column' : 'Row'} ${track.name}`}
        onClick={() => onSelect(selected ? null : { is: 'track', axis, index })}
      >
        {track.name}
        {track.when === undefined ? null : <Icon name="question" label="only when its condition holds" />}
      </button>
      <PieceFormula
        quiet
        label={`Size of ${one} ${track.name}`}
        value={track.size}
        at={`${one}, “${track.name}”`}
        onChange={(size) => edit(`${axis}.${index}`, (now) => changeTrack(now, { axis, index }, { size }))}
      />
    </th>
  );
}

const MOVES: Readonly<Record<string, readonly [number, number]>> = {
  ArrowUp: [-1, 0],
  ArrowRight: [0, 1],
  ArrowDown: [1, 0],
  ArrowLeft: [0, -1],
};

interface CellButtonProps {
  readonly piece: GridPieceDef;
  readonly at: CellPlace;
  readonly chosen: CellPlace | null;
  readonly onChoose: () => void;
  readonly onGo: (to: CellPlace) => void;
  readonly onAway: () => void;
}
/** One cell; the whole table is one stop for the Tab key, arrows go from cell to cell, Delete cuts away. */
function CellButton({ piece, at, chosen, onChoose, onGo, onAway }: CellButtonProps) {
  const { kind, name } = cellAt(piece, at);
  const same =
    chosen !== null &&
    (kind === 'away'
      ? chosen.row === at.row && chosen.column === at.column
      : placesOf(piece, name).some((one) => one.row === chosen.row && one.column === chosen.column));
  const stop = chosen === null ? at.row === 0 && at.column === 0 : chosen.row === at.row && chosen.column === at.column;
  const press = (event: KeyboardEvent) => {
    const move = MOVES[event.key];
    if (move !== undefined) {
      event.preventDefault();
      onGo({ row: at.row + move[0], column: at.column + move[1] });
    } else if (event.key === 'Delete') {
      event.preventDefault();
      onAway();
    }
  };
  return (
    <td className={`grid-cell is-${kind}${same ? ' selected' : ''}`}>
      <button
        type="button"
        aria-pressed={same}
        tabIndex={stop ? 0 : -1}
        data-cell={`${at.row} ${at.column}`}
        onClick={onChoose}
        onKeyDown={press}
      >
        {kind === 'away' ? (
          <span className="visually-hidden">cut away</span>
        ) : (
          <>
            <span>{name}</span>
            {kind === 'panel' ? null : <small>{kind === 'cap' ? 'arc' : kind}</small>}
          </>
        )}
        <span className="visually-hidden">
          , {piece.rows[at.row]?.name}, {piece.columns[at.column]?.name}
        </span>
      </button>
    </td>
  );
}
