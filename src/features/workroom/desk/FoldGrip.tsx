import { useRef, type KeyboardEvent, type PointerEvent } from 'react';

const LEAST = 320;
const STEP = 24;

/** The fold between two columns: dragged or moved by arrow keys, it gives the column before it more room. */
export function FoldGrip({ between }: { readonly between: 'measures' | 'pieces' }) {
  const grip = useRef<HTMLDivElement>(null);
  const width = () => grip.current?.previousElementSibling?.getBoundingClientRect().width ?? LEAST;
  const set = (to: number) => {
    const most = (grip.current?.parentElement?.getBoundingClientRect().width ?? 1440) - 2 * LEAST;
    const next = Math.round(Math.min(most, Math.max(LEAST, to)));
    grip.current?.parentElement?.style.setProperty(`--${between}`, `${next}px`);
    grip.current?.setAttribute('aria-valuenow', String(next));
  };
  const drag = (event: PointerEvent) => {
    event.preventDefault();
    const start = { x: event.clientX, width: width() };
    const move = (moved: globalThis.PointerEvent) => set(start.width + moved.clientX - start.x);
    const end = () => {
      window.removeEventListener('pointermove', move);
      window.removeEventListener('pointerup', end);
    };
    window.addEventListener('pointermove', move);
    window.addEventListener('pointerup', end);
  };
  const press = (event: KeyboardEvent) => {
    const by = { ArrowLeft: -STEP, ArrowRight: STEP }[event.key];
    if (by === undefined) return;
    event.preventDefault();
    set(width() + by);
  };
  return (
    <div
      ref={grip}
      className="fold-grip"
      role="separator"
      aria-orientation="vertical"
      aria-label={`Width of ${between}`}
      aria-valuenow={LEAST}
      aria-valuemin={LEAST}
      tabIndex={0}
      onPointerDown={drag}
      onKeyDown={press}
    >
      <i aria-hidden="true" />
    </div>
  );
}
