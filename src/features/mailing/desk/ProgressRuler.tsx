import type { Counts } from '../counts';
import { countTicks } from './ruler';
import { figure } from './words';

/** A ruler as long as the list: what was accepted from the left, what did not simply go at the right end. */
export function ProgressRuler({ counts }: { readonly counts: Counts }) {
  const { accepted, retrying, refused, uncertain, leftOut, total } = counts;
  const length = Math.max(total, 1);
  const part = (n: number): string => `${((100 * n) / length).toFixed(3)}%`;
  const ends = [
    { name: 'retry', count: retrying },
    { name: 'refused', count: refused },
    { name: 'uncertain', count: uncertain },
    { name: 'left-out', count: leftOut },
  ];
  const troubled = ends.reduce((all, { count }) => all + count, 0);
  let from = total - troubled;
  const bars = ends.map(({ name, count }) => {
    const bar = { name, x1: part(from), x2: part(from + count), count };
    from += count;
    return bar;
  });
  const ticks = countTicks(length);
  const labels = ticks.filter(({ size, at }) => size === 'long' && total - at > total * 0.07);
  const words = `${figure(accepted)} of ${figure(total)} accepted, ${figure(troubled)} did not simply go`;

  return (
    <svg className="count-ruler" width="100%" height="76" role="img" aria-label={words}>
      <g className={ticks.length > 50 ? 'crowded' : undefined}>
        {ticks.map(({ at, size }) => (
          <line
            key={at}
            className={`tick ${size}${at <= accepted && accepted > 0 ? ' reached' : ''}`}
            x1={part(at)}
            x2={part(at)}
            y1={size === 'long' ? 14 : size === 'middle' ? 24 : 33}
            y2={50}
          />
        ))}
      </g>
      <line className="bar accepted" x1="0" x2={part(accepted)} y1={47.5} y2={47.5} />
      {bars.map(({ name, x1, x2, count }) =>
        count > 0 ? <line key={name} className={`bar ${name}`} x1={x1} x2={x2} y1={47.5} y2={47.5} /> : null,
      )}
      <line className="edge" x1="0" x2="100%" y1={50} y2={50} />
      {accepted > 0 && accepted < total ? (
        <svg x={part(accepted)} overflow="visible">
          <path className="hand" d="M-6 0H6L3.5 10V50H-0.5H-1V10H-3.5Z" />
        </svg>
      ) : null}
      {labels.map(({ at }, i) => (
        <text
          key={at}
          className={i % 2 === 1 ? 'label every-other' : 'label'}
          x={part(at)}
          y={70}
          textAnchor={at === 0 ? 'start' : 'middle'}
        >
          {figure(at)}
        </text>
      ))}
      <text className="label total" x="100%" y={70} textAnchor="end">
        {figure(total)}
      </text>
    </svg>
  );
}
