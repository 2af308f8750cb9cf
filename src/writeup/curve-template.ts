import { lengthOf, show, type Arc, type Drawing, type Figures, type PieceFigure, type Shape } from '@/engine';
import { esc } from '@/exports/escape';
import { drawingSvg } from '@/exports/svg/drawing';

/** CSS pixels of a millimetre, so that the drawing prints at full size. */
const MM = 96 / 25.4;
/** Room for the words below and the line's own width, in pixels. */
const EDGE = 12;
const LINE = 20;

/** A curve of a piece: part of a circle, lying on its chord. Lengths in millimetres, the angle in radians. */
export interface PieceCurve {
  readonly radius: number;
  readonly angle: number;
  readonly length: number;
  readonly chord: number;
  /** How far it stands out from its chord at the middle. */
  readonly rise: number;
}

/** The different curves of a piece's outline, folds and creases, the longest first. */
export function curvesOf({ net }: PieceFigure): readonly PieceCurve[] {
  const all = [...net.outline, ...net.folds.map(({ curve }) => curve), ...net.creases.map(({ curve }) => curve)];
  const different = new Map<string, PieceCurve>();
  for (const curve of all) {
    if (curve.type !== 'arc') continue;
    const one = curveOf(curve);
    // Rounded corners are no curve that anyone needs a template for.
    if (one.length >= 15) different.set(`${one.radius.toFixed(1)} ${one.length.toFixed(1)}`, one);
  }
  return [...different.values()].sort((a, b) => b.length - a.length);
}

function curveOf(arc: Arc): PieceCurve {
  const length = lengthOf(arc);
  const angle = length / arc.radius;
  return {
    radius: arc.radius,
    angle,
    length,
    chord: 2 * arc.radius * Math.abs(Math.sin(angle / 2)),
    rise: arc.radius * (1 - Math.cos(angle / 2)),
  };
}

/** What stands in the block: each curve at full size with its figures; nothing while the piece has none. */
export function curvesInside(figures: Figures, name: string): string {
  const piece = figures.pieces.find((one) => one.name === name);
  const curves = piece ? curvesOf(piece) : [];
  if (curves.length === 0) return '';
  const drawn = curves.map((curve) => drawingSvg(drawCurve(curve, name, figures.sizing))).join('');
  return (
    `<p class="piece-card-head"><b>${esc(name)}: ${curves.length === 1 ? 'its curve' : 'its curves'}</b> <span>full size when printed at 100 %</span></p>` +
    `<div class="curve-drawings">${drawn}</div>`
  );
}

function drawCurve(curve: PieceCurve, name: string, { units, grid }: Figures['sizing']): Drawing {
  const { radius, angle, chord, rise } = curve;
  const say = (mm: number) => show(mm, { units, grid }).typeset;
  const half = angle > Math.PI ? radius : chord / 2;
  const [left, top] = [EDGE + (half - chord / 2) * MM, EDGE];
  const foot = top + rise * MM;
  const n = (value: number) => String(Math.round(value * 100) / 100);
  const whole = angle > 2 * Math.PI - 0.01;
  const middle = EDGE + half * MM;
  const large = angle > Math.PI ? 1 : 0;
  const d = whole
    ? `M${n(middle)} ${n(top)}a${n(radius * MM)} ${n(radius * MM)} 0 1 1 -0.01 0z`
    : `M${n(left)} ${n(foot)}A${n(radius * MM)} ${n(radius * MM)} 0 ${large} 1 ${n(left + chord * MM)} ${n(foot)}`;
  const check = units === 'in' ? 50.8 : 50;
  const below = foot + (whole ? 0 : 6);
  const lines = whole
    ? [`a circle ${say(2 * radius)} across`]
    : [`${say(chord)} from end to end, stands out ${say(rise)}`, `part of a circle ${say(2 * radius)} across`];
  const shapes: Shape[] = [
    { type: 'path', role: 'cut', d },
    ...(whole ? [] : [{ type: 'path', role: 'hidden', d: `M${n(left)} ${n(foot)}h${n(chord * MM)}` } satisfies Shape]),
    ...lines.map((text, index): Shape => {
      return { type: 'text', role: 'label', x: EDGE, y: below + (index + 1) * LINE, text, anchor: 'start' };
    }),
    {
      type: 'path',
      role: 'dimension',
      d: `M${EDGE} ${n(below + (lines.length + 1) * LINE)}v-6v3h${n(check * MM)}v-3v6`,
    },
    {
      type: 'text',
      role: 'figure',
      x: EDGE + check * MM + 6,
      y: below + (lines.length + 1) * LINE,
      text: units === 'in' ? '2 in' : units === 'cm' ? '5 cm' : '50 mm',
      anchor: 'start',
    },
  ];
  const widest = Math.max(2 * half * MM, check * MM + 60, 300);
  return {
    width: widest + 2 * EDGE,
    height: below + (lines.length + 1) * LINE + EDGE,
    title: `${name}: a curve`,
    alt: `${name}: a curve ${lines.join(', ')}, along the line ${say(curve.length)}.`,
    shapes,
  };
}
