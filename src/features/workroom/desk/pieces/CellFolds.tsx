import { Icon } from '@/components/Icon';
import { keyOf, type LineDef } from '@/engine';
import { linesBetween, withList, type Neighbour } from '@/features/projects/grid-edits';
import { removedAt, replacedAt } from '@/features/projects/list-edits';
import { OptionField, orNothing } from '../fields';
import { PieceFormula } from './PieceFormula';
import { usePieceDesk } from './piece-context';
import { changePiece } from '@/features/projects/piece-edits';

type LineKind = LineDef['is'];
const KINDS: readonly { readonly value: LineKind | 'usual'; readonly label: string }[] = [
  { value: 'usual', label: 'usual (valley, 90°)' },
  { value: 'valley', label: 'valley fold' },
  { value: 'mountain', label: 'mountain fold' },
  { value: 'slit', label: 'slit' },
  { value: 'nothing', label: 'no line at all' },
];

/** The lines between a cell and what it touches, where they are not the usual ones. */
export function CellFolds({
  cell,
  around,
}: {
  readonly cell: string;
  readonly around: readonly Pick<Neighbour, 'name'>[];
}) {
  const { piece, store } = usePieceDesk();
  if (around.length === 0 || (piece.builder !== 'grid' && piece.builder !== 'outline')) return null;
  const setLines = (field: string | null, change: (lines: readonly LineDef[]) => readonly LineDef[]) =>
    store.editPattern(field === null ? null : `${piece.name}.${field}`, (pattern) =>
      changePiece(pattern, piece.name, (one) =>
        one.builder === 'grid' || one.builder === 'outline'
          ? withList<typeof one, 'lines'>(one, 'lines', change(one.lines ?? []))
          : one,
      ),
    );
  return (
    <div className="cell-lines">
      <h4>Folds</h4>
      <ul>
        {around.map(({ name }) => {
          const lines = linesBetween(piece, cell, name);
          const of = `fold between ${cell} and ${name}`;
          const add = (is: LineKind) => setLines(null, (all) => [...all, { between: [cell, name], is }]);
          if (lines.length === 0)
            return (
              <li key={name}>
                <OptionField
                  label={`To ${name}`}
                  value={'usual' as LineKind | 'usual'}
                  options={KINDS}
                  onChange={(is) => (is === 'usual' ? undefined : add(is))}
                />
              </li>
            );
          return lines.map(({ line, index }, nth) => {
            const change = (field: string | null, part: Partial<LineDef>) =>
              setLines(field === null ? null : `line.${index}.${field}`, (all) =>
                replacedAt(all, index, { ...line, ...part }),
              );
            return (
              <li key={`${name} ${index}`} className="field-row own-line">
                <OptionField
                  label={nth === 0 ? `To ${name}` : `Else, to ${name}`}
                  value={line.is as LineKind | 'usual'}
                  options={KINDS}
                  onChange={(is) =>
                    is === 'usual' ? setLines(null, (all) => removedAt(all, index)) : change(null, { is })
                  }
                />
                {line.is === 'valley' || line.is === 'mountain' ? (
                  <>
                    <PieceFormula
                      label="Turn"
                      of={of}
                      value={line.angle ?? '90°'}
                      at={`line ${index + 1}`}
                      onChange={(angle) => change('angle', { angle: angle === '90°' ? undefined : angle })}
                    />
                    <PieceFormula
                      label="Shown turned"
                      of={of}
                      value={line.shown}
                      at={`line ${index + 1}, shown`}
                      onChange={(shown) => change('shown', { shown: orNothing(shown) })}
                    />
                  </>
                ) : null}
                <PieceFormula
                  label="Only when"
                  of={of}
                  value={line.when}
                  at={`line ${index + 1}, when`}
                  onChange={(when) => change('when', { when: orNothing(when) })}
                />
                {nth === lines.length - 1 && line.when !== undefined ? (
                  <button type="button" className="text-button small" onClick={() => add('valley')}>
                    <Icon name="plus" /> Another, for when it does not hold
                  </button>
                ) : null}
              </li>
            );
          });
        })}
      </ul>
    </div>
  );
}

/** Cells as an outline has them: every other panel. */
export const otherPanels = (names: readonly string[], own: string): readonly { readonly name: string }[] =>
  names.filter((name) => keyOf(name) !== keyOf(own)).map((name) => ({ name }));
