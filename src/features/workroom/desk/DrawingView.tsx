import type { Drawing, Shape } from '@/engine';

export interface DrawingViewProps {
  readonly drawing: Drawing;
  /** Which shapes to light, by what they are of. */
  readonly isLit?: (of: string) => boolean;
  readonly className?: string;
}

/** A drawing as live SVG, so that parts of it can be lit. The classes are those of src/styles/drawing.css. */
export function DrawingView({ drawing, isLit, className }: DrawingViewProps) {
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
        <ShapeView key={i} shape={shape} lit={shape.of !== undefined && (isLit?.(shape.of) ?? false)} />
      ))}
    </svg>
  );
}

function ShapeView({ shape, lit }: { readonly shape: Shape; readonly lit: boolean }) {
  const classes = [`dr-${shape.role.replace(' ', '-')}`, lit ? 'lit' : ''];
  if (shape.type === 'path')
    return <path className={[...classes, shape.tone ?? ''].filter(Boolean).join(' ')} d={shape.d} />;
  const { x, y, anchor, turned, text } = shape;
  return (
    <text
      className={classes.filter(Boolean).join(' ')}
      x={x}
      y={y}
      textAnchor={anchor}
      transform={turned ? `rotate(-90 ${x} ${y})` : undefined}
    >
      {text}
    </text>
  );
}
