import type { Drawing, Shape } from '@/engine';

export interface DrawingViewProps {
  readonly drawing: Drawing;
  /** Which shapes to light, by what they are of. */
  readonly isLit?: (of: string) => boolean;
  /** The part that is chosen, by what it is of. */
  readonly chosen?: string | null;
  /** A press on a part. The drawing is only the quick way: whatever it chooses can be chosen by keyboard elsewhere. */
  readonly onPick?: (of: string) => void;
  readonly className?: string;
}

/** A drawing as live SVG, so that parts of it can be lit. The classes are those of src/styles/drawing.css. */
export function DrawingView({ drawing, isLit, chosen, onPick, className }: DrawingViewProps) {
  return (
    <svg
      className={className ? `drawing ${className}` : 'drawing'}
      width={drawing.width}
      height={drawing.height}
      viewBox={`0 0 ${drawing.width} ${drawing.height}`}
      role="img"
      aria-label={drawing.alt}
    >
      {drawing.shapes.map((shape, i) => (
        <ShapeView
          key={i}
          shape={shape}
          lit={shape.of !== undefined && (isLit?.(shape.of) ?? false)}
          chosen={shape.of !== undefined && shape.of === chosen}
          onPick={onPick}
        />
      ))}
    </svg>
  );
}

interface ShapeViewProps {
  readonly shape: Shape;
  readonly lit: boolean;
  readonly chosen: boolean;
  readonly onPick: DrawingViewProps['onPick'];
}
function ShapeView({ shape, lit, chosen, onPick }: ShapeViewProps) {
  const { of } = shape;
  const pick = of === undefined || onPick === undefined ? undefined : () => onPick(of);
  const marks = [lit ? 'lit' : '', chosen ? 'chosen' : '', pick ? 'pickable' : ''];
  const classes = [`dr-${shape.role.replace(' ', '-')}`, ...marks];
  if (shape.type === 'path')
    return <path className={[...classes, shape.tone ?? ''].filter(Boolean).join(' ')} d={shape.d} onClick={pick} />;
  const { x, y, anchor, turned, text } = shape;
  return (
    <text
      className={classes.filter(Boolean).join(' ')}
      x={x}
      y={y}
      textAnchor={anchor}
      transform={turned ? `rotate(-90 ${x} ${y})` : undefined}
      onClick={pick}
    >
      {text}
    </text>
  );
}
