import { useStore } from '@nanostores/react';
import { useEffect, useRef, useState } from 'react';
import { drawPiece, type PieceFigure } from '@/engine';
import { namesOf } from '@/features/projects/formula-names';
import { placeInPiece } from '@/features/projects/piece-faults';
import { ColumnHead } from './ColumnHead';
import type { LiveFigures } from '@/writeup/live';
import type { DeskStore } from './desk-store';
import { DrawingView } from './DrawingView';
import { AddPieceButton, PieceStarts } from './pieces/AddPiece';
import { PieceContext } from './pieces/piece-context';
import { PieceWorkbench } from './pieces/PieceWorkbench';
import { FormulaPattern } from './use-completion';
import { WholeBox } from './WholeBox';
import './pieces/pieces.css';

const THUMB = { width: 68, tallest: 30 } as const;

export interface PiecesColumnProps {
  readonly store: DeskStore;
  readonly piece: string | null;
  readonly onPiece: (name: string) => void;
}

/** The pieces as live drawings and as what they are made of, the words that geometry says of them, and the whole box folded. */
export function PiecesColumn({ store, piece, onPiece }: PiecesColumnProps) {
  const draft = useStore(store.$draft);
  const { live, stale, compiled } = useStore(store.$work);
  const lit = useStore(store.$lit);
  const { pattern, sizing } = draft;
  const { pieces } = pattern;
  const chosen = useChosen(pieces, piece);
  const [adding, setAdding] = useState(false);
  const figures = new Map(live?.figures.pieces.map((figure) => [figure.name, figure]));
  const faults = compiled.ok
    ? []
    : compiled.faults.filter((fault) => chosen !== undefined && placeInPiece(fault, chosen.name) !== null);
  const litPieces = pieces.filter((known) => lit?.pieces.includes(known.name));

  const step = (by: 1 | -1) => {
    if (litPieces.length === 0) return;
    const at = litPieces.findIndex((known) => known.name === chosen?.name);
    const next =
      litPieces[(at === -1 ? (by === 1 ? 0 : litPieces.length - 1) : at + by + litPieces.length) % litPieces.length];
    if (next) onPiece(next.name);
  };

  return (
    <FormulaPattern.Provider value={pattern}>
      <section className="desk-column" data-column="pieces" aria-label="Pieces" tabIndex={-1}>
        <ColumnHead
          title="Pieces"
          shortcut="Alt 2"
          lit={lit === null ? null : `${litPieces.length} of ${pieces.length} lit`}
          onStep={step}
          action={chosen === undefined ? null : <AddPieceButton open={adding} onOpen={setAdding} />}
        />
        <div className="piece-tabs" role="tablist" aria-label="Pieces">
          {pieces.map((known) => (
            <PieceTab
              key={known.name}
              name={known.name}
              figure={figures.get(known.name)}
              lit={lit?.pieces.includes(known.name) ?? false}
              selected={known.name === chosen?.name}
              onSelect={() => onPiece(known.name)}
              sizing={sizing}
            />
          ))}
        </div>
        <div className="desk-scroll" data-stale={stale ? '' : undefined}>
          {chosen === undefined ? (
            <p className="desk-empty">A box is made of pieces. Begin with one, and change it from there.</p>
          ) : null}
          {adding || chosen === undefined ? (
            <PieceStarts
              store={store}
              pattern={pattern}
              focus={adding}
              onAdded={(name) => {
                setAdding(false);
                onPiece(name);
              }}
              onClose={() => setAdding(false)}
            />
          ) : null}
          {stale ? <p className="stale-words">A formula does not read. These are the last good figures.</p> : null}
          {live === null ? (
            <p className="desk-empty">
              Nothing can be drawn until every formula reads. What is wrong stands beside it, and in the list below.
            </p>
          ) : null}
          {chosen === undefined ? null : (
            <div role="tabpanel" aria-label={chosen.name}>
              <PieceContext.Provider value={{ store, pattern, piece: chosen, names: namesOf(pattern), lit, faults }}>
                <PieceWorkbench live={live} figure={figures.get(chosen.name)} onPiece={onPiece} />
              </PieceContext.Provider>
            </div>
          )}
          {live && chosen ? <WholeBox live={live} figure={figures.get(chosen.name)} /> : null}
        </div>
      </section>
    </FormulaPattern.Provider>
  );
}

/** The piece that was chosen by name; while no piece is called so, the one that stands where it stood. */
function useChosen<P extends { readonly name: string }>(pieces: readonly P[], name: string | null): P | undefined {
  const last = useRef(0);
  const found = pieces.findIndex((known) => known.name === name);
  const index = found === -1 ? Math.min(last.current, Math.max(0, pieces.length - 1)) : found;
  useEffect(() => {
    last.current = index;
  }, [index]);
  return pieces[index];
}

interface PieceTabProps {
  readonly name: string;
  readonly figure: PieceFigure | undefined;
  readonly lit: boolean;
  readonly selected: boolean;
  readonly onSelect: () => void;
  readonly sizing: LiveFigures['figures']['sizing'];
}
function PieceTab({ name, figure, lit, selected, onSelect, sizing }: PieceTabProps) {
  return (
    <button
      type="button"
      role="tab"
      aria-selected={selected}
      className={lit ? 'piece-tab lit' : 'piece-tab'}
      data-place={`piece:${name}`}
      onClick={onSelect}
    >
      <span className="thumb" aria-hidden="true">
        {figure ? (
          <DrawingView
            drawing={drawPiece(figure, {
              ...THUMB,
              units: sizing.units,
              grid: sizing.grid,
              labels: false,
              dims: false,
            })}
          />
        ) : null}
      </span>
      <span>
        {name}
        {figure !== undefined && figure.count > 1 ? ` ×${figure.count}` : ''}
        {lit ? <span className="visually-hidden">, lit</span> : null}
      </span>
    </button>
  );
}
