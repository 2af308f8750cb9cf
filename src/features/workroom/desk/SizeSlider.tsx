import { useEffect, useState } from 'react';
import { Icon } from '@/components/Icon';
import { rulerTicks } from '@/components/ruler-ticks';
import { explain, GRIDS, readValue, type MeasureFigure, type Sizing } from '@/engine';
import { withValue } from '@/features/sizing/sizing-values';
import type { DeskStore } from './desk-store';
import { typedText } from './figure-text';
import { usePlay } from './use-play';

export interface SizeSliderProps {
  readonly store: DeskStore;
  readonly figure: MeasureFigure;
  readonly sizing: Sizing;
}

/** The author's own size of an asked measure: what readers see first. */
export function SizeSlider({ store, figure, sizing }: SizeSliderProps) {
  const { name, kind, from, to } = figure;
  const shown = typedText(figure.exact, kind, sizing, figure.unit);
  const [typed, setTyped] = useState(shown);
  const [fault, setFault] = useState<string | null>(null);
  useEffect(() => {
    setTyped(shown);
    setFault(null);
  }, [shown]);

  const set = (value: number, field: string | null) => store.editSizing(field, (now) => withValue(now, name, value));
  const commit = () => {
    if (typed.trim() === shown) return;
    const read = readValue(figure, typed, { units: figure.unit ?? sizing.units });
    if (read.ok) set(read.value, null);
    else setFault(read.faults[0] === undefined ? 'That does not read as a size.' : explain(read.faults[0]));
  };
  const step = kind === 'length' ? GRIDS[sizing.grid].step : kind === 'whole number' ? 1 : 0.5;
  const play = usePlay({
    from: from ?? 0,
    to: to ?? 0,
    at: figure.exact,
    show: (value) =>
      store.play(
        value === null
          ? null
          : withValue(store.$draft.get().sizing, name, onStep(value, { step, from: from ?? 0, to: to ?? 0 })),
      ),
  });
  const slidable = from !== undefined && to !== undefined && Number.isFinite(from) && Number.isFinite(to) && to > from;

  return (
    <div className="size-slider">
      <label className="size-box">
        <span className="small soft">Shown first</span>
        <input
          className="input"
          value={typed}
          aria-label={`${name}, the size shown first`}
          aria-invalid={fault === null ? undefined : true}
          onChange={(event) => setTyped(event.currentTarget.value)}
          onBlur={commit}
          onKeyDown={(event) => {
            if (event.key === 'Enter') commit();
            if (event.key === 'Escape') setTyped(shown);
          }}
        />
      </label>
      {slidable ? (
        <div className="size-track">
          <input
            type="range"
            className="slider"
            aria-label={`${name}, slider`}
            aria-valuetext={shown}
            min={from}
            max={to}
            step="any"
            value={figure.exact}
            onChange={(event) => set(onStep(Number(event.currentTarget.value), { step, from, to }), `${name}.slider`)}
            onKeyDown={(event) => {
              const steps = { ArrowLeft: -1, ArrowDown: -1, ArrowRight: 1, ArrowUp: 1, PageDown: -8, PageUp: 8 }[
                event.key
              ];
              if (steps === undefined) return;
              event.preventDefault();
              set(onStep(figure.exact + steps * step, { step, from, to }), `${name}.slider`);
            }}
          />
          {kind === 'length' ? <Ruler from={from} to={to} units={figure.unit ?? sizing.units} /> : null}
        </div>
      ) : null}
      {slidable ? (
        <p className="size-play">
          <button type="button" className="text-button small" onClick={play.press}>
            <Icon name={play.playing && !play.byPress ? 'minus' : 'play'} />
            {play.byPress
              ? play.playing
                ? 'Next size'
                : 'Step through the range'
              : play.playing
                ? 'Stop'
                : 'Play the range'}
          </button>
          {play.playing && play.byPress ? (
            <button type="button" className="text-button small" onClick={play.stop}>
              Back to your size
            </button>
          ) : null}
        </p>
      ) : null}
      {figure.set && !play.playing ? (
        <button
          type="button"
          className="text-button small"
          onClick={() => store.editSizing(null, (now) => withValue(now, name, null))}
        >
          Back to usual
        </button>
      ) : null}
      {fault === null ? null : (
        <p className="fault-words" role="alert">
          {fault}
        </p>
      )}
    </div>
  );
}

const onStep = (
  value: number,
  { step, from, to }: { readonly step: number; readonly from: number; readonly to: number },
): number => Math.min(to, Math.max(from, Number((Math.round(value / step) * step).toFixed(6))));

const RULER = { width: 280, inset: 12 } as const;

/** The range's own ruler under its slider. Decoration: the slider says its range itself. */
function Ruler({ from, to, units }: { readonly from: number; readonly to: number; readonly units: Sizing['units'] }) {
  const length = RULER.width - 2 * RULER.inset;
  return (
    <svg className="ruler" viewBox={`0 0 ${RULER.width} 30`} aria-hidden="true" focusable="false">
      {rulerTicks({ from, to, units, width: length }).map(({ at, size, label }) => {
        const x = RULER.inset + at * length;
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
