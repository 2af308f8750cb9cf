import type { Counts } from '../counts';
import type { MailingState, SendingView } from '../mailing-view';
import type { Trouble } from '../trouble';

/** `1 284`, with a thin space that does not break. */
export const figure = (n: number): string => String(n).replace(/\B(?=(\d{3})+$)/g, '\u202f');

export const people = (n: number): string => `${figure(n)} ${n === 1 ? 'person' : 'people'}`;

/** The heading of the sending view. "Accepted", never "delivered": nobody can know that from here. */
export function headline(state: MailingState, { accepted, total }: Counts): string {
  const share = `${figure(accepted)} of ${figure(total)} accepted`;
  switch (state) {
    case 'draft':
    case 'preparing':
      return 'Fixing the list';
    case 'sending':
      return `Sending: ${share}`;
    case 'paused':
      return `Paused: ${share}`;
    case 'done':
      return `Done: ${share}`;
    case 'cancelled':
      return `Stopped: ${share}`;
  }
}

/** How long it will take, at the pace of the last minute; or what is in the way. */
export function progressWords(state: MailingState, { counts, perMinute, isStuck, pauseReason }: SendingView): string {
  const { waiting, retrying, uncertain } = counts;
  if (isStuck)
    return 'Nothing is moving: the mail worker seems not to be running. Start the site again, and it goes on where it was.';
  switch (state) {
    case 'draft':
    case 'preparing':
      return 'One row is made for each person, then sending begins.';
    case 'paused':
      return pauseReason ?? 'Nothing more goes until you carry on. Nobody gets it twice.';
    case 'cancelled':
      return 'What had not gone by then never goes.';
    case 'done':
      return counts.accepted === counts.total
        ? 'The next server took every one of them.'
        : 'What did not simply go stands below.';
    case 'sending': {
      if (waiting === 0)
        return retrying + uncertain > 0
          ? 'All were tried once; the rest is tried again by itself. You can leave this page.'
          : 'Almost done.';
      if (perMinute === 0) return 'Just begun. You can leave this page.';
      const minutes = Math.ceil(waiting / perMinute);
      const time = minutes <= 1 ? 'Less than a minute' : `About ${figure(minutes)} minutes`;
      return `${time} to go, at the ${figure(perMinute)} a minute of the last minute. You can leave this page.`;
    }
  }
}

export interface TroubleWords {
  readonly what: string;
  readonly said: string;
  readonly remark: string;
  /** `{time}` stands for when the next of them is tried. */
  readonly happens: string;
}

/** One line of "what did not simply go", in plain words. */
export function troubleWords({ what, reply, enhanced, suppressed, nextAt }: Trouble): TroubleWords {
  const isReply = /^\d{3}/.test(reply);
  const aboutUs = what === 'refused' && (enhanced?.startsWith('5.7.') ?? reply.startsWith('554'));
  switch (what) {
    case 'later':
      return {
        what: 'Will retry',
        said: isReply ? `“${reply}”` : 'The line broke before the mail was whole.',
        remark: '',
        happens: 'again at {time}, then less and less often, for 48 hours',
      };
    case 'refused':
      return {
        what: 'Refused',
        said: isReply ? `“${reply}”` : reply,
        remark: aboutUs ? 'about us, not about the person' : '',
        happens: suppressed ? 'not written to again, in any mailing' : 'not tried again; stays on the list',
      };
    case 'expired':
      return {
        what: 'Given up',
        said: isReply ? `“${reply}”` : 'No answer that settles it.',
        remark: '',
        happens: 'put off for 48 hours; stays on the list',
      };
    case 'uncertain':
      return {
        what: 'Uncertain',
        said: 'Took the whole mail, then the line broke.',
        remark: '',
        happens:
          nextAt === null
            ? 'left as it is: it may have arrived'
            : 'once more at {time}, marked as the same mail; may arrive twice',
      };
  }
}
