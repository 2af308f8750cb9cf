import { readdir, readFile, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { simpleParser, type ParsedMail } from 'mailparser';
import { config } from '@/config.server';

/** What the local mail server keeps; the newest of them are listed. */
const LISTED = 200;
const NAME = /^[0-9]+-[0-9]+-[0-9a-f]+$/;
const folder = () => join(config.dataDir, 'mail');

export interface MailSummary {
  /** The file's name without `.eml`. */
  readonly id: string;
  readonly at: number;
  readonly from: string;
  readonly to: string;
  readonly subject: string;
}
export interface ReceivedMail extends MailSummary {
  /** Every header line as it came, unfolded. */
  readonly headers: readonly { readonly name: string; readonly value: string }[];
  readonly text: string;
  readonly html: string | null;
  readonly bytes: number;
  readonly raw: string;
}

/** Newest first. */
export async function listMails(): Promise<{ readonly mails: readonly MailSummary[]; readonly total: number }> {
  const ids = await mailIds();
  const read = await Promise.all(ids.slice(0, LISTED).map(async (id) => readMail(id)));
  return { mails: read.filter((mail) => mail !== null), total: ids.length };
}

async function mailIds(): Promise<string[]> {
  const names = await readdir(folder()).catch(() => []);
  const ids = names.flatMap((name) =>
    name.endsWith('.eml') && NAME.test(name.slice(0, -4)) ? [name.slice(0, -4)] : [],
  );
  return ids.sort((a, b) => (a < b ? 1 : -1));
}

/** Null when there is no such mail. */
export async function readMail(id: string): Promise<ReceivedMail | null> {
  if (!NAME.test(id)) return null;
  const raw = await readFile(join(folder(), `${id}.eml`)).catch(() => null);
  if (!raw) return null;
  const mail = await simpleParser(raw, { skipImageLinks: true, skipTextToHtml: true, skipHtmlToText: true });
  return {
    id,
    at: Number(id.split('-')[0]),
    from: addresses(mail.from),
    to: addresses(mail.to),
    subject: mail.subject ?? '(no subject)',
    headers: mail.headerLines.map(({ key, line }) => {
      const colon = line.indexOf(':');
      return {
        name: line.slice(0, colon) || key,
        value: line
          .slice(colon + 1)
          .replace(/\r?\n\s*/g, ' ')
          .trim(),
      };
    }),
    text: mail.text ?? '',
    html: mail.html || null,
    bytes: raw.byteLength,
    raw: raw.toString('utf8'),
  };
}

const addresses = (field: ParsedMail['to']): string =>
  [field ?? []]
    .flat()
    .map(({ text }) => text)
    .join(', ');

export async function deleteMails(): Promise<void> {
  const ids = await mailIds();
  await Promise.all(ids.map(async (id) => rm(join(folder(), `${id}.eml`), { force: true })));
}
