import { existsSync, readdirSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect } from '@playwright/test';
import { simpleParser, type ParsedMail } from 'mailparser';

const folder = () => join(process.env.BROWSER_TEST_DATA ?? '', 'mail');

/** What the local mail server has taken for an address, oldest first. */
export async function lettersTo(address: string): Promise<ParsedMail[]> {
  if (!existsSync(folder())) return [];
  const names = readdirSync(folder())
    .filter((name) => name.endsWith('.eml'))
    .sort();
  const sources = await Promise.all(names.map((name) => readFile(join(folder(), name))));
  const head = (source: Buffer) => source.subarray(0, 2000).toString('latin1');
  return Promise.all(
    sources
      .filter((source) => head(source).includes(`\r\nDelivered-To: ${address}\r\n`))
      .map((source) => simpleParser(source)),
  );
}

/** Waits for the newest letter to an address whose subject holds these words. */
export async function letterTo(address: string, subject: string): Promise<ParsedMail> {
  const find = async () => (await lettersTo(address)).filter((mail) => mail.subject?.includes(subject)).at(-1);
  await expect
    .poll(async () => (await find())?.subject, { message: `a letter “${subject}” to ${address}`, timeout: 20_000 })
    .toBeTruthy();
  return (await find())!;
}

/** The one address in a letter's plain text that holds `part`. */
export function linkIn(mail: ParsedMail, part: string): string {
  const found = [...new Set((mail.text ?? '').match(/https?:\/\/\S+/g) ?? [])].filter((url) => url.includes(part));
  expect(found, `addresses with “${part}” in “${mail.subject}”`).toHaveLength(1);
  return found[0]!;
}
