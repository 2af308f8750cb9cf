import { instructionsOf, sayParts, show, type PieceFigure } from '@/engine';
import type { LiveFigures } from '@/writeup/live';
import { FoldedBox } from './FoldedBox';

/** The box folded at the size shown, and what geometry says of the piece at hand. */
export function WholeBox({ live, figure }: { readonly live: LiveFigures; readonly figure: PieceFigure | undefined }) {
  const { model, figures } = live;
  const { units, grid } = figures.sizing;
  return (
    <div className="whole-box">
      <div>
        <h3>Whole box{figures.finished.inside.length > 0 ? ', shown at' : ''}</h3>
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
        {model.placements.length > 0 ? (
          <FoldedBox model={model} figures={figures} />
        ) : (
          <p className="soft">No piece stands in the folded picture yet.</p>
        )}
      </div>
      <div className="words">
        <h3>Words from the geometry</h3>
        {figure === undefined ? <p className="soft">This piece is not cut with these choices.</p> : null}
        {(figure === undefined ? [] : instructionsOf(figure)).map((sentence, i) => (
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
