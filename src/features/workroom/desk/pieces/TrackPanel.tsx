import { Icon } from '@/components/Icon';
import { changeTrack, insertTrack, moveTrack, removeTrack, type Axis } from '@/features/projects/grid-edits';
import { usersOfTrack } from '@/features/projects/piece-edits';
import type { GridSelection } from '@/features/projects/piece-faults';
import { NamePlate } from '../NamePlate';
import { TakeOut } from '../TakeOut';
import { orNothing } from '../fields';
import { PieceFormula } from './PieceFormula';
import { usePiece, usePieceDesk } from './piece-context';

export interface TrackPanelProps {
  readonly axis: Axis;
  readonly index: number;
  readonly onSelect: (selection: GridSelection | null) => void;
}

/** What else the chosen column or row has: its name, when it is there, its place among the others. */
export function TrackPanel({ axis, index, onSelect }: TrackPanelProps) {
  const { store, pattern } = usePieceDesk();
  const { piece, edit } = usePiece('grid');
  const track = piece[axis][index];
  if (track === undefined) return null;
  const one = axis === 'columns' ? 'column' : 'row';
  const [before, after] = axis === 'columns' ? ['left', 'right'] : ['up', 'down'];
  const move = (by: 1 | -1) => {
    edit(null, (now) => moveTrack(now, { axis, index }, by));
    onSelect({ is: 'track', axis, index: index + by });
  };
  const insert = (at: number) => {
    edit(null, (now) => insertTrack(now, { axis, index: at }, '1/2 in'));
    onSelect({ is: 'track', axis, index: at });
  };
  return (
    <section className="cell-panel" aria-label={`${one} ${track.name}`}>
      <div className="field-row">
        <NamePlate store={store} named={{ what: 'track', piece: piece.name, from: track.name }} what={one} />
        <PieceFormula
          label="Only when"
          of={`${one} ${track.name}`}
          value={track.when}
          at={`${one}, “${track.name}”, when`}
          onChange={(when) =>
            edit(`${axis}.${index}.when`, (now) => changeTrack(now, { axis, index }, { when: orNothing(when) }))
          }
        />
      </div>
      <div className="measure-deeds">
        <button type="button" className="text-button small" onClick={() => insert(index)}>
          <Icon name="plus" /> {one} before
        </button>
        <button type="button" className="text-button small" onClick={() => insert(index + 1)}>
          <Icon name="plus" /> {one} after
        </button>
        <button type="button" className="text-button small" disabled={index === 0} onClick={() => move(-1)}>
          Move {before}
        </button>
        <button
          type="button"
          className="text-button small"
          disabled={index === piece[axis].length - 1}
          onClick={() => move(1)}
        >
          Move {after}
        </button>
        {piece[axis].length < 2 ? null : (
          <TakeOut
            key={track.name}
            usersOf={() => usersOfTrack(pattern, piece.name, track.name)}
            onTake={() => {
              edit(null, (now) => removeTrack(now, { axis, index }));
              onSelect(null);
            }}
          />
        )}
      </div>
    </section>
  );
}
