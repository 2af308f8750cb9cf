import type { Counts } from './counts';
import type { MailingInput } from './mailing-text-input';
import type { Trouble } from './trouble';

export type MailingState = 'draft' | 'preparing' | 'sending' | 'paused' | 'done' | 'cancelled';

/** A mailing as its page shows it, from the API. Instants are milliseconds since the epoch. */
export interface MailingView extends MailingInput {
  readonly id: string;
  readonly projectId: string;
  readonly edition: number;
  readonly state: MailingState;
  readonly revision: number;
  readonly updatedAt: number;
  /** The edition has a picture that could go in. */
  readonly hasHero: boolean;
  readonly from: { readonly name: string; readonly address: string };
  readonly replyTo: string;
  /** Where a test goes: to whoever looks at the page. */
  readonly testTo: string;
  readonly testedAt: number | null;
  /** Who would get it now, while it is a draft. */
  readonly audience: { readonly people: number; readonly leftOut: number };
  /** Weight of the HTML part; null once it is being sent. */
  readonly bytes: number | null;
  readonly missing: readonly string[];
  readonly sending: SendingView | null;
}

export interface SendingView {
  readonly startedAt: number;
  readonly finishedAt: number | null;
  readonly counts: Counts;
  readonly troubles: readonly Trouble[];
  readonly pauseReason: string | null;
  /** Accepted in the last minute. */
  readonly perMinute: number;
  /** When the next of those to be tried again comes up. */
  readonly nextRetryAt: number | null;
  /** The mail server is away; when it is tried next. */
  readonly away: { readonly until: number; readonly reply: string } | null;
  /** Nothing moves though something should. */
  readonly isStuck: boolean;
}
