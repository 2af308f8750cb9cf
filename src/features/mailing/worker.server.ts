import { config } from '@/config.server';
import { PAUSE_AFTER_AWAY } from './backoff';
import { copyMessage, templateOf, type Template } from './copy.server';
import { fanOut, mailingsToPrepare } from './fan-out.server';
import { openGate, readGate, shutGate } from './gate.server';
import { letterMessage, recordLetter, takeLetter, type DueLetter } from './letters.server';
import { judge, type Answer } from './outcome';
import {
  claim,
  finishMailings,
  handOver,
  pauseMailing,
  record,
  recover,
  release,
  sendingMailings,
  type Copy,
} from './outbox.server';
import { senderParts } from './sender';
import { LANES, openTransport, type MailTransport, type Message } from './transport.server';
import { holdLease, leaveLease, newOwner } from './worker-lease.server';

export interface WorkerParts {
  readonly transport: MailTransport;
  /** Milliseconds since the epoch. */
  readonly clock?: () => number;
  readonly random?: () => number;
  readonly lanes?: number;
  readonly owner?: string;
}

export interface MailWorker {
  /** Keeps the lease, makes rows, and fills the free lanes, which then go on by themselves. True when it may work. */
  round(): boolean;
  /** When nothing is under way any more. */
  settled(): Promise<void>;
  /** Starts nothing more; waits for what is under way, at most so long, and puts back what was only claimed. */
  stop(options?: { readonly patience?: number }): Promise<void>;
}

const CLAIMED_AT_ONCE = 16;
const KEEP_LEASE_EVERY = 5_000;

/** The mail worker without a timer round it: everything it needs is given, so that a test can drive it. */
export function createMailWorker({
  transport,
  clock = Date.now,
  random = Math.random,
  lanes = LANES,
  owner = newOwner(),
}: WorkerParts): MailWorker {
  const claimed: number[] = [];
  const lanesInUse = new Set<Promise<void>>();
  const inFlight = new Set<number>();
  const templates = new Map<string, Template>();
  const { domain } = senderParts(config.mailFrom);
  let stopping = false;
  let heldSince: number | null = null;

  const isShut = () => (readGate()?.opensAt ?? 0) > clock();

  function afterAnswer(answer: Answer): void {
    const outcome = judge(answer);
    if (outcome.kind !== 'server away') {
      if (answer.code !== null && readGate()) openGate();
      return;
    }
    const now = clock();
    const gate = shutGate(answer.reply, now);
    if (!outcome.pause && now - gate.since < PAUSE_AFTER_AWAY) return;
    const why = outcome.pause
      ? 'The mail server refuses our sign-in'
      : 'The mail server has been away for half an hour';
    for (const mailing of sendingMailings()) pauseMailing(mailing, now, `${why}: ${answer.reply}`);
  }

  async function sendLetter(letter: DueLetter): Promise<void> {
    const answer = await transport.send(letterMessage(letter));
    recordLetter(letter, answer, { now: clock(), random: random() });
    afterAnswer(answer);
  }

  async function sendCopy(id: number): Promise<void> {
    const copy = handOver(id, owner, clock());
    if (!copy) return;
    inFlight.add(id);
    try {
      const answer = await handToServer(copy);
      record(copy, owner, { answer, outcome: judge(answer), now: clock(), random: random() });
      afterAnswer(answer);
    } finally {
      inFlight.delete(id);
    }
  }

  async function handToServer(copy: Copy): Promise<Answer> {
    let message: Message;
    try {
      const template = templates.get(copy.mailingId) ?? templateOf(copy.mailingId);
      templates.set(copy.mailingId, template);
      message = copyMessage(template, copy);
    } catch (error) {
      // Nothing was sent: this must not look like a lost answer.
      console.error('A copy of a mailing could not be written.', error);
      return { phase: 'connect', code: null, reply: 'This copy could not be written.', refusedHere: true };
    }
    return transport.send(message);
  }

  /** Letters first: somebody is waiting for them. */
  function nextJob(): (() => Promise<void>) | null {
    if (stopping || heldSince === null || isShut()) return null;
    const letter = takeLetter(clock());
    if (letter) return () => sendLetter(letter);
    if (claimed.length === 0) claimed.push(...claim(owner, { now: clock(), limit: CLAIMED_AT_ONCE }));
    const id = claimed.shift();
    return id === undefined ? null : () => sendCopy(id);
  }

  /** Each lane takes its next job itself, so that a slow one holds up nobody else. */
  function fill(): void {
    while (lanesInUse.size < lanes) {
      const job = nextJob();
      if (!job) return;
      const lane: Promise<void> = job()
        .catch((error: unknown) => console.error('The mail worker could not finish a mail.', error))
        .then(() => {
          lanesInUse.delete(lane);
          fill();
        })
        .catch((error: unknown) => console.error('The mail worker could not take the next mail.', error));
      lanesInUse.add(lane);
    }
  }

  async function settled(): Promise<void> {
    while (lanesInUse.size > 0) await Promise.race(lanesInUse);
  }

  return {
    settled,
    round() {
      const now = clock();
      if (stopping) return false;
      if (heldSince === null || now - heldSince >= KEEP_LEASE_EVERY) heldSince = holdLease(owner, now) ? now : null;
      if (heldSince === null) {
        // Whoever holds it puts these back.
        claimed.length = 0;
        return false;
      }
      recover(owner, now, [...inFlight]);
      for (const mailing of mailingsToPrepare()) fanOut(mailing, { now, domain });
      fill();
      const sending = sendingMailings();
      if (sending.length > 0) finishMailings(now);
      for (const mailing of templates.keys()) if (!sending.includes(mailing)) templates.delete(mailing);
      return true;
    },
    async stop({ patience = 20_000 } = {}) {
      stopping = true;
      let timer: NodeJS.Timeout | undefined;
      const enough = new Promise<void>((resolve) => (timer = setTimeout(resolve, patience)));
      await Promise.race([settled(), enough]);
      clearTimeout(timer);
      release(claimed.splice(0), owner);
      if (heldSince !== null) leaveLease(owner);
      transport.close();
    },
  };
}

const BETWEEN_ROUNDS = 400;

/**
 * Sends what the outbox and the letters hold until it is stopped. Several processes may start one: only the one that
 * holds the lease works, another takes over when it is gone.
 */
export function startMailWorker({ smtpUrl }: { readonly smtpUrl: string }): {
  /** Waits for what is under way; asked again, for the same. */
  stop(): Promise<void>;
} {
  const worker = createMailWorker({ transport: openTransport(smtpUrl) });
  const turn = () => {
    try {
      worker.round();
    } catch (error) {
      console.error('The mail worker stumbled and goes on.', error);
    }
  };
  const timer = setInterval(turn, BETWEEN_ROUNDS);
  turn();

  let stopped: Promise<void> | undefined;
  const stop = () => {
    clearInterval(timer);
    return (stopped ??= worker.stop());
  };
  return { stop };
}
