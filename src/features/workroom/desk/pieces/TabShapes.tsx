import { Icon } from '@/components/Icon';
import { keyOf, type Side, type TabDef, type TabEnd } from '@/engine';
import { shapeApart, shapesOf, withList } from '@/features/projects/grid-edits';
import { removedAt, replacedAt } from '@/features/projects/list-edits';
import { orNothing } from '../fields';
import { PieceFormula } from './PieceFormula';
import { usePiece } from './piece-context';

const ENDS: Readonly<Record<Side, readonly [Side, Side]>> = {
  top: ['left', 'right'],
  bottom: ['left', 'right'],
  left: ['top', 'bottom'],
  right: ['top', 'bottom'],
};

/** How a tab or flap is shaped: as large as its cell, or tapered, shorter, toothed, rounded, of a shape of its own. */
export function TabShapes({ cell, hinge }: { readonly cell: string; readonly hinge: Side | null }) {
  const { piece, edit } = usePiece('grid');
  const shapes = shapesOf(piece, cell);
  const add = () =>
    edit(null, (now) =>
      withList(now, 'tabs', [
        ...(now.tabs ?? []),
        { cells: [cell], ...Object.fromEntries(ENDS[hinge ?? 'top'].map((end) => [end, { by: '15°' }])) },
      ]),
    );
  return (
    <div className="tab-shapes">
      <h4>Shape</h4>
      {shapes.length === 0 ? <p className="small soft">As large as its cell, with square ends.</p> : null}
      {shapes.map(({ shape, index }) => (
        <TabShape key={index} cell={cell} shape={shape} index={index} ends={ENDS[hinge ?? 'top']} />
      ))}
      {shapes.length === 0 || shapes.some(({ shape }) => shape.when !== undefined) ? (
        <button type="button" className="text-button small" onClick={add}>
          <Icon name="plus" /> {shapes.length === 0 ? 'Taper or teeth' : 'Another shape, for when it does not hold'}
        </button>
      ) : null}
    </div>
  );
}

interface TabShapeProps {
  readonly cell: string;
  readonly shape: TabDef;
  readonly index: number;
  readonly ends: readonly [Side, Side];
}
function TabShape({ cell, shape, index, ends }: TabShapeProps) {
  const { edit } = usePiece('grid');
  const at = `tabs ${index + 1}`;
  const others = shape.cells.filter((name) => keyOf(name) !== keyOf(cell));
  const change = (field: string | null, part: Partial<TabDef>) =>
    edit(field === null ? null : `${at}.${field}`, (now) =>
      withList(now, 'tabs', replacedAt(now.tabs ?? [], index, { ...shape, ...part })),
    );
  const end = (side: Side, key: keyof TabEnd, value: string) =>
    change(`${side}.${key}`, { [side]: { ...shape[side], [key]: orNothing(value) } });
  const own = (key: 'depth' | 'teeth' | 'tooth angle' | 'round', label: string, place: string) => (
    <PieceFormula
      label={label}
      of={cell}
      value={shape[key]}
      at={`${at}, ${place}`}
      onChange={(value) => change(key, { [key]: orNothing(value) })}
    />
  );
  return (
    <div className="tab-shape">
      {others.length > 0 ? (
        <p className="small soft">
          {others.join(', ')} {others.length === 1 ? 'has' : 'have'} the same shape.{' '}
          <button
            type="button"
            className="text-button small"
            onClick={() => edit(null, (now) => shapeApart(now, index, cell))}
          >
            Shape {cell} apart
          </button>
        </p>
      ) : null}
      <div className="field-row">
        {ends.flatMap((side) => [
          <PieceFormula
            key={`${side} by`}
            label={`Tapers ${side}`}
            of={cell}
            value={shape[side]?.by}
            at={`${at}, ${side}`}
            shared
            onChange={(value) => end(side, 'by', value)}
          />,
          <PieceFormula
            key={`${side} from`}
            label={`Starts in, ${side}`}
            of={cell}
            value={shape[side]?.from}
            at={`${at}, ${side}`}
            shared
            onChange={(value) => end(side, 'from', value)}
          />,
        ])}
      </div>
      <div className="field-row">
        {own('depth', 'Depth', 'depth')}
        {own('teeth', 'Teeth', 'teeth')}
        {own('tooth angle', 'Half the gap', 'tooth angle')}
        {own('round', 'Round tip', 'round')}
      </div>
      {shape.shape === undefined ? null : (
        <div className="field-row">
          {shape.shape.map((point, nth) =>
            (['Along', 'Out'] as const).map((label, axis) => (
              <PieceFormula
                key={`${nth} ${label}`}
                label={`${label} ${nth + 1}`}
                of={`corner of ${cell}`}
                value={point[axis]}
                at={`${at}, corner ${nth + 1}`}
                shared
                onChange={(value) => {
                  const moved: readonly [string, string] = axis === 0 ? [value, point[1]] : [point[0], value];
                  change(`shape.${nth}.${axis}`, { shape: replacedAt(shape.shape ?? [], nth, moved) });
                }}
              />
            )),
          )}
        </div>
      )}
      <div className="field-row">
        <PieceFormula
          label="Only when"
          of={`shape of ${cell}`}
          value={shape.when}
          at={`${at}, when`}
          onChange={(when) => change('when', { when: orNothing(when) })}
        />
      </div>
      <div className="measure-deeds">
        {shape.shape === undefined ? (
          <button
            type="button"
            className="text-button small"
            onClick={() =>
              change(null, {
                shape: [
                  ['0 in', '0 in'],
                  ['1 in', '0 in'],
                  ['1 in', '1/2 in'],
                  ['0 in', '1/2 in'],
                ],
              })
            }
          >
            Give its corners one by one
          </button>
        ) : (
          <>
            <button
              type="button"
              className="text-button small"
              onClick={() => change(null, { shape: [...(shape.shape ?? []), ['0 in', '1/4 in']] })}
            >
              <Icon name="plus" /> Corner
            </button>
            <button type="button" className="text-button small" onClick={() => change(null, { shape: undefined })}>
              Taper it instead
            </button>
          </>
        )}
        <button
          type="button"
          className="text-button small"
          onClick={() => edit(null, (now) => withList(now, 'tabs', removedAt(now.tabs ?? [], index)))}
        >
          Square it
        </button>
      </div>
    </div>
  );
}
