import { useEffect, useState } from 'react';
import useSWR from 'swr';
import { SaveWords } from '@/features/workroom/desk/SaveWords';
import type { MailingView } from '../mailing-view';
import { DraftForm } from './DraftForm';
import { fetchMailing } from './mailing-api';
import { Preview } from './Preview';
import { SendingDesk } from './SendingDesk';
import { SendPanel } from './SendPanel';
import { useMailingDraft } from './use-mailing-draft';
import { figure, people } from './words';

export interface MailingDeskProps {
  readonly start: MailingView;
  /** The author's own units, for the first look. */
  readonly units: 'in' | 'mm' | 'cm';
}

const EVERY: Readonly<Record<MailingView['state'], number>> = {
  draft: 0,
  preparing: 1000,
  sending: 1000,
  paused: 5000,
  done: 0,
  cancelled: 0,
};

/** The mailing of an edition: written and tested while it is a draft, watched while it goes. */
export function MailingDesk({ start, units }: MailingDeskProps) {
  const {
    data = start,
    error,
    mutate,
  } = useSWR<MailingView, Error>(`/api/mailings/${start.id}`, fetchMailing, {
    fallbackData: start,
    keepPreviousData: true,
    refreshInterval: (view) => EVERY[(view ?? start).state],
  });
  const changed = (view?: MailingView) => void mutate(view, { revalidate: view === undefined });

  return (
    <>
      {data.state === 'draft' || data.sending === null ? (
        <Draft view={data} units={units} onChanged={changed} />
      ) : (
        <SendingDesk view={data} sending={data.sending} onChanged={changed} />
      )}
      {error ? (
        <p className="problem mailing-trouble" role="alert">
          What you see may be old: {error.message}
        </p>
      ) : null}
    </>
  );
}

function Draft({
  view,
  units,
  onChanged,
}: {
  readonly view: MailingView;
  readonly units: MailingDeskProps['units'];
  readonly onChanged: (view?: MailingView) => void;
}) {
  const draft = useMailingDraft(view, onChanged);
  const [troubled, setTroubled] = useState('');
  // "Saved 4 s ago" depends on the clock: the server leaves it to the browser.
  const [here, setHere] = useState(false);
  useEffect(() => setHere(true), []);
  const { people: count, leftOut } = view.audience;
  const { status, revision } = draft.save;
  return (
    <>
      <div className="mailing-lead">
        <p className="soft">
          Edition {view.edition} is published. The mail goes to <b>{people(count)}</b> who confirmed
          {leftOut > 0 ? `; ${figure(leftOut)} who left or were refused before are not written to` : ''}.
        </p>
        {here ? <SaveWords state={draft.save} /> : null}
      </div>
      {status.kind === 'conflict' ? (
        <div className="problem mailing-conflict" role="alert">
          <p>
            This mailing was changed from another place. Nothing was overwritten, and nothing more is saved until you
            choose.
          </p>
          <div className="send-buttons">
            <button type="button" className="btn" onClick={draft.keepMine}>
              Keep what stands here
            </button>
            <button
              type="button"
              className="btn"
              onClick={() => draft.takeOther().catch((problem: Error) => setTroubled(problem.message))}
            >
              Take the other
            </button>
          </div>
          {troubled ? <p className="error">{troubled}</p> : null}
        </div>
      ) : null}
      <div className="paper mailing-desk">
        <div className="ruled" aria-hidden="true" />
        <div className="mailing-left">
          <DraftForm view={view} draft={draft} />
          <SendPanel view={view} draft={draft} onChanged={onChanged} />
        </div>
        <Preview view={view} revision={revision} subject={draft.input.subject} units={units} />
      </div>
    </>
  );
}
