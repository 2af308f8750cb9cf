import type { Fault, Pattern, GridPieceDef } from '@/engine';
import { namesOf } from '@/features/projects/formula-names';
import { changeTrack } from '@/features/projects/pattern-edits';
import { usesAny, type Lit } from '@/features/projects/followers';
import { isInTrack } from '@/features/projects/proof-place';
import type { DeskStore } from './desk-store';
import { FaultWords } from './FaultWords';
import { FormulaField } from './FormulaField';

export interface TrackFieldsProps {
  readonly store: DeskStore;
  readonly piece: GridPieceDef;
  readonly pattern: Pattern;
  readonly lit: Lit | null;
  readonly faults: readonly Fault[];
}
const AXES = [
  { axis: 'columns', one: 'column', heading: 'Columns, left to right' },
  { axis: 'rows', one: 'row', heading: 'Rows, top to bottom' },
] as const;

/** The formulas that a piece's columns and rows are made of. */
export function TrackFields({ store, piece, pattern, lit, faults }: TrackFieldsProps) {
  const names = namesOf(pattern);
  return (
    <div className="tracks">
      {AXES.map(({ axis, one, heading }) => (
        <div key={axis}>
          <h3>{heading}</h3>
          <ul>
            {piece[axis].map((track, i) => {
              const own = faults.filter((fault) =>
                isInTrack(fault, { piece: piece.name, axis: one, name: track.name }),
              );
              const follows = lit !== null && usesAny(track.size, names, lit.names);
              const set = (size: string) =>
                store.editPattern(`${piece.name}.${axis}.${i}`, (now) =>
                  changeTrack(now, { piece: piece.name, axis, index: i }, { size }),
                );
              return (
                <li key={i} className={follows ? 'follows' : undefined} data-lit={follows ? '' : undefined}>
                  <span className="track-name">{track.name}</span>
                  <FormulaField
                    label={`Size of ${one} ${track.name}`}
                    value={track.size}
                    names={names}
                    lit={lit?.names ?? null}
                    faults={own}
                    onChange={set}
                  />
                  {own.length > 0 ? <FaultWords faults={own} value={track.size} onCure={set} /> : null}
                </li>
              );
            })}
          </ul>
        </div>
      ))}
    </div>
  );
}
