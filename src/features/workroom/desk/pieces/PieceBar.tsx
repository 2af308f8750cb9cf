import type { PieceDef } from '@/engine';
import { changePiece, duplicatePiece, movePiece, removePiece, usersOfPiece } from '@/features/projects/piece-edits';
import { NamePlate } from '../NamePlate';
import { TakeOut } from '../TakeOut';
import { OptionField, TextField, orNothing } from '../fields';
import { PieceFormula } from './PieceFormula';
import { usePieceDesk } from './piece-context';

const STOCKS = [{ value: 'card' }, { value: 'patterned paper' }, { value: 'greyboard' }] as const;
const LOOKS = [
  { value: 'usual' },
  { value: 'card' },
  { value: 'pages', label: 'white pages' },
  { value: 'paper', label: 'patterned paper' },
] as const;

/** What every piece has: its name, how many, of what, when, and its place among the others. */
export function PieceBar({ onPiece }: { readonly onPiece: (name: string) => void }) {
  const { store, pattern, piece } = usePieceDesk();
  const index = pattern.pieces.findIndex(({ name }) => name === piece.name);
  const change = (field: string | null, part: Partial<PieceDef>) =>
    store.editPattern(field === null ? null : `${piece.name}.${field}`, (now) =>
      changePiece(now, piece.name, (one) => ({ ...one, ...part }) as PieceDef),
    );
  const duplicate = () => {
    const copy = duplicatePiece(pattern, piece.name);
    store.editPattern(null, () => copy.pattern);
    onPiece(copy.name);
  };
  const remove = () => {
    const next = pattern.pieces[index + 1] ?? pattern.pieces[index - 1];
    store.editPattern(null, (now) => removePiece(now, piece.name));
    if (next) onPiece(next.name);
  };
  return (
    <div className="piece-bar">
      <div className="piece-bar-head">
        <NamePlate store={store} named={{ what: 'piece', from: piece.name }} what="piece" onRenamed={onPiece} />
        <div className="measure-deeds">
          <button type="button" className="text-button small" onClick={duplicate}>
            Duplicate
          </button>
          {([-1, 1] as const).map((by) => (
            <button
              key={by}
              type="button"
              className="text-button small"
              disabled={pattern.pieces[index + by] === undefined}
              onClick={() => store.editPattern(null, (now) => movePiece(now, piece.name, by))}
            >
              {by === -1 ? 'Earlier' : 'Later'}
            </button>
          ))}
          <TakeOut key={piece.name} usersOf={() => usersOfPiece(pattern, piece.name)} onTake={remove} />
        </div>
      </div>
      <div className="field-row">
        <PieceFormula
          label="How many"
          value={piece.count ?? '1'}
          at="count"
          onChange={(count) => change('count', { count: count === '1' ? undefined : count })}
        />
        <OptionField
          label="Cut from"
          value={piece.stock}
          options={STOCKS}
          onChange={(stock) => change(null, { stock })}
        />
        <PieceFormula
          label="Only when"
          value={piece.when}
          at="when"
          onChange={(when) => change('when', { when: orNothing(when) })}
        />
      </div>
      <details className="piece-remarks">
        <summary>Words for the maker, colour{piece.remarks?.length ? ` (${piece.remarks.length})` : ''}</summary>
        <TextField
          label="What geometry cannot know, a sentence a line; [[formula]] becomes a figure"
          rows={3}
          maxLength={5000}
          value={(piece.remarks ?? []).join('\n')}
          onChange={(text) => change('remarks', { remarks: text === '' ? undefined : text.split('\n').slice(0, 20) })}
        />
        <OptionField
          label="In the folded picture it looks like"
          value={piece.look ?? 'usual'}
          options={LOOKS}
          onChange={(look) => change(null, { look: look === 'usual' ? undefined : look })}
        />
      </details>
    </div>
  );
}
