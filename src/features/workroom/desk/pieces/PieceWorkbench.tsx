import { useState } from 'react';
import { drawPiece, explain, keyOf, show, type Fault, type PieceDef, type PieceFigure } from '@/engine';
import { cellSizes } from '@/features/projects/cell-sizes';
import { usesAny } from '@/features/projects/followers';
import { cellAt, placesOf } from '@/features/projects/grid-edits';
import { placeInPiece, selectionOf, type GridSelection } from '@/features/projects/piece-faults';
import type { LiveFigures } from '@/writeup/live';
import { DrawingView } from '../DrawingView';
import { CellPanel } from './CellPanel';
import { GridTable } from './GridTable';
import { LayerForm } from './LayerForm';
import { OutlineForm } from './OutlineForm';
import { PieceBar } from './PieceBar';
import { usePieceDesk } from './piece-context';
import { Placements } from './Placements';
import { DiscForm, FanForm, SectorForm } from './ShapeForm';
import { TrackPanel } from './TrackPanel';

export interface PieceWorkbenchProps {
  readonly live: LiveFigures | null;
  readonly figure: PieceFigure | undefined;
  readonly onPiece: (name: string) => void;
}

/** One piece: its drawing, and below it all that it is made of. What is chosen in one is chosen in the other. */
export function PieceWorkbench({ live, figure, onPiece }: PieceWorkbenchProps) {
  const { piece, faults } = usePieceDesk();
  const [chosen, setChosen] = useState<{ readonly piece: string; readonly at: GridSelection } | null>(null);
  const selection = chosen?.piece === piece.name ? standing(piece, chosen.at) : null;
  const select = (at: GridSelection | null) => setChosen(at === null ? null : { piece: piece.name, at });
  const pick = (of: string) => {
    if (piece.builder !== 'grid') return;
    // Teeth are numbered after their tab: `rim 7`.
    const [at] = [of, of.replace(/ \d+$/u, '')].flatMap((name) => placesOf(piece, name));
    if (at !== undefined) select({ is: 'cell', ...at });
  };
  return (
    <>
      {faults
        .filter((fault) => !seenBeside(fault, piece, selection))
        .map((fault) => (
          <FaultLine key={fault.where + fault.code + fault.found} fault={fault} piece={piece} onGo={select} />
        ))}
      {live ? <PieceView live={live} figure={figure} selection={selection} onPick={pick} /> : null}
      <PieceBar onPiece={onPiece} />
      <div className="piece-parts">
        {piece.builder === 'grid' ? <GridTable selection={selection} onSelect={select} /> : null}
        {selection?.is === 'track' ? (
          <TrackPanel axis={selection.axis} index={selection.index} onSelect={select} />
        ) : null}
        {selection?.is === 'cell' ? <CellPanel at={selection} /> : null}
        {piece.builder === 'grid' && selection === null ? (
          <p className="small soft">Choose a cell, a column or a row, here or in the drawing, to change what it is.</p>
        ) : null}
        {piece.builder === 'fan' ? <FanForm /> : null}
        {piece.builder === 'disc' ? <DiscForm /> : null}
        {piece.builder === 'sector' ? <SectorForm /> : null}
        {piece.builder === 'outline' ? <OutlineForm /> : null}
        {piece.builder === 'layer' ? <LayerForm /> : null}
        <Placements key={piece.name} />
      </div>
    </>
  );
}

/** A selection whose place is still there. */
function standing(piece: PieceDef, at: GridSelection): GridSelection | null {
  if (piece.builder !== 'grid') return null;
  if (at.is === 'track') return piece[at.axis][at.index] === undefined ? null : at;
  return piece.cells[at.row]?.[at.column] === undefined ? null : at;
}

/** Whether a fault is told beside its field as things are shown. */
function seenBeside(fault: Fault, piece: PieceDef, selection: GridSelection | null): boolean {
  const place = placeInPiece(fault, piece.name) ?? '';
  if (place === '') return false;
  if (piece.builder !== 'grid' || place === 'count' || place === 'when') return true;
  if (/^(?:column|row), “[^”]*”$/u.test(place)) return true;
  const wanted = selectionOf(fault, piece);
  if (wanted === null || selection === null || wanted.is !== selection.is) return false;
  if (wanted.is === 'track' && selection.is === 'track')
    return wanted.axis === selection.axis && wanted.index === selection.index;
  return (
    wanted.is === 'cell' && selection.is === 'cell' && cellAt(piece, wanted).name === cellAt(piece, selection).name
  );
}

function FaultLine({
  fault,
  piece,
  onGo,
}: {
  readonly fault: Fault;
  readonly piece: PieceDef;
  readonly onGo: (at: GridSelection) => void;
}) {
  const to = selectionOf(fault, piece);
  const place = placeInPiece(fault, piece.name) ?? '';
  return (
    <p className="fault-words piece-fault">
      {place === '' ? '' : `${place.charAt(0).toUpperCase()}${place.slice(1)}: `}
      {explain(fault)}{' '}
      {to === null ? null : (
        <button type="button" className="text-button small" onClick={() => onGo(to)}>
          Go there
        </button>
      )}
    </p>
  );
}

interface PieceViewProps {
  readonly live: LiveFigures;
  readonly figure: PieceFigure | undefined;
  readonly selection: GridSelection | null;
  readonly onPick: (of: string) => void;
}
function PieceView({ live, figure, selection, onPick }: PieceViewProps) {
  const { piece, names, lit } = usePieceDesk();
  const { units, grid } = live.figures.sizing;
  if (figure === undefined) return <p className="desk-empty">{whyNot(live, piece.name)}</p>;
  const sizes = cellSizes(piece);
  const chosen = selection?.is === 'cell' && piece.builder === 'grid' ? cellAt(piece, selection) : null;
  return (
    <div className="piece-view">
      <p className="piece-facts">
        <b>{piece.name}</b>
        <span className="soft">
          cut {figure.count} · {figure.stock} · {show(figure.across, { units, grid, bare: true }).typeset} ×{' '}
          {show(figure.along, { units, grid }).typeset}
        </span>
      </p>
      <DrawingView
        drawing={drawPiece(figure, { width: 400, tallest: 250, units, grid })}
        isLit={(of) => lit !== null && (sizes.get(of)?.some((formula) => usesAny(formula, names, lit.names)) ?? false)}
        chosen={chosen === null || chosen.kind === 'away' ? null : chosen.name}
        onPick={piece.builder === 'grid' ? onPick : undefined}
      />
    </div>
  );
}

/** Why a piece has no drawing at this size. */
function whyNot({ figures }: LiveFigures, name: string): string {
  const problem = figures.problems.find(
    (found) =>
      (found.code === 'piece fails' || found.code === 'cannot be worked out') &&
      keyOf(found.sentence).includes(keyOf(name)),
  );
  return problem?.sentence ?? `${name} is not cut with these choices.`;
}
