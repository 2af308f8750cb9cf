import { PassThrough, type Readable } from 'node:stream';
import { createTransport } from 'nodemailer';
import type { Answer, Phase } from './outcome';

/** As many messages are under way at once as there are connections, never more. */
export const LANES = 4;
const MINUTE = 60_000;
/** RFC 5321, 4.5.3.2: a shorter wait for the answer to the last dot makes duplicates. */
const USUAL_TIMEOUTS = { connectionTimeout: 2 * MINUTE, greetingTimeout: 5 * MINUTE, socketTimeout: 10 * MINUTE };

export interface Message {
  /** Where refusals go, and the one recipient. */
  readonly envelope: { readonly from: string; readonly to: string };
  readonly from: { readonly name: string; readonly address: string };
  readonly to: { readonly name: string; readonly address: string };
  readonly replyTo?: string;
  readonly subject: string;
  readonly text: string;
  readonly html?: string;
  readonly messageId: string;
  readonly date: Date;
  readonly headers: Readonly<Record<string, string>>;
}

export interface MailTransport {
  /** Never throws for what a server or the net does; the answer says how far it got. */
  send(message: Message, options?: { readonly signal?: AbortSignal }): Promise<Answer>;
  close(): void;
}

export interface TransportOptions {
  readonly lanes?: number;
  readonly timeouts?: Partial<typeof USUAL_TIMEOUTS>;
}

/**
 * One pool of connections to one server. nodemailer's error alone cannot tell a line that broke before the message was
 * whole from one that broke after the last dot, so the message goes through a stream that is asked how far it was read.
 */
export function openTransport(smtpUrl: string, { lanes = LANES, timeouts }: TransportOptions = {}): MailTransport {
  const mailer = createTransport({
    ...readSmtpUrl(smtpUrl),
    pool: true,
    maxConnections: lanes,
    maxMessages: Infinity,
    // The pool must not send again on its own: who gets what twice is decided in the outbox.
    maxRequeues: 0,
    ...USUAL_TIMEOUTS,
    ...timeouts,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  mailer.use('stream', (mail, done) => {
    const { witness } = mail.data as { witness?: Witness };
    mail.message.processFunc((message: Readable) => {
      const stream = message.pipe(new PassThrough());
      if (witness) witness.stream = stream;
      return stream;
    });
    done();
  });

  return {
    async send({ envelope, from, to, headers, ...message }, { signal } = {}) {
      // Such an address may only be named to a server that offers SMTPUTF8 (RFC 6531), which the pool does not tell.
      if (/[^\0-\x7f]/.test(envelope.to.slice(0, envelope.to.lastIndexOf('@')))) return NOT_ASCII;
      const witness: Witness = {};
      try {
        const info = await mailer.sendMail({
          ...message,
          envelope: { from: envelope.from, to: [envelope.to] },
          from: { ...from },
          to: { ...to },
          headers: Object.fromEntries(Object.entries(headers).map(asWritten)),
          // The same on a resend, so that both copies are the same to the byte.
          baseBoundary: /[0-9a-f]{8,}/.exec(message.messageId)?.[0] ?? 'letter',
          textEncoding: 'quoted-printable',
          signal,
          witness,
        } as Parameters<typeof mailer.sendMail>[0]);
        return { phase: 'complete', code: Number(/^\d{3}/.exec(info.response)?.[0] ?? 250), reply: info.response };
      } catch (error) {
        return answerOf(error as SmtpError, witness);
      }
    },
    close: () => mailer.close(),
  };
}

/** Our headers are ASCII as they are; nodemailer would wrap a quoted name and the id after it in an encoded word. */
const asWritten = ([name, value]: [string, string]) =>
  [name, { prepared: true, foldLines: true, value: value.replace(/[^\x20-\x7e]/g, '') }] as const;

const NOT_ASCII: Answer = {
  phase: 'connect',
  code: null,
  enhanced: '5.6.7',
  reply: 'Letters other than a to z before the @ cannot be written to.',
  refusedHere: true,
};

interface Witness {
  stream?: Readable;
}
interface SmtpError extends Error {
  readonly code?: string;
  readonly command?: string;
  readonly response?: string;
  readonly responseCode?: number;
}

function answerOf(error: SmtpError, { stream }: Witness): Answer {
  const code = error.responseCode ?? null;
  return {
    phase: phaseOf(stream),
    command: error.command,
    code,
    reply: error.response ?? error.message,
    refusedHere: code === null && (error.code === 'EENVELOPE' || error.code === 'EMESSAGE'),
  };
}

/** The stream is made once the connection stands, read once the server asks for the message, and ends before its last dot. */
function phaseOf(stream: Readable | undefined): Phase {
  if (!stream) return 'connect';
  if (stream.readableEnded) return 'complete';
  return stream.readableDidRead ? 'body' : 'envelope';
}

function readSmtpUrl(smtpUrl: string) {
  const url = new URL(smtpUrl);
  const secure = url.protocol === 'smtps:';
  const user = decodeURIComponent(url.username);
  return {
    host: url.hostname.replace(/^\[|\]$/g, ''),
    port: Number(url.port) || (secure ? 465 : 587),
    secure,
    ...(user ? { auth: { user, pass: decodeURIComponent(url.password) } } : {}),
  };
}
