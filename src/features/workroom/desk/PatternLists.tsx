import { useStore } from '@nanostores/react';
import { Icon } from '@/components/Icon';
import type { MaterialDef, NamedFormula, OrderLine, Pattern } from '@/engine';
import { namesOf } from '@/features/projects/formula-names';
import { freeName, removedAt, replacedAt } from '@/features/projects/list-edits';
import type { DeskStore } from './desk-store';
import { LabelledFormula, orNothing, TextField } from './fields';

interface ListProps {
  readonly store: DeskStore;
  readonly pattern: Pattern;
}

function useFaultsAt(store: DeskStore) {
  const { compiled } = useStore(store.$work);
  return (where: string) => (compiled.ok ? [] : compiled.faults.filter((fault) => fault.where === where));
}

const Out = ({ what, onTake }: { readonly what: string; readonly onTake: () => void }) => (
  <button type="button" className="text-button small" onClick={onTake}>
    Take out<span className="visually-hidden"> {what}</span>
  </button>
);
const More = ({ label, onAdd }: { readonly label: string; readonly onAdd: () => void }) => (
  <button type="button" className="text-button small" onClick={onAdd}>
    <Icon name="plus" /> {label}
  </button>
);

/** What readers are told of the finished box: so long, so wide, so tall, inside and outside. */
export function FinishedSizes({ store, pattern }: ListProps) {
  const faultsAt = useFaultsAt(store);
  const names = namesOf(pattern);
  const edit = (field: string | null, side: 'inside' | 'outside', sizes: readonly NamedFormula[]) =>
    store.editPattern(field, (now) => ({ ...now, finished: { ...now.finished, [side]: sizes } }));
  return (['inside', 'outside'] as const).map((side) => {
    const sizes = pattern.finished[side];
    return (
      <div key={side}>
        <h4>Finished size, {side}</h4>
        {sizes.map((size, index) => (
          <div key={index} className="field-row">
            <TextField
              label="Called"
              of={`${side} size ${index + 1}`}
              value={size.name}
              onChange={(name) => edit(`${side}.${index}.name`, side, replacedAt(sizes, index, { ...size, name }))}
            />
            <LabelledFormula
              label="Is"
              of={`${side} size ${size.name}`}
              value={size.formula}
              names={names}
              lit={null}
              faults={faultsAt(`finished ${side} “${size.name}”`)}
              onChange={(formula) =>
                edit(`${side}.${index}.formula`, side, replacedAt(sizes, index, { ...size, formula }))
              }
            />
            <Out what={`${side} size ${size.name}`} onTake={() => edit(null, side, removedAt(sizes, index))} />
          </div>
        ))}
        <More
          label={`Size ${side}`}
          onAdd={() => {
            const words = ['long', 'wide', 'tall'].filter((word) => !sizes.some(({ name }) => name === word));
            const name =
              words[0] ??
              freeName(
                'size',
                sizes.map((size) => size.name),
              );
            const asked = pattern.measures.filter(({ ask, kind }) => ask && !ask.finer && kind === undefined);
            edit(null, side, [...sizes, { name, formula: asked[sizes.length]?.name ?? '1 in' }]);
          }}
        />
      </div>
    );
  });
}

/** The order of making, which a new project's steps begin as. */
export function OrderLines({ store, pattern }: ListProps) {
  const faultsAt = useFaultsAt(store);
  const lines = pattern.order;
  const edit = (field: string | null, order: readonly OrderLine[]) =>
    store.editPattern(field, (now) => ({ ...now, order }));
  const lineOf = (says: string, when: string | undefined): OrderLine => (when === undefined ? says : { says, when });
  return (
    <div>
      <h4>Order of making, for projects that begin with it</h4>
      {lines.map((line, index) => {
        const { says, when } = typeof line === 'string' ? { says: line, when: undefined } : line;
        return (
          <div key={index} className="order-line">
            <TextField
              label={`${index + 1}.`}
              of="order of making"
              rows={2}
              maxLength={1000}
              value={says}
              onChange={(next) => edit(`order.${index}`, replacedAt(lines, index, lineOf(next, when)))}
            />
            <LabelledFormula
              label="Only when"
              of={`line ${index + 1} of the order of making`}
              value={when ?? ''}
              names={namesOf(pattern)}
              lit={null}
              faults={faultsAt(`order ${index + 1}, when`)}
              onChange={(next) => edit(`order.${index}.when`, replacedAt(lines, index, lineOf(says, orNothing(next))))}
            />
            <Out what={`line ${index + 1}`} onTake={() => edit(null, removedAt(lines, index))} />
          </div>
        );
      })}
      <More label="Line" onAdd={() => edit(null, [...lines, 'Cut and score every piece.'])} />
    </div>
  );
}

/** What making takes besides card, paper and glue. */
export function MaterialsList({ store, pattern }: ListProps) {
  const faultsAt = useFaultsAt(store);
  const list = pattern.materials ?? [];
  const names = namesOf(pattern);
  const edit = (field: string | null, materials: readonly MaterialDef[]) =>
    store.editPattern(field, (now) => ({ ...now, materials: materials.length === 0 ? undefined : materials }));
  return (
    <div>
      <h4>What else it takes: ribbon, knobs</h4>
      {list.map((material, index) => {
        const change = (field: string, part: Partial<MaterialDef>) =>
          edit(`material.${index}.${field}`, replacedAt(list, index, { ...material, ...part }));
        const at = `material “${material.name}”`;
        return (
          <div key={index} className="field-row">
            <TextField
              label="Called"
              of={`material ${index + 1}`}
              value={material.name}
              onChange={(name) => change('name', { name })}
            />
            <LabelledFormula
              label="How much"
              of={material.name}
              value={material.formula}
              {...{ names, lit: null }}
              faults={faultsAt(at)}
              onChange={(formula) => change('formula', { formula })}
            />
            <LabelledFormula
              label="Only when"
              of={material.name}
              value={material.when ?? ''}
              {...{ names, lit: null }}
              faults={faultsAt(`${at}, when`)}
              onChange={(when) => change('when', { when: orNothing(when) })}
            />
            <Out what={material.name} onTake={() => edit(null, removedAt(list, index))} />
          </div>
        );
      })}
      <More
        label="Material"
        onAdd={() =>
          edit(null, [
            ...list,
            {
              name: freeName(
                'ribbon',
                list.map(({ name }) => name),
              ),
              formula: '12 in',
            },
          ])
        }
      />
    </div>
  );
}
