import { useState, type ReactNode } from 'react';
import { Dialog } from '@/components/Dialog';
import { Icon } from '@/components/Icon';
import type { IconName } from '@/components/icons';
import { TabButton } from '@/components/TabButton';
import type { MailingView, SendingView } from '../mailing-view';
import { LocalTime } from './LocalTime';
import { tell } from './mailing-api';
import { ProgressRuler } from './ProgressRuler';
import { figure, headline, progressWords, troubleWords } from './words';

interface SendingDeskProps {
  readonly view: MailingView;
  readonly sending: SendingView;
  readonly onChanged: (view?: MailingView) => void;
}

/** A mailing while it goes and afterwards: five counts that make up the total, and what became of the rest. */
export function SendingDesk({ view, sending, onChanged }: SendingDeskProps) {
  const [busy, setBusy] = useState(false);
  const [asking, setAsking] = useState(false);
  const [trouble, setTrouble] = useState('');
  const { counts, troubles, startedAt, finishedAt, away, isStuck } = sending;
  const { state } = view;
  const troubled = counts.retrying + counts.refused + counts.uncertain;
  const mayStop = state === 'preparing' || state === 'sending' || state === 'paused';

  async function press(what: 'pause' | 'resume' | 'stop'): Promise<void> {
    setBusy(true);
    const answer = await tell<MailingView>(view.id, what);
    setTrouble(answer.ok ? '' : answer.sentence);
    onChanged(answer.ok ? answer.value : undefined);
    setBusy(false);
    setAsking(false);
  }

  return (
    <section className="paper sending" aria-label="Sending">
      <div className="ruled" aria-hidden="true" />
      <div className="sending-head">
        <div>
          <p className="small soft">
            Mailing of edition {view.edition} · begun at <LocalTime at={startedAt} />
            {finishedAt === null ? null : (
              <>
                {' '}
                · ended at <LocalTime at={finishedAt} />
              </>
            )}
          </p>
          <h2>{headline(state, counts)}</h2>
          <p className={isStuck || (state === 'paused' && sending.pauseReason) ? 'problem' : 'soft'}>
            {progressWords(state, sending)}
          </p>
          {away ? (
            <p className="problem">
              The mail server does not answer; it is tried again at <LocalTime at={away.until} />. Nobody is lost by
              that. It said: {away.reply}
            </p>
          ) : null}
        </div>
        <div className="send-buttons">
          {state === 'sending' ? (
            <TabButton onClick={() => void press('pause')} disabled={busy}>
              Pause
            </TabButton>
          ) : null}
          {state === 'paused' ? (
            <TabButton onClick={() => void press('resume')} disabled={busy}>
              Carry on
            </TabButton>
          ) : null}
          {mayStop ? (
            <button type="button" className="btn" onClick={() => setAsking(true)} disabled={busy}>
              Stop for good…
            </button>
          ) : null}
        </div>
      </div>
      <p className="visually-hidden" role="status">
        {
          {
            draft: '',
            preparing: 'Fixing the list.',
            sending: 'Sending.',
            paused: 'Paused.',
            done: 'All done.',
            cancelled: 'Stopped.',
          }[state]
        }
      </p>
      {trouble ? (
        <p className="error sending-trouble" role="alert">
          {trouble}
        </p>
      ) : null}
      <div className="sending-ruler">
        <ProgressRuler counts={counts} />
      </div>
      <dl className="five">
        <Count
          icon="check"
          kind="good"
          name="Accepted by server"
          count={counts.accepted}
          what="the next server took it"
        />
        <Count
          icon="clock"
          kind="plain"
          name="Waiting"
          count={counts.waiting}
          what={counts.inFlight > 0 ? `${figure(counts.inFlight)} being handed over` : 'not tried yet'}
        />
        <Count
          icon="reset"
          kind="wait"
          name="Will retry"
          count={counts.retrying}
          what={
            sending.nextRetryAt === null ? (
              'nothing put off'
            ) : (
              <>
                next at <LocalTime at={sending.nextRetryAt} />
              </>
            )
          }
        />
        <Count icon="close" kind="bad" name="Refused" count={counts.refused} what="not tried again" />
        <Count icon="question" kind="lost" name="Uncertain" count={counts.uncertain} what="the answer was lost" />
      </dl>
      {counts.leftOut > 0 ? (
        <p className="left-out">
          {figure(counts.leftOut)} more{' '}
          {state === 'cancelled'
            ? 'were never sent: the mailing was stopped before their turn'
            : 'were left out: they left the list before their turn'}
          . With them it is {figure(counts.total)}.
        </p>
      ) : null}
      <div className="sending-more">
        <div>
          <h3>
            {troubled > 0
              ? `The ${figure(troubled)} that did not simply go`
              : state === 'done'
                ? 'Everything has simply gone'
                : 'Everything has simply gone so far'}
          </h3>
          {troubled > 0 ? (
            <div className="trouble-scroll" tabIndex={0} role="region" aria-label="What did not simply go">
              <table className="troubles">
                <thead>
                  <tr>
                    <th scope="col">What</th>
                    <th scope="col">How many</th>
                    <th scope="col">What the server said</th>
                    <th scope="col">What happens</th>
                  </tr>
                </thead>
                <tbody>
                  {troubles.map((line, i) => {
                    const { what, said, remark, happens } = troubleWords(line);
                    const [before, after] = happens.split('{time}');
                    return (
                      <tr key={i}>
                        <th scope="row">{what}</th>
                        <td>{figure(line.count)}</td>
                        <td>
                          {said}
                          {remark ? <span className="hint">{remark}</span> : null}
                        </td>
                        <td>
                          {before}
                          {after === undefined || line.nextAt === null ? null : <LocalTime at={line.nextAt} />}
                          {after}
                        </td>
                      </tr>
                    );
                  })}
                </tbody>
              </table>
            </div>
          ) : (
            <p className="soft">
              {state === 'done'
                ? 'Nothing was put off, refused or lost.'
                : 'Whatever is put off, refused or lost will be listed here, with what the server said.'}
            </p>
          )}
        </div>
        <div>
          <h3>{mayStop ? 'What the buttons do' : 'What the words mean'}</h3>
          <dl className="honest">
            {mayStop ? (
              <>
                <dt>Pause</dt>
                <dd>Up to 4 more may still go. Nobody gets it twice when you carry on.</dd>
                <dt>Stop for good</dt>
                <dd>
                  {figure(counts.waiting)} waiting and {figure(counts.retrying)} to retry are never sent.{' '}
                  {figure(counts.accepted)} stay sent. It cannot be undone, so it asks once.
                </dd>
              </>
            ) : null}
            <dt>What “accepted” means</dt>
            <dd>
              The next server took the mail. Nobody can know from here whether it was read, and we do not try to find
              out.
            </dd>
          </dl>
        </div>
      </div>
      <Dialog open={asking} title="Stop for good?" onClose={() => setAsking(false)}>
        <div className="send-ask">
          <p>
            {figure(counts.waiting)} waiting and {figure(counts.retrying)} to retry are never sent;{' '}
            {figure(counts.accepted)} stay sent. The mail of this edition cannot be begun again.
          </p>
          <div className="send-buttons">
            <TabButton className="danger" onClick={() => void press('stop')} disabled={busy}>
              Stop for good
            </TabButton>
            <button type="button" className="btn" onClick={() => setAsking(false)}>
              Go on sending
            </button>
          </div>
        </div>
      </Dialog>
    </section>
  );
}

interface CountProps {
  readonly icon: IconName;
  readonly kind: 'good' | 'plain' | 'wait' | 'bad' | 'lost';
  readonly name: string;
  readonly count: number;
  readonly what: ReactNode;
}
function Count({ icon, kind, name, count, what }: CountProps) {
  return (
    <div>
      <dt className={kind}>
        <Icon name={icon} />
        <span>{name}</span>
      </dt>
      <dd className="count">{figure(count)}</dd>
      <dd className="hint">{what}</dd>
    </div>
  );
}
