import { rulerTicks, type RulerUnits } from './ruler-ticks';

export interface RangeRulerProps {
  /** The range in millimetres. */
  readonly from: number;
  readonly to: number;
  readonly units: RulerUnits;
  /** Drawing units the ruler is laid out for; it is then as wide as its place. */
  readonly width?: number;
  /** Room at both ends, so that a slider's thumb of twice this width stands over its tick. */
  readonly inset?: number;
}

/** The range's own ruler under a slider. Decoration: the slider says its range itself. */
export function RangeRuler({ from, to, units, width = 280, inset = 12 }: RangeRulerProps) {
  const length = width - 2 * inset;
  return (
    <svg className="ruler" viewBox={`0 0 ${width} 30`} aria-hidden="true" focusable="false">
      {rulerTicks({ from, to, units, width: length }).map(({ at, size, label }) => {
        const x = inset + at * length;
        return (
          <g key={at}>
            <line x1={x} x2={x} y1={0} y2={size} />
            {label ? (
              <text x={x} y={28} textAnchor="middle">
                {label}
              </text>
            ) : null}
          </g>
        );
      })}
    </svg>
  );
}
