import { randomBytes } from 'node:crypto';
import { config } from '@/config.server';
import { db, sqlite } from '@/db/client.server';
import { letters } from '@/db/schema';
import { waitAfter } from './backoff';
import { letterHtml } from './letter-html';
import { judge, type Answer } from './outcome';
import { senderParts } from './sender';
import type { Message } from './transport.server';

export interface Letter {
  readonly toName?: string | null;
  readonly toAddress: string;
  readonly subject: string;
  readonly text: string;
  /** Usual: made from the text, with its links. */
  readonly html?: string;
  /** Usual: `Auto-Submitted: auto-generated`, since nobody sits behind it. `From` and `Reply-To` count too. */
  readonly headers?: Readonly<Record<string, string>>;
  /** After this it is worth nothing and is not sent any more. */
  readonly expiresInMinutes: number;
}

/**
 * Puts one mail to one person in the outbox; the mail worker sends it within a second or two, and tries again when the
 * server is away. May be called inside a transaction.
 *
 *     queueLetter({ toAddress: 'wenna@quilletlane.example', subject: 'Your link', text: 'Open this:\n\nhttps://…', expiresInMinutes: 15 })
 */
export function queueLetter(letter: Letter): void {
  const { toName = null, toAddress, subject, text, html = letterHtml(text), headers, expiresInMinutes } = letter;
  if ([toAddress, subject].some((line) => /[\r\n\0]/.test(line)))
    throw new Error('a line break in a header of a letter');
  const now = Date.now();
  db.insert(letters)
    .values({
      id: randomBytes(12).toString('hex'),
      toName: toName && toName.replace(/[\r\n\0]/g, ' '),
      toAddress,
      subject,
      text,
      html,
      headers: headers ?? { 'Auto-Submitted': 'auto-generated' },
      nextAt: new Date(now),
      createdAt: new Date(now),
      expiresAt: new Date(now + expiresInMinutes * 60_000),
    })
    .run();
}

export interface DueLetter {
  readonly id: string;
  readonly attempts: number;
  readonly toName: string | null;
  readonly toAddress: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly headers: string;
  readonly createdAt: number;
}

/** Longer than any answer may take: a letter that a dead process held is sent again after this. */
const HOLD = 25 * 60_000;

/** Takes the next letter that is due; two workers never take the same one. */
export function takeLetter(now: number): DueLetter | null {
  const database = sqlite();
  // Looked at several times a second: no write unless there is something to write.
  const any = database.prepare(
    "SELECT 1 FROM letter WHERE state = 'queued' AND (next_at <= @now OR expires_at <= @now) LIMIT 1",
  );
  if (!any.get({ now })) return null;
  return database
    .transaction((): DueLetter | null => {
      const blank = "text = '', html = ''";
      database
        .prepare(`UPDATE letter SET state = 'expired', ${blank} WHERE state = 'queued' AND expires_at <= ?`)
        .run(now);
      const letter = database
        .prepare(
          `UPDATE letter SET attempts = attempts + 1, next_at = @until WHERE id = (
             SELECT id FROM letter WHERE state = 'queued' AND next_at <= @now ORDER BY next_at LIMIT 1)
           RETURNING id, attempts, to_name AS toName, to_address AS toAddress, subject, text, html, headers, created_at AS createdAt`,
        )
        .get({ now, until: now + HOLD }) as DueLetter | undefined;
      return letter ?? null;
    })
    .immediate();
}

export function letterMessage(letter: DueLetter): Message {
  const { From, 'Reply-To': replyTo, ...headers } = JSON.parse(letter.headers) as Record<string, string>;
  const { domain, ...sender } = senderParts(From ?? config.mailFrom);
  return {
    envelope: { from: senderParts(config.mailFrom).address, to: letter.toAddress },
    from: sender,
    to: { name: letter.toName ?? '', address: letter.toAddress },
    replyTo,
    subject: letter.subject,
    text: letter.text,
    html: letter.html || undefined,
    messageId: `<l.${letter.id}@${domain}>`,
    date: new Date(letter.createdAt),
    headers,
  };
}

/**
 * Writes down what came of a letter. What it said is forgotten once it has gone: it may hold a sign-in link. A lost
 * answer is tried again, since a letter twice is better than none.
 */
export function recordLetter(
  { id, attempts }: DueLetter,
  answer: Answer,
  { now, random }: { now: number; random: number },
): void {
  const outcome = judge(answer);
  const reply = answer.reply.slice(0, 300);
  const end = sqlite().prepare("UPDATE letter SET state = @state, reply = @reply, text = '', html = '' WHERE id = @id");
  const again = sqlite().prepare(
    'UPDATE letter SET attempts = @attempts, next_at = @nextAt, reply = @reply WHERE id = @id',
  );
  switch (outcome.kind) {
    case 'accepted':
      end.run({ id, reply, state: 'accepted' });
      return;
    case 'refused':
    case 'stop':
      end.run({ id, reply, state: 'rejected' });
      return;
    case 'server away':
      again.run({ id, reply, attempts: attempts - 1, nextAt: now });
      return;
    case 'later':
    case 'unknown':
      again.run({ id, reply, attempts, nextAt: now + waitAfter(attempts, random) });
  }
}
