import { Icon } from '@/components/Icon';
import { keyOf, type GridPieceDef } from '@/engine';
import { withList, type CellKind } from '@/features/projects/grid-edits';
import { removedAt, replacedAt } from '@/features/projects/list-edits';
import { FEATURES, type FeatureField, type FeatureList, type Features, type FeatureSpec } from './features';
import { OptionField, TextField } from '../fields';
import { PieceFormula } from './PieceFormula';
import { usePiece } from './piece-context';

const LISTS = Object.keys(FEATURES) as FeatureList[];

/** What is cut into a cell, rounded off it or done to it, and what may be added. */
export function CellFeatures({ cell, kind }: { readonly cell: string; readonly kind: CellKind }) {
  return (
    <div className="cell-features">
      {LISTS.map((list) => (
        <FeatureItems key={list} spec={FEATURES[list] as FeatureSpec<FeatureList>} cell={cell} />
      ))}
      <div className="measure-deeds">
        {LISTS.map((list) => (
          <AddFeature key={list} spec={FEATURES[list] as FeatureSpec<FeatureList>} cell={cell} kind={kind} />
        ))}
      </div>
    </div>
  );
}

type Item = Features[FeatureList];
const itemsOf = (piece: GridPieceDef, list: FeatureList): readonly Item[] => (piece[list] ?? []) as readonly Item[];
const withItems = (piece: GridPieceDef, list: FeatureList, items: readonly Item[]): GridPieceDef =>
  withList(piece, list, items as never);

function AddFeature({
  spec,
  cell,
  kind,
}: {
  readonly spec: FeatureSpec<FeatureList>;
  readonly cell: string;
  readonly kind: CellKind;
}) {
  const { piece, edit } = usePiece('grid');
  const items = itemsOf(piece, spec.list);
  const has = items.some((item) => keyOf(item.cell) === keyOf(cell));
  if (!spec.on.includes(kind) || (spec.single && has)) return null;
  const taken = (piece.edges ?? []).map((edge) => edge.name);
  return (
    <button
      type="button"
      className="text-button small"
      onClick={() =>
        edit(null, (now) => withItems(now, spec.list, [...itemsOf(now, spec.list), spec.fresh(cell, taken)]))
      }
    >
      <Icon name="plus" /> {spec.add}
    </button>
  );
}

function FeatureItems({ spec, cell }: { readonly spec: FeatureSpec<FeatureList>; readonly cell: string }) {
  const { piece, edit } = usePiece('grid');
  return itemsOf(piece, spec.list).map((item, index) => {
    if (keyOf(item.cell) !== keyOf(cell)) return null;
    const change = (field: string | null, next: Item) =>
      edit(field === null ? null : `${spec.list}.${index}.${field}`, (now) =>
        withItems(now, spec.list, replacedAt(itemsOf(now, spec.list), index, next)),
      );
    return (
      <div key={index} className="feature" role="group" aria-label={`${spec.heading} of ${cell}`}>
        <h4>
          {spec.heading}
          <button
            type="button"
            className="text-button small"
            onClick={() => edit(null, (now) => withItems(now, spec.list, removedAt(itemsOf(now, spec.list), index)))}
          >
            Take it out
          </button>
        </h4>
        <div className="field-row">
          {spec.fields.map((field) => (
            <FeatureInput
              key={field.label}
              field={field}
              item={item}
              of={`${spec.heading.toLowerCase()} of ${cell}`}
              at={spec.place(item)}
              onChange={(next) => change(typeof field.is === 'string' ? field.label : null, next)}
            />
          ))}
        </div>
      </div>
    );
  });
}

interface FeatureInputProps {
  readonly field: FeatureField<Item>;
  readonly item: Item;
  readonly of: string;
  readonly at: string;
  readonly onChange: (item: Item) => void;
}
function FeatureInput({ field, item, of, at, onChange }: FeatureInputProps) {
  const value = field.get(item) ?? '';
  const set = (next: string) => onChange(field.set(item, next));
  if (field.is === 'name') return <TextField label={field.label} of={of} value={value} onChange={set} />;
  if (field.is !== 'formula')
    return (
      <OptionField
        label={field.label}
        of={of}
        value={value}
        options={field.is.map((word) => ({ value: word }))}
        onChange={set}
      />
    );
  const isWhen = field.label === 'Only when';
  return (
    <PieceFormula
      label={field.label}
      of={of}
      value={value}
      at={isWhen ? `${at}, when` : at}
      shared={!isWhen}
      onChange={set}
    />
  );
}
