import { BLANK } from '@/features/patterns/blank-pattern';
import { boxHref } from '@/features/handbook/box-href';
import type { ShelfPattern } from './NewProject';

/** Every pattern, folded, standing on a ruled shelf. */
export function PatternShelf({
  patterns,
  onChoose,
}: {
  readonly patterns: readonly ShelfPattern[];
  readonly onChoose: (slug: string) => void;
}) {
  return (
    <section className="pattern-shelf" aria-labelledby="shelf-title">
      <div className="shelf-head">
        <h2 id="shelf-title">Start from a pattern</h2>
        <p className="soft">
          It comes with its measures, pieces, fits and making instructions. All of it is yours to change.
        </p>
        <button type="button" className="text-button small" onClick={() => onChoose(BLANK)}>
          Start from blank instead
        </button>
      </div>
      <ul className="shelf-patterns">
        {patterns.map((pattern) => (
          <li key={pattern.slug}>
            <button type="button" onClick={() => onChoose(pattern.slug)}>
              <span className="pattern-box" dangerouslySetInnerHTML={{ __html: pattern.folded }} />
              <span className="pattern-lip" aria-hidden="true">
                <span className="ruled" />
              </span>
              <b>{pattern.name}</b>
              <span className="small soft">{pattern.asks}</span>
            </button>
            <a href={boxHref(pattern.slug)}>
              How it works<span className="visually-hidden">: {pattern.name}</span>
            </a>
          </li>
        ))}
      </ul>
    </section>
  );
}
