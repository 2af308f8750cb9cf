import { eq } from 'drizzle-orm';
import { config } from '@/config.server';
import { db } from '@/db/client.server';
import { mailings, subscribers } from '@/db/schema';
import { emailKey } from '@/features/accounts/email-key';
import { fanOut } from '@/features/mailing/fan-out.server';
import { beginSending, mailingOfNewest, openMailing, saveMailing } from '@/features/mailing/mailings.server';
import { judge, type Answer } from '@/features/mailing/outcome';
import { claim, finishMailings, handOver, record } from '@/features/mailing/outbox.server';
import { senderParts } from '@/features/mailing/sender';
import type { Asker } from '@/features/projects/projects.server';
import { leave } from '@/features/subscribers/subscribers.server';
import { DEMO_SUBSCRIBERS, type DemoSubscriber } from './subscribers';

const MINUTE = 60_000;
const DAY = 24 * 60 * MINUTE;
/** The edition was four days old less two hours when the mailing went out. */
const SENT_BEFORE = 4 * DAY - 120 * MINUTE;
const BETWEEN_COPIES = 700;
const OWNER = 'demo';

const WORDS = {
  subject: 'New: Seed keeper’s book box',
  greeting: 'Hello [name],',
  excerpt:
    'On the shelf it is a book. Lift the top of the pages, and a season of seed packets stands inside.\n\n' +
    'The trick is the strip that goes round the spine: it has to be as long as the curve, and a ruler will not tell you how long that is. Put in your own size, and it is worked out for you, with everything else.',
  withHero: true,
};

const ANSWERS: Readonly<Record<'takes' | NonNullable<DemoSubscriber['server']>, Answer>> = {
  takes: { phase: 'complete', code: 250, reply: '250 2.0.0 Message accepted' },
  later: { phase: 'envelope', command: 'RCPT TO', code: 451, reply: '451 4.7.1 Please try again in a minute' },
  refuses: { phase: 'envelope', command: 'RCPT TO', code: 550, reply: '550 5.1.1 No such person here' },
};

/** Sends the newest edition's mailing as the worker would, to mail servers that answer as the demo says. Nothing leaves the house. */
export async function seedMailing(projectId: string, author: Asker, now: number): Promise<void> {
  const begun = now - SENT_BEFORE;
  const draft = mailingOfNewest(projectId, author);
  if (!draft || draft === 'unpublished') throw new Error('The demo mails an edition that is not out.');
  const saved = saveMailing(draft, WORDS, draft.row.revision, begun - 30 * MINUTE);
  const mailing = openMailing(draft.row.id, author);
  if (!saved.ok || !mailing) throw new Error('The demo’s mailing could not be saved.');
  db.update(mailings)
    .set({ createdAt: new Date(begun - 45 * MINUTE), testedAt: new Date(begun - 10 * MINUTE) })
    .where(eq(mailings.id, mailing.row.id))
    .run();
  const outcome = await beginSending(mailing, saved.revision, begun);
  if (!outcome.ok) throw new Error(`The demo’s mailing could not be sent: ${outcome.sentence}`);
  fanOut(mailing.row.id, { now: begun + 400, domain: senderParts(config.mailFrom).domain });
  const ended = deliverAll(begun + 1000);
  finishMailings(ended);
  for (const { email, leftDaysAgo } of DEMO_SUBSCRIBERS) {
    if (leftDaysAgo !== undefined) leave(leaveTokenOf(email), now - leftDaysAgo * DAY);
  }
}

/** Hands copy after copy over, and again what a server put off, until nothing is due. Gives when the last answer came. */
function deliverAll(start: number): number {
  const servers = new Map(DEMO_SUBSCRIBERS.map(({ email, server }) => [emailKey(email), server]));
  const putOff = new Set<number>();
  let clock = start;
  let last = start;
  for (let rests = 0; rests < 3; rests += 1) {
    for (
      let ids = claim(OWNER, { now: clock, limit: 16 });
      ids.length > 0;
      ids = claim(OWNER, { now: clock, limit: 16 })
    ) {
      for (const id of ids) {
        const copy = handOver(id, OWNER, clock);
        if (!copy) continue;
        clock += BETWEEN_COPIES;
        last = clock;
        const server = servers.get(emailKey(copy.address));
        const answer = ANSWERS[server === undefined || putOff.has(id) ? 'takes' : server];
        if (server === 'later') putOff.add(id);
        record(copy, OWNER, { answer, outcome: judge(answer), now: clock, random: 0.5 });
      }
    }
    clock += 2 * MINUTE;
  }
  return last;
}

function leaveTokenOf(email: string): string {
  const key = emailKey(email) ?? '';
  return (
    db.select({ token: subscribers.leaveToken }).from(subscribers).where(eq(subscribers.emailKey, key)).get()?.token ??
    ''
  );
}
