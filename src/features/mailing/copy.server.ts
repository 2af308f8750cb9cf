import { eq } from 'drizzle-orm';
import { config } from '@/config.server';
import { db } from '@/db/client.server';
import { mailings } from '@/db/schema';
import { fillCopy, type CopyParts, type Recipient } from './compose/fill-copy';
import type { UnitPart } from './compose/unit-parts';
import { bounceAddress, listHeaders, senderParts } from './sender';
import type { Message } from './transport.server';

/** What is the same in every copy of a mailing, as it was fixed when sending began. */
export interface Template extends CopyParts {
  readonly subject: string;
  readonly fromName: string;
  readonly replyTo: string | undefined;
  readonly date: Date;
}

export function templateOf(mailingId: string): Template {
  const row = db.select().from(mailings).where(eq(mailings.id, mailingId)).get();
  if (!row?.html || !row.text || !row.unitParts || !row.messageDate)
    throw new Error(`mailing ${mailingId} has not been compiled`);
  return {
    subject: row.subject,
    greeting: row.greeting,
    html: row.html,
    text: row.text,
    unitParts: row.unitParts as unknown as Record<'in' | 'mm' | 'cm', UnitPart>,
    siteUrl: config.siteUrl,
    fromName: row.fromName ?? '',
    replyTo: row.replyTo ?? undefined,
    date: row.messageDate,
  };
}

/** One recipient's copy as it goes to the server. */
export function copyMessage(template: Template, copy: Recipient & { readonly messageId: string }): Message {
  const { address, domain } = senderParts(config.mailFrom);
  return {
    envelope: { from: bounceAddress(copy.messageId, domain), to: copy.address },
    from: { name: template.fromName, address },
    to: { name: copy.name ?? '', address: copy.address },
    replyTo: template.replyTo,
    subject: template.subject,
    ...fillCopy(template, copy),
    messageId: copy.messageId,
    date: template.date,
    headers: listHeaders({ listName: config.listName, domain, siteUrl: config.siteUrl, token: copy.leaveToken }),
  };
}
