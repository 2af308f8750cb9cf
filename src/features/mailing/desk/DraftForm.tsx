import { Field } from '@/components/Field';
import { Icon } from '@/components/Icon';
import { greet, NAME } from '../compose/greeting';
import { EXCERPT_LIMIT, GREETING_LIMIT, SUBJECT_LIMIT } from '../mailing-text-input';
import type { MailingView } from '../mailing-view';
import type { MailingDraft } from './use-mailing-draft';

const MOST_KB = 90;

/** What the author writes, and what goes in by itself. */
export function DraftForm({ view, draft }: { readonly view: MailingView; readonly draft: MailingDraft }) {
  const { input, change } = draft;
  const weight = Math.ceil((view.bytes ?? 0) / 1000);
  const bare = greet(input.greeting, null);
  return (
    <div className="mail-form">
      <dl className="mail-from">
        <dt>From</dt>
        <dd>{view.from.name}</dd>
        <dt>Address</dt>
        <dd>{view.from.address}</dd>
        <dt>Replies</dt>
        <dd>{view.replyTo}</dd>
      </dl>
      <Field label="Subject" hint={`${input.subject.length} of ${SUBJECT_LIMIT} characters`}>
        {(control) => (
          <input
            {...control}
            className="input"
            maxLength={SUBJECT_LIMIT}
            value={input.subject}
            onChange={(event) => change({ subject: event.target.value })}
          />
        )}
      </Field>
      <Field
        label="Greeting"
        hint={
          input.greeting.includes(NAME)
            ? `${NAME} becomes the name; without one: “${bare}”`
            : `Put ${NAME} where the subscriber's name belongs.`
        }
      >
        {(control) => (
          <input
            {...control}
            className="input"
            maxLength={GREETING_LIMIT}
            value={input.greeting}
            onChange={(event) => change({ greeting: event.target.value })}
          />
        )}
      </Field>
      <Field label="First words" hint="Also shown beside the subject. A blank line begins a paragraph.">
        {(control) => (
          <textarea
            {...control}
            className="input"
            rows={5}
            maxLength={EXCERPT_LIMIT}
            value={input.excerpt}
            onChange={(event) => change({ excerpt: event.target.value })}
          />
        )}
      </Field>
      <fieldset className="mail-parts">
        <legend className="label">What goes in</legend>
        <ul>
          <li>
            <label>
              <input
                type="checkbox"
                checked={view.hasHero && input.withHero}
                disabled={!view.hasHero}
                onChange={(event) => change({ withHero: event.target.checked })}
              />
              <span>
                Picture of the box
                <span className="hint">
                  {view.hasHero ? `the photo of edition ${view.edition}, with its words` : 'this edition has no photo'}
                </span>
              </span>
            </label>
          </li>
          {view.edition > 1 ? (
            <Always name="Correction note" what={`for those who have cut edition ${view.edition - 1}`} />
          ) : null}
          <Always name="Finished size" what="in the units that each subscriber chose" />
          <Always name="Link to make it at their size" what="goes straight there; clicks are not counted" />
          <Always name="Why they get this, and the way out" what="in both parts" />
        </ul>
      </fieldset>
      <p className="mail-weight">
        <span className="label">Weight</span>
        <span className={weight > MOST_KB ? 'error' : 'hint'}>
          {weight} of {MOST_KB} kB
          {weight > MOST_KB ? ': too much, some programs would cut off its end' : ', nothing will be cut off'}
        </span>
        <meter
          className="mail-meter"
          min={0}
          max={MOST_KB}
          high={MOST_KB * 0.9}
          value={Math.min(weight, MOST_KB)}
          aria-label="Weight of the mail"
        />
      </p>
    </div>
  );
}

function Always({ name, what }: { readonly name: string; readonly what: string }) {
  return (
    <li>
      <span className="always">
        <Icon name="lock" label="Always in" />
        <span>
          {name}
          <span className="hint">{what}</span>
        </span>
      </span>
    </li>
  );
}
