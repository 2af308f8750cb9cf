import { useStore } from '@nanostores/react';
import { Icon } from '@/components/Icon';
import { keyOf, panelNames, type Axis, type Placement } from '@/engine';
import { place } from '@/features/projects/piece-edits';
import { removedAt, replacedAt } from '@/features/projects/list-edits';
import { speaksOf } from '@/features/projects/piece-faults';
import { LabelledFormula, OptionField, orNothing } from '../fields';
import { usePieceDesk } from './piece-context';

const AXES: readonly { readonly value: Axis; readonly label: string }[] = [
  { value: '+x', label: 'to the right' },
  { value: '-x', label: 'to the left' },
  { value: '+y', label: 'to the back' },
  { value: '-y', label: 'to the front' },
  { value: '+z', label: 'up' },
  { value: '-z', label: 'down' },
];
const PLACES = ['To the right', 'To the back', 'Up'] as const;

/** Where the piece stands in the folded picture: one panel is placed, the others fold from it. */
export function Placements() {
  const { store, pattern, piece } = usePieceDesk();
  if (piece.builder === 'layer')
    return <p className="small soft">A layer stands where the piece stands that it is glued on.</p>;
  const own = pattern.assembly.flatMap((placement, index) =>
    keyOf(placement.piece) === keyOf(piece.name) ? [{ placement, index }] : [],
  );
  return (
    <details className="placements" open={own.length === 0}>
      <summary>
        In the folded picture{' '}
        <span className="soft">
          {own.length === 0 ? 'it stands nowhere yet' : own.length === 1 ? 'once' : `${own.length} times`}
        </span>
      </summary>
      {own.map(({ placement, index }) => (
        <PlacementFields key={index} placement={placement} index={index} />
      ))}
      <button
        type="button"
        className="text-button small"
        onClick={() => store.editPattern(null, (now) => place(now, piece))}
      >
        <Icon name="plus" /> {own.length === 0 ? 'Stand it there' : 'Once more'}
      </button>
    </details>
  );
}

/** Across and along never run the same way: the other one makes room. */
function turned(placement: Placement, part: Partial<Pick<Placement, 'across' | 'along'>>): Placement {
  const next = { ...placement, ...part };
  if (next.across[1] !== next.along[1]) return next;
  const free: Axis = next.across[1] === 'y' ? '-z' : '-y';
  return part.across === undefined
    ? { ...next, across: free === '-y' && next.along[1] !== 'x' ? '+x' : free }
    : { ...next, along: free };
}

function PlacementFields({ placement, index }: { readonly placement: Placement; readonly index: number }) {
  const { store, piece } = usePieceDesk();
  const replace = (field: string | null, next: Placement) =>
    store.editPattern(field === null ? null : `assembly.${index}.${field}`, (now) => ({
      ...now,
      assembly: replacedAt(now.assembly, index, next),
    }));
  const change = (field: string | null, part: Partial<Placement>) => replace(field, { ...placement, ...part });
  const of = `place ${index + 1} of ${piece.name}`;
  return (
    <div className="feature" role="group" aria-label={of}>
      <div className="field-row">
        <OptionField
          label="Panel that is placed"
          of={of}
          value={keyOf(placement.root)}
          options={[...new Set([...panelNames(piece), keyOf(placement.root)])].map((name) => ({ value: name }))}
          onChange={(root) => change(null, { root })}
        />
        {(['across', 'along'] as const).map((key) => (
          <OptionField
            key={key}
            label={`Its ${key} runs`}
            of={of}
            value={placement[key]}
            options={AXES}
            onChange={(axis) => replace(null, turned(placement, { [key]: axis }))}
          />
        ))}
      </div>
      <div className="field-row">
        {PLACES.map((label, axis) => (
          <PlaceFormula
            key={label}
            {...{ label, of, index }}
            value={placement.at[axis] ?? ''}
            onChange={(value) => {
              const [x, y, z] = placement.at;
              const at = [axis === 0 ? value : x, axis === 1 ? value : y, axis === 2 ? value : z] as const;
              change(`at.${axis}`, { at });
            }}
          />
        ))}
        <PlaceFormula
          label="Only when"
          {...{ of, index }}
          value={placement.when ?? ''}
          onChange={(when) => change('when', { when: orNothing(when) })}
        />
      </div>
      <div className="measure-deeds">
        <label className="check tight">
          <input
            type="checkbox"
            checked={placement.over ?? false}
            onChange={(event) => change(null, { over: event.currentTarget.checked || undefined })}
          />
          <span>The other face is the outside</span>
        </label>
        <button
          type="button"
          className="text-button small"
          onClick={() => store.editPattern(null, (now) => ({ ...now, assembly: removedAt(now.assembly, index) }))}
        >
          Take it out of the picture
        </button>
      </div>
    </div>
  );
}

interface PlaceFormulaProps {
  readonly label: string;
  readonly of: string;
  readonly index: number;
  readonly value: string;
  readonly onChange: (value: string) => void;
}
/** A formula of the folded picture, whose faults stand with the picture's places and not with the piece. */
function PlaceFormula({ label, of, index, value, onChange }: PlaceFormulaProps) {
  const { store, names, lit } = usePieceDesk();
  const { compiled } = useStore(store.$work);
  const place = `assembly ${index + 1}${label === 'Only when' ? ', when' : ''}`;
  const own = (compiled.ok ? [] : compiled.faults).filter((fault) => fault.where === place && speaksOf(fault, value));
  return <LabelledFormula {...{ label, of, value, names, lit, onChange }} faults={own} />;
}
