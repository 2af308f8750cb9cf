import { useState } from 'react';
import { Dialog } from '@/components/Dialog';
import { Icon } from '@/components/Icon';
import { TabButton } from '@/components/TabButton';
import type { MailingView } from '../mailing-view';
import { tell } from './mailing-api';
import type { MailingDraft } from './use-mailing-draft';
import { figure, people } from './words';

interface SendPanelProps {
  readonly view: MailingView;
  readonly draft: MailingDraft;
  readonly onChanged: (view?: MailingView) => void;
}

/** Testing, and sending after one question. */
export function SendPanel({ view, draft, onChanged }: SendPanelProps) {
  const [asking, setAsking] = useState(false);
  const [busy, setBusy] = useState(false);
  const [said, setSaid] = useState<{ readonly ok: boolean; readonly sentence: string } | null>(null);
  const { people: count, leftOut } = view.audience;
  const tested = view.testedAt !== null;

  /** What is sent is what was saved: so it is saved first. */
  async function saved(): Promise<number | null> {
    const { status, revision } = await draft.flush();
    if (status.kind === 'saved') return revision;
    setSaid({
      ok: false,
      sentence: 'sentence' in status ? status.sentence : 'It could not be saved, so nothing was sent.',
    });
    return null;
  }

  async function test(): Promise<void> {
    setBusy(true);
    setSaid(null);
    if ((await saved()) !== null) {
      const answer = await tell<{ to: string }>(view.id, 'test');
      setSaid(
        answer.ok
          ? { ok: true, sentence: `A test is on its way to ${answer.value.to}.` }
          : { ok: false, sentence: answer.sentence },
      );
      onChanged();
    }
    setBusy(false);
  }

  async function send(): Promise<void> {
    setBusy(true);
    const revision = await saved();
    if (revision !== null) {
      const answer = await tell<MailingView>(view.id, 'send', { revision });
      if (answer.ok) onChanged(answer.value);
      else setSaid({ ok: false, sentence: answer.sentence });
    }
    setBusy(false);
    setAsking(false);
  }

  return (
    <div className="send-panel">
      <ul className="send-checks">
        {view.missing.map((sentence) => (
          <Check key={sentence} icon="warning" kind="bad" sentence={sentence} />
        ))}
        {count === 0 ? (
          <Check icon="warning" kind="bad" sentence="Nobody has confirmed yet, so there is nobody to send it to." />
        ) : null}
        {view.missing.length === 0 && count > 0 ? (
          <Check icon="check" kind="good" sentence="Both parts, HTML and plain, say the same; the way out is in" />
        ) : null}
        <Check
          icon={tested ? 'check' : 'clock'}
          kind={tested ? 'good' : 'wait'}
          sentence={tested ? 'You have sent yourself a test' : 'You have not seen a test yet'}
        />
      </ul>
      <div className="send-buttons">
        <TabButton onClick={() => void test()} disabled={busy || view.missing.length > 0}>
          <Icon name="mail" />
          Send a test to myself
        </TabButton>
        <button
          type="button"
          className="btn"
          onClick={() => setAsking(true)}
          disabled={busy || count === 0 || view.missing.length > 0}
        >
          Prepare to send…
        </button>
      </div>
      <p className="hint">The test goes to {view.testTo}. Preparing asks once more before anything goes.</p>
      <div role="status" className="send-said">
        {said ? <p className={said.ok ? 'ok' : 'error'}>{said.sentence}</p> : null}
      </div>
      <Dialog open={asking} title={`Send it to ${people(count)}?`} onClose={() => setAsking(false)}>
        <div className="send-ask">
          <p>
            “{draft.input.subject}” goes to the <b>{people(count)}</b> who confirmed
            {leftOut > 0 ? `; ${figure(leftOut)} who left or were refused before are not written to` : ''}.
          </p>
          <p>
            It can be paused and stopped, but not taken back. An edition is told of once: this is the mail of edition{' '}
            {view.edition}.
          </p>
          {tested ? null : <p className="note">You have not sent yourself a test. It takes a minute.</p>}
          <div className="send-buttons">
            <TabButton onClick={() => void send()} disabled={busy}>
              Send to {people(count)}
            </TabButton>
            <button type="button" className="btn" onClick={() => setAsking(false)}>
              Not yet
            </button>
          </div>
        </div>
      </Dialog>
    </div>
  );
}

function Check({
  icon,
  kind,
  sentence,
}: {
  readonly icon: 'check' | 'clock' | 'warning';
  readonly kind: 'good' | 'wait' | 'bad';
  readonly sentence: string;
}) {
  return (
    <li className={kind}>
      <Icon name={icon} />
      <span>{sentence}</span>
    </li>
  );
}
