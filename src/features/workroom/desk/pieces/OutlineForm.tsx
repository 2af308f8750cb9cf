import { useId } from 'react';
import { Icon } from '@/components/Icon';
import { explain, keyOf, type OutlinePanelDef, type OutlinePieceDef } from '@/engine';
import { withList } from '@/features/projects/grid-edits';
import { freeName, removedAt, replacedAt } from '@/features/projects/list-edits';
import { faultsIn } from '@/features/projects/piece-faults';
import { NamePlate } from '../NamePlate';
import { CellFolds, otherPanels } from './CellFolds';
import { OptionField, TextField, orNothing } from '../fields';
import { PieceFormula } from './PieceFormula';
import { usePiece, usePieceDesk } from './piece-context';

/** Points by their place, and panels as ways from point to point. */
export function OutlineForm() {
  return (
    <div className="shape-form">
      <Points />
      <Panels />
      <Slots />
      <Edges />
    </div>
  );
}

function Points() {
  const { piece, edit } = usePiece('outline');
  const change = (index: number, key: 'name' | 'across' | 'along', value: string) =>
    edit(`point.${index}.${key}`, (now) => {
      const point = now.points[index];
      return point ? { ...now, points: replacedAt(now.points, index, { ...point, [key]: value }) } : now;
    });
  return (
    <>
      <h4>Points, from the left and from the top</h4>
      <ul className="plain-list">
        {piece.points.map((point, index) => (
          <li key={index} className="field-row point">
            <TextField
              label="Called"
              of={`point ${index + 1}`}
              value={point.name}
              onChange={(v) => change(index, 'name', v)}
            />
            {(['across', 'along'] as const).map((key) => (
              <PieceFormula
                key={key}
                label={key === 'across' ? 'From left' : 'From top'}
                of={`point ${point.name}`}
                value={point[key]}
                at={`point “${point.name}”`}
                shared
                onChange={(value) => change(index, key, value)}
              />
            ))}
            <button
              type="button"
              className="text-button small"
              onClick={() => edit(null, (now) => ({ ...now, points: removedAt(now.points, index) }))}
            >
              Take out<span className="visually-hidden"> point {point.name}</span>
            </button>
          </li>
        ))}
      </ul>
      <button
        type="button"
        className="text-button small"
        onClick={() =>
          edit(null, (now) => ({
            ...now,
            points: [...now.points, { name: nextPoint(now), across: '0 in', along: '0 in' }],
          }))
        }
      >
        <Icon name="plus" /> Point
      </button>
    </>
  );
}
const LETTERS = 'abcdefghijklmnopqrstuvwxyz';
function nextPoint({ points }: OutlinePieceDef): string {
  const taken = points.map(({ name }) => keyOf(name));
  return [...LETTERS].find((letter) => !taken.includes(letter)) ?? freeName('point', taken);
}

function Panels() {
  const { store, faults } = usePieceDesk();
  const { piece, edit } = usePiece('outline');
  const id = useId();
  const change = (field: string | null, index: number, part: Partial<OutlinePanelDef>) =>
    edit(field === null ? null : `panel.${index}.${field}`, (now) => {
      const panel = now.panels[index];
      return panel ? { ...now, panels: replacedAt(now.panels, index, { ...panel, ...part }) } : now;
    });
  const names = piece.panels.map(({ name }) => name);
  return (
    <>
      {piece.panels.map((panel, index) => {
        const at = `panel “${panel.name}”`;
        const own = faultsIn(faults, { piece: piece.name, at });
        return (
          <section key={index} className="cell-panel" aria-label={`Panel ${panel.name}`}>
            <NamePlate store={store} named={{ what: 'cell', piece: piece.name, from: panel.name }} what="panel" />
            <div className="field-row">
              <OptionField
                label="Is a"
                value={panel.role ?? 'panel'}
                options={[{ value: 'panel' }, { value: 'tab', label: 'glued tab' }]}
                onChange={(role) => change(null, index, { role: role === 'tab' ? 'tab' : undefined })}
              />
              <PieceFormula
                label="Bent to"
                of={panel.name}
                value={panel.bent}
                at={`${at}, bent`}
                onChange={(bent) => change('bent', index, { bent: orNothing(bent) })}
              />
              <PieceFormula
                label="Only when"
                of={panel.name}
                value={panel.when}
                at={`${at}, when`}
                onChange={(when) => change('when', index, { when: orNothing(when) })}
              />
            </div>
            <div className="desk-field">
              <label className="small soft" htmlFor={`${id}-${index}`}>
                Way round it, clockwise, a point a line; “b bowed out by 2 in” goes to b along an arc
              </label>
              <textarea
                id={`${id}-${index}`}
                className="input loop"
                rows={Math.max(3, panel.loop.length)}
                value={panel.loop.join('\n')}
                aria-invalid={own.length > 0 ? true : undefined}
                onChange={(event) =>
                  change('loop', index, { loop: event.currentTarget.value.split('\n').slice(0, 200) })
                }
                onBlur={() => {
                  const loop = panel.loop.filter((stop) => stop.trim() !== '');
                  if (loop.length !== panel.loop.length) change('loop', index, { loop });
                }}
              />
              {own.map((fault) => (
                <p key={fault.found} className="fault-words">
                  {explain(fault)}
                </p>
              ))}
            </div>
            <CellFolds cell={keyOf(panel.name)} around={otherPanels(names, panel.name)} />
            {piece.panels.length < 2 ? null : (
              <button
                type="button"
                className="text-button small"
                onClick={() => edit(null, (now) => ({ ...now, panels: removedAt(now.panels, index) }))}
              >
                Take {panel.name} out
              </button>
            )}
          </section>
        );
      })}
      <button
        type="button"
        className="text-button small"
        onClick={() =>
          edit(null, (now) => ({
            ...now,
            panels: [
              ...now.panels,
              { name: freeName('panel', names), loop: now.points.slice(0, 3).map(({ name }) => name) },
            ],
          }))
        }
      >
        <Icon name="plus" /> Panel
      </button>
    </>
  );
}

const SLOT = [
  ['across', 'Middle from left'],
  ['along', 'Middle from top'],
  ['width', 'Wide'],
  ['height', 'Tall'],
] as const;
function Slots() {
  const { piece, edit } = usePiece('outline');
  const slots = piece.slots ?? [];
  return (
    <>
      {slots.map((slot, index) => {
        const change = (field: string | null, part: Partial<typeof slot>) =>
          edit(field === null ? null : `slot.${index}.${field}`, (now) =>
            withList(now, 'slots', replacedAt(now.slots ?? [], index, { ...slot, ...part })),
          );
        return (
          <div key={index} className="feature">
            <h4>
              Slot or window
              <button
                type="button"
                className="text-button small"
                onClick={() => edit(null, (now) => withList(now, 'slots', removedAt(now.slots ?? [], index)))}
              >
                Take it out
              </button>
            </h4>
            <div className="field-row">
              <OptionField
                label="In panel"
                value={keyOf(slot.cell)}
                options={piece.panels.map(({ name }) => ({ value: keyOf(name) }))}
                onChange={(cell) => change(null, { cell })}
              />
              {SLOT.map(([key, label]) => (
                <PieceFormula
                  key={key}
                  label={label}
                  of={`slot of ${slot.cell}`}
                  value={slot[key]}
                  at={`slot of “${slot.cell}”`}
                  shared
                  onChange={(value) => change(key, { [key]: value })}
                />
              ))}
              <PieceFormula
                label="Only when"
                of={`slot of ${slot.cell}`}
                value={slot.when}
                at={`slot of “${slot.cell}”, when`}
                onChange={(when) => change('when', { when: orNothing(when) })}
              />
            </div>
          </div>
        );
      })}
      <button
        type="button"
        className="text-button small"
        onClick={() =>
          edit(null, (now) =>
            withList(now, 'slots', [
              ...(now.slots ?? []),
              { cell: now.panels[0]?.name ?? '', across: '1 in', along: '1 in', width: '1 in', height: '1/2 in' },
            ]),
          )
        }
      >
        <Icon name="plus" /> Slot or window
      </button>
    </>
  );
}

function Edges() {
  const { piece, edit } = usePiece('outline');
  const edges = piece.edges ?? [];
  const points = piece.points.map(({ name }) => ({ value: name }));
  return (
    <>
      {edges.map((edge, index) => {
        const change = (field: string | null, part: Partial<typeof edge>) =>
          edit(field === null ? null : `edge.${index}.${field}`, (now) =>
            withList(now, 'edges', replacedAt(now.edges ?? [], index, { ...edge, ...part })),
          );
        return (
          <div key={index} className="field-row">
            <TextField
              label="Edge for fits"
              of={`${index + 1}`}
              value={edge.name}
              onChange={(name) => change('name', { name })}
            />
            <OptionField
              label="Of panel"
              of={edge.name}
              value={edge.panel}
              options={piece.panels.map(({ name }) => ({ value: name }))}
              onChange={(panel) => change(null, { panel })}
            />
            <OptionField
              label="From"
              of={edge.name}
              value={edge.from}
              options={points}
              onChange={(from) => change(null, { from })}
            />
            <OptionField
              label="To"
              of={edge.name}
              value={edge.to}
              options={points}
              onChange={(to) => change(null, { to })}
            />
            <button
              type="button"
              className="text-button small"
              onClick={() => edit(null, (now) => withList(now, 'edges', removedAt(now.edges ?? [], index)))}
            >
              Take out<span className="visually-hidden"> edge {edge.name}</span>
            </button>
          </div>
        );
      })}
      <button
        type="button"
        className="text-button small"
        onClick={() =>
          edit(null, (now) =>
            withList(now, 'edges', [
              ...(now.edges ?? []),
              {
                name: freeName(
                  'edge',
                  edges.map(({ name }) => name),
                ),
                panel: now.panels[0]?.name ?? '',
                from: now.points[0]?.name ?? '',
                to: now.points[1]?.name ?? '',
              },
            ]),
          )
        }
      >
        <Icon name="plus" /> Edge for fits
      </button>
    </>
  );
}
