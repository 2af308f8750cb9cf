import { Segmented } from '@/components/Segmented';
import { keyOf, type Side } from '@/engine';
import {
  cellAt,
  hingeOf,
  joinCell,
  neighboursOf,
  partCell,
  placesOf,
  setCell,
  withList,
  type CellKind,
  type CellPlace,
} from '@/features/projects/grid-edits';
import { NamePlate } from '../NamePlate';
import { CellFeatures } from './CellFeatures';
import { CellFolds } from './CellFolds';
import { OptionField } from '../fields';
import { PieceFormula } from './PieceFormula';
import { usePiece, usePieceDesk } from './piece-context';
import { TabShapes } from './TabShapes';

const KINDS: readonly { readonly value: CellKind; readonly label: string }[] = [
  { value: 'panel', label: 'panel' },
  { value: 'tab', label: 'glued tab' },
  { value: 'flap', label: 'flap' },
  { value: 'cap', label: 'arc' },
  { value: 'away', label: 'cut away' },
];
const SIDES: readonly Side[] = ['top', 'right', 'bottom', 'left'];
const SIDE_WORDS: Readonly<Record<Side, string>> = { top: 'above', right: 'right', bottom: 'below', left: 'left' };

/** The chosen cell: what it is, what it hangs on, its folds, and what is cut into it. */
export function CellPanel({ at }: { readonly at: CellPlace }) {
  const { store } = usePieceDesk();
  const { piece, edit } = usePiece('grid');
  const cell = cellAt(piece, at);
  const around = neighboursOf(piece, at);
  const places = cell.kind === 'away' ? [at] : placesOf(piece, cell.name);
  const hangs = cell.kind === 'tab' || cell.kind === 'flap' || cell.kind === 'cap';
  const hinge = hangs ? hingeOf(piece, at) : null;
  const joins = SIDES.filter((side) =>
    neighboursOf(piece, at).some((other) => other.side === side && other.name !== cell.name),
  );
  return (
    <section className="cell-panel" aria-label={cell.kind === 'away' ? 'Cut away' : `Cell ${cell.name}`}>
      <div className="cell-kind">
        {cell.kind === 'away' ? null : (
          <NamePlate store={store} named={{ what: 'cell', piece: piece.name, from: cell.name }} what="cell" />
        )}
        <Segmented
          legend="What this cell is"
          quietLegend
          options={KINDS}
          value={cell.kind}
          onChange={(kind) => edit(null, (now) => setCell(now, at, { kind }))}
        />
      </div>
      {hangs ? (
        <div className="field-row">
          <OptionField
            label="Hangs on"
            value={hinge?.name ?? ''}
            options={[
              ...(hinge === null ? [{ value: '', label: 'nothing yet' }] : []),
              ...around.map(({ name, side }) => ({ value: name, label: `${name}, ${SIDE_WORDS[side]}` })),
            ]}
            onChange={(on) => edit(null, (now) => setCell(now, at, { on: on === '' ? null : on }))}
          />
          {cell.kind === 'cap' ? <CapRadius cell={cell.name} /> : null}
        </div>
      ) : null}
      {cell.kind === 'tab' || cell.kind === 'flap' ? (
        <TabShapes key={cell.name} cell={cell.name} hinge={hinge?.side ?? null} />
      ) : null}
      {cell.kind === 'away' ? null : (
        <>
          <CellFolds cell={cell.name} around={around} />
          <CellFeatures cell={cell.name} kind={cell.kind} />
        </>
      )}
      <div className="measure-deeds">
        {joins.map((side) => (
          <button
            key={side}
            type="button"
            className="text-button small"
            onClick={() => edit(null, (now) => joinCell(now, at, side))}
          >
            Make one with {around.find((other) => other.side === side)?.name}
          </button>
        ))}
        {places.length > 1 ? (
          <button type="button" className="text-button small" onClick={() => edit(null, (now) => partCell(now, at))}>
            Part this place off
          </button>
        ) : null}
      </div>
    </section>
  );
}

function CapRadius({ cell }: { readonly cell: string }) {
  const { piece, edit } = usePiece('grid');
  const own = (name: string) => keyOf(name) === cell;
  return (
    <PieceFormula
      label="Radius of the arc"
      value={piece.caps?.find((cap) => own(cap.cell))?.radius}
      at={`cap “${piece.caps?.find((cap) => own(cap.cell))?.cell ?? cell}”`}
      onChange={(radius) =>
        edit(`cap ${cell}`, (now) =>
          withList(now, 'caps', [...(now.caps ?? []).filter((cap) => !own(cap.cell)), { cell, radius }]),
        )
      }
    />
  );
}
