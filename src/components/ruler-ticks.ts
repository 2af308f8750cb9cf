/** Ticks of a ruler from one length to another, both in millimetres; what RangeRuler and RuledEdge draw. */
export interface RulerTick {
  /** Where it stands, 0 to 1 of the ruler's length. */
  readonly at: number;
  /** Its length in pixels. */
  readonly size: 14 | 9 | 6 | 4;
  /** The figure under it, on some of the long ticks. */
  readonly label?: string;
}
export type RulerUnits = 'in' | 'mm' | 'cm';

interface Scale {
  /** Millimetres from one tick to the next. */
  readonly step: number;
  /** Every so many ticks is a long, a middle and a short one; the rest are the finest. */
  readonly long: number;
  readonly middle: number;
  readonly short: number;
  /** Millimetres that the figure counts. */
  readonly unit: number;
}

const INCH = 25.4;
const INCH_SCALES: readonly Scale[] = [
  { step: INCH / 16, long: 16, middle: 8, short: 4, unit: INCH },
  { step: INCH / 8, long: 8, middle: 4, short: 2, unit: INCH },
  { step: INCH / 4, long: 4, middle: 2, short: 1, unit: INCH },
  { step: INCH, long: 4, middle: 2, short: 1, unit: INCH },
];
const metricScales = (unit: number): readonly Scale[] => [
  { step: 1, long: 10, middle: 5, short: 5, unit },
  { step: 5, long: 10, middle: 2, short: 1, unit },
  { step: 10, long: 10, middle: 5, short: 1, unit },
];

/**
 * The finest ticks that still stand `apart` pixels from one another on a ruler `width` pixels long.
 * Figures stand on long ticks at least 30 pixels apart. An empty or upside-down range has no ticks.
 */
export function rulerTicks(options: {
  readonly from: number;
  readonly to: number;
  readonly units: RulerUnits;
  readonly width: number;
  readonly apart?: number;
}): readonly RulerTick[] {
  const { from, to, units, width, apart = 4 } = options;
  const span = to - from;
  if (!(span > 0) || !(width > 0)) return [];
  const perMm = width / span;
  const scales = units === 'in' ? INCH_SCALES : metricScales(units === 'cm' ? 10 : 1);
  const scale = scales.find(({ step }) => step * perMm >= apart) ?? scales[scales.length - 1]!;
  const { step, long, middle, short, unit } = scale;
  const figureEvery = Math.max(1, Math.ceil(30 / (long * step * perMm)));

  const ticks: RulerTick[] = [];
  const slack = step / 1000;
  for (let index = Math.ceil((from - slack) / step); index * step <= to + slack; index += 1) {
    const at = Math.min(1, Math.max(0, (index * step - from) / span));
    const size = index % long === 0 ? 14 : index % middle === 0 ? 9 : index % short === 0 ? 6 : 4;
    const figured = size === 14 && (index / long) % figureEvery === 0;
    ticks.push(figured ? { at, size, label: String(Math.round((index * step) / unit)) } : { at, size });
  }
  return ticks;
}
