import { useState } from 'react';
import type { Choices, Clash } from '@/features/projects/merge';
import { wordRuns } from '@/features/projects/state-diff';
import type { Meeting } from '../saving/meeting';
import { agoWords } from './SaveWords';
import type { Saving } from './use-saving';

/** What came from another tab or person: parts to choose between, or a word that it is in. */
export function ConflictBanner({ saving }: { readonly saving: Saving }) {
  const { meeting, notice } = saving;
  return (
    <>
      {meeting === null ? null : <ClashList key={meeting.other.revision} meeting={meeting} onSettle={saving.settle} />}
      {notice === null ? null : (
        <div className="desk-banner note" role="status">
          <p>
            {notice.words} {notice.link ? <a href={notice.link.href}>{notice.link.words}</a> : null}
          </p>
          <button type="button" className="btn small-btn" onClick={saving.dismiss}>
            Close
          </button>
        </div>
      )}
    </>
  );
}

interface ClashListProps {
  readonly meeting: Meeting;
  readonly onSettle: Saving['settle'];
}

function ClashList({ meeting: { clashes, other }, onSettle }: ClashListProps) {
  const [chosen, setChosen] = useState<Choices>({});
  const [busy, setBusy] = useState(false);
  const open = clashes.filter(({ where }) => chosen[where] === undefined).length;
  const all = (side: 'mine' | 'other') => setChosen(Object.fromEntries(clashes.map(({ where }) => [where, side])));
  return (
    <div className="desk-banner problem clashes" role="alert">
      <p>
        <b>Changed in two places.</b> Revision {other.revision} was saved {agoWords(Date.now() - other.updatedAt)} from
        another tab or by another person. {clashes.length === 1 ? 'One part was' : `${clashes.length} parts were`}{' '}
        changed there and here; the rest is put together. Nothing is lost: both versions stay among the revisions.
      </p>
      <ul>
        {clashes.map((clash) => (
          <ClashChoice
            key={clash.where}
            clash={clash}
            side={chosen[clash.where]}
            onChoose={(side) => setChosen((was) => ({ ...was, [clash.where]: side }))}
          />
        ))}
      </ul>
      <div className="banner-deeds">
        <button
          type="button"
          className="tab-button small-tab"
          disabled={busy || open > 0}
          onClick={() => {
            setBusy(true);
            void onSettle(chosen).finally(() => setBusy(false));
          }}
        >
          Put together
        </button>
        {clashes.length === 1 ? null : (
          <>
            <button type="button" className="btn small-btn" onClick={() => all('mine')}>
              Mine everywhere
            </button>
            <button type="button" className="btn small-btn" onClick={() => all('other')}>
              Theirs everywhere
            </button>
          </>
        )}
        {open === 0 ? null : (
          <span className="small">{open === 1 ? 'One part to choose.' : `${open} parts to choose.`}</span>
        )}
      </div>
    </div>
  );
}

interface ClashChoiceProps {
  readonly clash: Clash;
  readonly side: Choices[string] | undefined;
  readonly onChoose: (side: Choices[string]) => void;
}

function ClashChoice({ clash: { where, mine, other, bothCanStand }, side, onChoose }: ClashChoiceProps) {
  const runs = wordRuns({ before: mine, after: other });
  const radio = (value: Choices[string], words: string) => (
    <label>
      <input type="radio" name={`clash ${where}`} checked={side === value} onChange={() => onChoose(value)} /> {words}
    </label>
  );
  return (
    <li>
      <fieldset className="clash">
        <legend>{where}</legend>
        <div className="clash-texts">
          <p>
            <b>Mine</b>
            <span className="clash-text">
              {runs.map(({ kind, text }, i) =>
                kind === 'new' ? null : kind === 'gone' ? <mark key={i}>{text}</mark> : text,
              )}
            </span>
          </p>
          <p>
            <b>Theirs</b>
            <span className="clash-text">
              {runs.map(({ kind, text }, i) =>
                kind === 'gone' ? null : kind === 'new' ? <mark key={i}>{text}</mark> : text,
              )}
            </span>
          </p>
        </div>
        <div className="clash-sides">
          {radio('mine', 'Keep mine')}
          {radio('other', 'Take theirs')}
          {bothCanStand ? radio('both', 'Both, mine first') : null}
        </div>
      </fieldset>
    </li>
  );
}
