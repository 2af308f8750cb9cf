import { useStore } from '@nanostores/react';
import { drawPiece, explain, sayParts, show, type Pattern, type PieceFigure } from '@/engine';
import { cellSizes } from '@/features/projects/cell-sizes';
import { namesOf } from '@/features/projects/formula-names';
import { usesAny } from '@/features/projects/followers';
import { ColumnHead } from './ColumnHead';
import type { LiveFigures } from '@/writeup/live';
import type { DeskStore } from './desk-store';
import { DrawingView } from './DrawingView';
import { FoldedBox } from './FoldedBox';
import { TrackFields } from './TrackFields';

const THUMB = { width: 68, tallest: 30 } as const;

export interface PiecesColumnProps {
  readonly store: DeskStore;
  readonly piece: string | null;
  readonly onPiece: (name: string) => void;
}

/** The pieces as live drawings, the words that geometry says of them, and the whole box folded. */
export function PiecesColumn({ store, piece, onPiece }: PiecesColumnProps) {
  const draft = useStore(store.$draft);
  const { live, stale, compiled } = useStore(store.$work);
  const lit = useStore(store.$lit);
  const { pieces } = draft.pattern;
  const chosen = pieces.find((known) => known.name === piece) ?? pieces[0];
  const figures = new Map(live?.figures.pieces.map((figure) => [figure.name, figure]));
  const faults = compiled.ok
    ? []
    : compiled.faults.filter((fault) => fault.where.startsWith(`piece “${chosen?.name ?? ''}”`));
  const litPieces = pieces.filter((known) => lit?.pieces.includes(known.name));

  const step = (by: 1 | -1) => {
    if (litPieces.length === 0) return;
    const at = litPieces.findIndex((known) => known.name === chosen?.name);
    const next =
      litPieces[(at === -1 ? (by === 1 ? 0 : litPieces.length - 1) : at + by + litPieces.length) % litPieces.length];
    if (next) onPiece(next.name);
  };

  return (
    <section className="desk-column" data-column="pieces" aria-label="Pieces" tabIndex={-1}>
      <ColumnHead
        title="Pieces"
        shortcut="Alt 2"
        lit={lit === null ? null : `${litPieces.length} of ${pieces.length} lit`}
        onStep={step}
      />
      <div className="piece-tabs" role="tablist" aria-label="Pieces">
        {pieces.map((known) => (
          <PieceTab
            key={known.name}
            name={known.name}
            figure={figures.get(known.name)}
            count={figures.get(known.name)?.count}
            lit={lit?.pieces.includes(known.name) ?? false}
            selected={known.name === chosen?.name}
            onSelect={() => onPiece(known.name)}
            sizing={draft.sizing}
          />
        ))}
      </div>
      <div
        className="desk-scroll"
        data-stale={stale ? '' : undefined}
        role="tabpanel"
        aria-label={chosen?.name ?? 'No piece'}
      >
        {chosen === undefined ? <p className="desk-empty">This pattern has no pieces.</p> : null}
        {stale ? <p className="stale-words">A formula does not read. These are the last good figures.</p> : null}
        {live === null ? (
          <p className="desk-empty">
            Nothing can be drawn until every formula reads. What is wrong stands in the measures.
          </p>
        ) : null}
        {faults.map((fault) => (
          <p key={fault.where + fault.code} className="fault-words piece-fault">
            {explain(fault)}
          </p>
        ))}
        {chosen && live ? (
          <PieceView
            figure={figures.get(chosen.name)}
            name={chosen.name}
            live={live}
            isLit={(formula) => lit !== null && usesAny(formula, namesOf(draft.pattern), lit.names)}
            pattern={draft.pattern}
          />
        ) : null}
        {chosen?.builder === 'grid' ? (
          <TrackFields store={store} piece={chosen} pattern={draft.pattern} lit={lit} faults={faults} />
        ) : null}
        {live ? <WholeBox live={live} figure={chosen ? figures.get(chosen.name) : undefined} /> : null}
      </div>
    </section>
  );
}

interface PieceTabProps {
  readonly name: string;
  readonly figure: PieceFigure | undefined;
  readonly count: number | undefined;
  readonly lit: boolean;
  readonly selected: boolean;
  readonly onSelect: () => void;
  readonly sizing: LiveFigures['figures']['sizing'];
}
function PieceTab({ name, figure, count, lit, selected, onSelect, sizing }: PieceTabProps) {
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
        {count !== undefined && count > 1 ? ` ×${count}` : ''}
        {lit ? <span className="visually-hidden">, lit</span> : null}
      </span>
    </button>
  );
}

interface PieceViewProps {
  readonly figure: PieceFigure | undefined;
  readonly name: string;
  readonly live: LiveFigures;
  readonly isLit: (formula: string) => boolean;
  readonly pattern: Pattern;
}
function PieceView({ figure, name, live, isLit, pattern }: PieceViewProps) {
  const { units, grid } = live.figures.sizing;
  if (figure === undefined) {
    const problem = live.figures.problems.find(
      (found) => found.code === 'piece fails' || found.code === 'cannot be worked out',
    );
    return <p className="desk-empty">{problem?.sentence ?? `${name} is not cut with these choices.`}</p>;
  }
  const piece = pattern.pieces.find((known) => known.name === name);
  const sizes = piece === undefined ? null : cellSizes(piece);
  return (
    <div className="piece-view">
      <p className="piece-facts">
        <b>{name}</b>
        <span className="soft">
          cut {figure.count} · {figure.stock} · {show(figure.across, { units, grid, bare: true }).typeset} ×{' '}
          {show(figure.along, { units, grid }).typeset}
        </span>
      </p>
      <DrawingView
        drawing={drawPiece(figure, { width: 400, tallest: 250, units, grid })}
        isLit={(of) => sizes?.get(of)?.some(isLit) ?? false}
      />
    </div>
  );
}

function WholeBox({ live, figure }: { readonly live: LiveFigures; readonly figure: PieceFigure | undefined }) {
  const { model, figures } = live;
  const { units, grid } = figures.sizing;
  return (
    <div className="whole-box">
      <div>
        <h3>Whole box, shown at</h3>
        <p className="small">
          {figures.finished.inside.map((size, i) => (
            <span key={size.name}>
              {i > 0 ? ' × ' : ''}
              <span className="measure">
                {show(size.mm, { units, grid, bare: i < figures.finished.inside.length - 1 }).typeset}
              </span>
            </span>
          ))}
        </p>
        <FoldedBox model={model} figures={figures} />
      </div>
      <div className="words">
        <h3>Words from the geometry</h3>
        {figure === undefined ? <p className="soft">This piece is not cut with these choices.</p> : null}
        {figure?.instructions.map((sentence, i) => (
          <p key={i}>
            {sayParts(sentence, { units, grid }).map((part, j) =>
              part.figure ? (
                <span key={j} className="measure">
                  {part.typeset}
                </span>
              ) : (
                part.text
              ),
            )}
          </p>
        ))}
      </div>
    </div>
  );
}
