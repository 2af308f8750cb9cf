import { once } from 'node:events';
import { createServer, type AddressInfo, type Socket } from 'node:net';

export interface Received {
  readonly from: string;
  readonly to: string;
  readonly raw: string;
  /** Whether the server said that it took it. */
  readonly answered: boolean;
}
export interface ScriptedServer {
  readonly url: string;
  readonly received: Received[];
  readonly connections: () => number;
  /** Answers every new connection with this instead of a greeting, until set to null. */
  refuseWith(greeting: string | null): void;
  stop(): Promise<void>;
}

/** What a recipient's local part makes the server do; anything else is taken. */
const AT_RCPT: Readonly<Record<string, string>> = {
  't-450': '450 4.2.1 try again later',
  't-550': '550 5.1.1 no such person',
  't-full': '552 5.2.2 mailbox full',
  't-421': '421 4.3.2 going down',
};
const AT_DOT: Readonly<Record<string, string>> = {
  'd-451': '451 4.7.1 slow down',
  'd-554': '554 5.7.1 refused by policy',
  'd-552': '552 5.3.4 message too big',
};

/** A mail server on this machine that does what the recipient's address says. `greylist-…` is put off the first time. */
export async function startScriptedServer(): Promise<ScriptedServer> {
  const received: Received[] = [];
  const sockets = new Set<Socket>();
  const seen = new Set<string>();
  let connections = 0;
  let greeting: string | null = null;

  const server = createServer((socket) => {
    connections += 1;
    sockets.add(socket);
    socket.on('close', () => sockets.delete(socket));
    socket.on('error', () => {});
    let input = '';
    let inData = false;
    let from = '';
    let to = '';
    const say = (line: string) => socket.write(`${line}\r\n`);

    const atEndOfData = (raw: string) => {
      const local = to.split('@')[0] ?? '';
      const dropped = local.startsWith('drop-after-dot');
      const refusal = AT_DOT[local.replace(/\+.*/, '')];
      if (!refusal) received.push({ from, to, raw, answered: !dropped });
      if (dropped && !seen.has(`${to} dropped`)) {
        if (!local.startsWith('drop-after-dot-always')) seen.add(`${to} dropped`);
        socket.destroy();
        return;
      }
      say(refusal ?? '250 2.0.0 taken');
    };

    const command = (line: string) => {
      const verb = line.slice(0, 4).toUpperCase();
      const address = /<([^>]*)>/.exec(line)?.[1] ?? '';
      if (verb === 'EHLO') say('250-scripted\r\n250 8BITMIME');
      else if (verb === 'MAIL') {
        from = address;
        say('250 ok');
      } else if (verb === 'RCPT') {
        to = address;
        const local = to.split('@')[0] ?? '';
        const first = local.startsWith('greylist-') && !seen.has(to);
        seen.add(to);
        say(first ? '450 4.7.1 greylisted' : (AT_RCPT[local.replace(/\+.*/, '')] ?? '250 ok'));
      } else if (verb === 'DATA') {
        if (to.startsWith('drop-before-data')) return void socket.destroy();
        inData = true;
        say('354 go on');
      } else if (verb === 'QUIT') {
        say('221 bye');
        socket.end();
      } else say('250 ok');
    };

    socket.on('data', (chunk) => {
      input += chunk.toString('latin1');
      if (inData && to.startsWith('drop-mid-data')) return void socket.destroy();
      for (;;) {
        if (inData) {
          const end = input.indexOf('\r\n.\r\n');
          if (end < 0) return;
          const raw = Buffer.from(input.slice(0, end + 2).replace(/^\.\./gm, '.'), 'latin1').toString('utf8');
          input = input.slice(end + 5);
          inData = false;
          atEndOfData(raw);
        } else {
          const end = input.indexOf('\r\n');
          if (end < 0) return;
          const line = input.slice(0, end);
          input = input.slice(end + 2);
          command(line);
        }
      }
    });
    if (greeting) {
      say(greeting);
      socket.end();
    } else say('220 scripted ready');
  });
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  return {
    url: `smtp://127.0.0.1:${(server.address() as AddressInfo).port}`,
    received,
    connections: () => connections,
    refuseWith(line) {
      greeting = line;
    },
    async stop() {
      for (const socket of sockets) socket.destroy();
      server.close();
      await once(server, 'close');
    },
  };
}
